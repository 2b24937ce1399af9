import { mkdirSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { ok, type Result } from "../core/result.ts";
import { codeOf, type FileProblem, refuseFile, systemProblem } from "./file-problem.ts";
import { journalText, MAX_JOURNAL_BYTES, type UnsavedWork } from "./journal-entry.ts";
import { draftName, journalFileName, ownerOf } from "./journal-name.ts";
import { type LeftBehind, leftBehindIn } from "./left-behind.ts";
import { identityOf } from "./process-identity.ts";
import { bytesText } from "./read-file.ts";

/** Keeps unsaved work where the next start finds it. Every call is done when it returns and none throws. */
export interface Journal {
  /** At every edit. Replaces what was recorded before; small chains take well under a millisecond. */
  readonly record: (work: UnsavedWork) => Result<void, FileProblem>;
  /** When there is nothing unsaved any more. */
  readonly clear: () => Result<void, FileProblem>;
  /** What other copies of the program left when they were ended, the latest first; never that of one still running. */
  readonly leftBehind: () => readonly LeftBehind[];
  /** Forgets what was left behind: it was taken up again, or is not wanted. */
  readonly discard: (entry: Pick<LeftBehind, "id">) => Result<void, FileProblem>;
  /** Journals that were damaged and set aside, each once; safe to show. */
  readonly notes: () => readonly string[];
}

export interface JournalOptions {
  readonly pid?: number;
  readonly now?: () => number;
}

/** Eight hexadecimal digits of the clock: two journals of one process have to differ, no more. */
const distinction = (): string => (process.hrtime.bigint() % 0x1_0000_0000n).toString(16).padStart(8, "0");

/** A journal in a folder that several copies of the program share, each with a file of its own. */
export function openJournal(folder: string, options: JournalOptions = {}): Journal {
  const { pid = process.pid, now = Date.now } = options;
  const path = join(folder, journalFileName(identityOf(pid), distinction()));
  const notes = new Set<string>();
  return {
    record: (work) => recorded(path, folder, journalText({ ...work, timeMs: now() })),
    clear: () => removed(path),
    leftBehind: () => leftBehindIn(folder, (text) => notes.add(text)),
    discard: ({ id }) => (ownerOf(id) === undefined ? ok(undefined) : removed(join(folder, id))),
    notes: () => [...notes],
  };
}

/**
 * Into a draft, then in the place of the last one, so that there is a whole journal at any moment. It is not forced to
 * the disk: what the system has taken survives the program, however it ends. Only a power failure could lose it, and
 * waiting for the disk would hold up every key.
 */
function recorded(path: string, folder: string, text: string): Result<void, FileProblem> {
  const bytes = Buffer.from(text, "utf8");
  if (bytes.length > MAX_JOURNAL_BYTES) {
    return refuseFile(path, "the work is too large to be journalled", bytesText(MAX_JOURNAL_BYTES));
  }
  const draft = draftName(path);
  try {
    inFolder(folder, () => writeFileSync(draft, bytes, { mode: 0o600 }));
    renameSync(draft, path);
    return ok(undefined);
  } catch (error) {
    removed(draft);
    return { ok: false, problem: systemProblem(error, path) };
  }
}

/** The folder is made when it is missed. */
function inFolder(folder: string, write: () => void): void {
  try {
    write();
  } catch (error) {
    if (codeOf(error) !== "ENOENT") throw error;
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    write();
  }
}

function removed(path: string): Result<void, FileProblem> {
  try {
    rmSync(path, { force: true });
    return ok(undefined);
  } catch (error) {
    return { ok: false, problem: systemProblem(error, path) };
  }
}
