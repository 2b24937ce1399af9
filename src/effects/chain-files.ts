import { statSync } from "node:fs";
import { dirname, resolve } from "node:path";
import { ok, type Result } from "../core/result.ts";
import { type ContextChain, chainFromText } from "./chain-text.ts";
import { type FileProblem, fileProblem, systemProblem } from "./file-problem.ts";
import { readTextFile } from "./read-file.ts";
import { type FileStamp, stampOf } from "./stamp.ts";
import { writeWhole } from "./write-file.ts";

/** Beyond the five million characters that a chain may have even where each takes four bytes. */
export const MAX_CHAIN_BYTES = 20_000_000;

export interface OpenedChain extends ContextChain {
  /** Absolute. */
  readonly path: string;
  /** Of the file as it was read; goes back into `saveChainFile`. */
  readonly stamp: FileStamp;
}

/** Reads and checks a chain file; the problem says where, what was found and what is allowed. */
export async function openChainFile(path: string): Promise<Result<OpenedChain, FileProblem>> {
  const read = readTextFile(path, MAX_CHAIN_BYTES);
  if (!read.ok) return read;
  const absolute = resolve(path);
  const chain = await chainFromText(read.value.text, path, dirname(absolute));
  return chain.ok ? ok({ ...chain.value, path: absolute, stamp: read.value.stamp }) : chain;
}

export type SaveOutcome =
  | { readonly type: "saved"; readonly path: string; readonly stamp: FileStamp }
  /** Nothing was written: the file on disk is not the one that was read. `overwrite` writes it all the same. */
  | { readonly type: "changed"; readonly problem: FileProblem }
  | { readonly type: "failed"; readonly problem: FileProblem };

export interface SaveOptions {
  readonly overwrite?: boolean;
}

/**
 * Writes a chain's text whole or not at all. `stamp` is that of the file as it was read; without one there must
 * be no file yet.
 */
export function saveChainFile(
  path: string,
  text: string,
  stamp: FileStamp | undefined,
  { overwrite = false }: SaveOptions = {},
): SaveOutcome {
  const changed = () => (overwrite ? undefined : changedOnDisk(path, stamp));
  const problem = changed();
  if (problem !== undefined) return { type: "changed", problem };
  try {
    const stillWanted = () => changed() === undefined;
    if (writeWhole(path, text, { stillWanted })) return saved(path, text);
    return { type: "changed", problem: changed() ?? fileProblem(path, CHANGED, OVERWRITE) };
  } catch (error) {
    return { type: "failed", problem: systemProblem(error, path) };
  }
}

function saved(path: string, text: string): SaveOutcome {
  return { type: "saved", path: resolve(path), stamp: stampOf(Buffer.from(text, "utf8")) };
}

const CHANGED = "it was changed on the disk since it was read";
const OVERWRITE = "overwriting it on request, or another name";

/** Why the file is not the one that `stamp` was taken from, or why it exists at all; undefined where all is as expected. */
export function changedOnDisk(path: string, stamp: FileStamp | undefined): FileProblem | undefined {
  if (stamp === undefined) {
    return isFile(path) ? fileProblem(path, "there is a file of that name already", OVERWRITE) : undefined;
  }
  const now = readTextFile(path, MAX_CHAIN_BYTES);
  if (now.ok && now.value.stamp.hash === stamp.hash) return undefined;
  if (now.ok || isFile(path)) return fileProblem(path, CHANGED, OVERWRITE);
  return fileProblem(path, "it was removed from the disk since it was read", OVERWRITE);
}

/** Whatever else may be in the way is said when it is written to. */
function isFile(path: string): boolean {
  try {
    return statSync(path).isFile();
  } catch {
    return false;
  }
}
