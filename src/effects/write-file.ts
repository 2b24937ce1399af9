/**
 * Own code and no library: the ones there are for Node write with a single call and do not look at how much of it
 * was taken, so that a disk that fills up leaves a file cut short in place of the whole one.
 */
import {
  accessSync,
  closeSync,
  constants,
  fchmodSync,
  fchownSync,
  fsyncSync,
  openSync,
  readlinkSync,
  realpathSync,
  renameSync,
  rmSync,
  type Stats,
  statSync,
  writeFileSync,
} from "node:fs";
import { dirname, join, resolve } from "node:path";
import { codeOf } from "./file-problem.ts";
import { uniqueWord } from "./unique-word.ts";

const PERMISSION_BITS = 0o7777;
const MOST_LINKS = 40;

export interface WriteOptions {
  /** Of a file that is new; the mode of one that exists is kept. */
  readonly mode?: number;
  /** Called when everything is written and only the exchange is left; false leaves the old file. */
  readonly stillWanted?: () => boolean;
}

/**
 * Writes a whole file or nothing: into a new file beside it, forced to the disk, then put in its place. Links are
 * followed; mode and, where the rights suffice, owner are kept. Throws what the system refuses, the old file whole.
 *
 * Returns whether it was exchanged.
 */
export function writeWhole(path: string, text: string, options: WriteOptions = {}): boolean {
  const target = linkedPath(path);
  const before = statusOf(target);
  // A file marked as read-only is not written, though its folder would allow it to be exchanged.
  if (before !== undefined) accessSync(target, constants.W_OK);
  const folder = dirname(target);
  const temporary = join(folder, `.halfpower-${process.pid}-${uniqueWord()}.tmp`);
  try {
    fill(temporary, text, before, options.mode ?? 0o666);
    if (options.stillWanted?.() === false) return false;
    renameSync(temporary, target);
  } finally {
    rmSync(temporary, { force: true });
  }
  forceFolder(folder);
  return true;
}

/** The path behind all links, also where the last of them leads to nothing yet. */
export function linkedPath(path: string): string {
  let target = resolve(path);
  for (let links = 0; links < MOST_LINKS; links++) {
    try {
      return realpathSync(target);
    } catch (error) {
      if (codeOf(error) !== "ENOENT") throw error;
    }
    const link = linkAt(target);
    if (link === undefined) return target;
    target = resolve(realpathSync(dirname(target)), link);
  }
  return target;
}

function linkAt(path: string): string | undefined {
  try {
    return readlinkSync(path);
  } catch {
    return undefined;
  }
}

function statusOf(path: string): Stats | undefined {
  const status = statSync(path, { throwIfNoEntry: false });
  if (status === undefined || status.isFile()) return status;
  throw Object.assign(new Error("not a file"), { code: status.isDirectory() ? "EISDIR" : "ENXIO" });
}

function fill(path: string, text: string, before: Stats | undefined, newMode: number): void {
  // Closed to others until it has the mode of the file whose content it holds.
  const file = openSync(path, "wx", before === undefined ? newMode : 0o600);
  try {
    writeFileSync(file, text, "utf8");
    if (before !== undefined) keepRights(file, before);
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
}

function keepRights(file: number, { uid, gid, mode }: Stats): void {
  try {
    fchownSync(file, uid, gid);
  } catch {
    // Without the right to give a file away it becomes the writer's, as with any other exchange of files.
  }
  fchmodSync(file, mode & PERMISSION_BITS);
}

/** The exchange itself on the disk; not every file system can, and the file is whole either way. */
function forceFolder(folder: string): void {
  let file: number | undefined;
  try {
    file = openSync(folder, "r");
    fsyncSync(file);
  } catch {
    // Nothing to be done.
  } finally {
    if (file !== undefined) closeSync(file);
  }
}
