import { closeSync, constants, fstatSync, openSync, readSync, type Stats, statSync } from "node:fs";
import { fail, ok, type Result } from "../core/result.ts";
import { type FileProblem, fileProblem, refuseFile, systemProblem } from "./file-problem.ts";
import { type FileStamp, stampOf } from "./stamp.ts";

export interface ReadFile {
  readonly text: string;
  readonly stamp: FileStamp;
}

const UTF8 = "a text file in UTF-8";

/** The text of a regular file of at most `maxBytes`, a byte order mark included. Never waits and never throws. */
export function readTextFile(path: string, maxBytes: number): Result<ReadFile, FileProblem> {
  const read = readRegularFile(path, maxBytes);
  if (!read.ok) return read;
  const { bytes, mtimeMs } = read.value;
  const text = decoded(bytes);
  if (text === undefined) return refuseFile(path, "it is not text in UTF-8", UTF8);
  return ok({ text, stamp: stampOf(bytes, mtimeMs) });
}

/** Text of UTF-8 with its byte order mark, if there is one; undefined where it is no UTF-8. */
export function decoded(bytes: Uint8Array): string | undefined {
  try {
    return new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return undefined;
  }
}

interface Content {
  readonly bytes: Uint8Array;
  readonly mtimeMs: number;
}

export function readRegularFile(path: string, maxBytes: number): Result<Content, FileProblem> {
  let file: number | undefined;
  try {
    // Looked at before it is opened: opening some devices does something, and a pipe would wait for its other end.
    const special = notRegular(statSync(path), path);
    if (special !== undefined) return fail(special);
    file = openSync(path, constants.O_RDONLY | constants.O_NONBLOCK | constants.O_NOCTTY);
    const status = fstatSync(file);
    const swapped = notRegular(status, path);
    if (swapped !== undefined) return fail(swapped);
    const bytes = bytesUpTo(file, status.size, maxBytes);
    if (bytes === undefined) return fail(tooLarge(path, maxBytes));
    return ok({ bytes, mtimeMs: status.mtimeMs });
  } catch (error) {
    return fail(systemProblem(error, path));
  } finally {
    if (file !== undefined) closeSync(file);
  }
}

const tooLarge = (path: string, maxBytes: number): FileProblem =>
  fileProblem(path, `it is larger than ${bytesText(maxBytes)}`, `a file of at most ${bytesText(maxBytes)}`);

export const bytesText = (bytes: number): string =>
  bytes >= 1e6
    ? `${Math.round(bytes / 1e6)} MB`
    : bytes >= 1e3
      ? `${Math.round(bytes / 1e3)} kB`
      : `${bytes} bytes`;

function notRegular(status: Stats, path: string): FileProblem | undefined {
  if (status.isFile()) return undefined;
  if (status.isDirectory()) return fileProblem(path, "it is a folder", "a file");
  if (status.isFIFO()) return fileProblem(path, "it is a pipe", "a file, or - for standard input");
  return fileProblem(path, "it is a device or socket", "a file");
}

/** To the end of the file, which may have grown since or, as those of the system do, claim to be empty. */
function bytesUpTo(file: number, expectedBytes: number, maxBytes: number): Uint8Array | undefined {
  if (expectedBytes > maxBytes) return undefined;
  let buffer = Buffer.alloc(Math.min(maxBytes, Math.max(expectedBytes, 4096)) + 1);
  let length = 0;
  for (;;) {
    const count = readSync(file, buffer, length, buffer.length - length, null);
    if (count === 0) return buffer.subarray(0, length);
    length += count;
    if (length > maxBytes) return undefined;
    if (length === buffer.length) {
      const larger = Buffer.alloc(Math.min(maxBytes + 1, 2 * buffer.length));
      buffer.copy(larger);
      buffer = larger;
    }
  }
}
