import { readdirSync, rmSync, statSync } from "node:fs";
import { join } from "node:path";
import type { Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import { codeOf, type FileProblem, fileProblemText, systemProblem } from "./file-problem.ts";
import { type JournalRecord, MAX_JOURNAL_BYTES, readJournalText } from "./journal-entry.ts";
import { ownerOf } from "./journal-name.ts";
import { isRunning } from "./process-identity.ts";
import { decoded, readRegularFile } from "./read-file.ts";
import { setAside } from "./set-aside.ts";

/** Unsaved work of a program that was ended. */
export interface LeftBehind extends JournalRecord {
  readonly id: string;
}

/** What is beyond is offered once these are gone; nothing is thrown away unasked. */
const MOST_OFFERED = 20;

/** Journals of processes that no longer run, the latest first; damaged ones are set aside and noted. Never throws. */
export function leftBehindIn(folder: string, note: (text: string) => void): readonly LeftBehind[] {
  const told = (problem: FileProblem) => note(fileProblemText(problem));
  const entries: LeftBehind[] = [];
  for (const id of abandoned(folder, told)) {
    if (entries.length === MOST_OFFERED) break;
    const path = join(folder, id);
    const record = readRecord(path);
    if (!record.ok) told(record.problem);
    else if (record.value !== undefined) entries.push({ ...record.value, id });
    else note(putAside(path));
  }
  return entries;
}

/** File names, the latest first. Drafts that were cut off are removed. */
function abandoned(folder: string, told: (problem: FileProblem) => void): readonly string[] {
  try {
    const names = readdirSync(folder).filter((name) => {
      const owner = ownerOf(name);
      if (owner === undefined || isRunning(owner)) return false;
      if (owner.isDraft) removeDraft(join(folder, name));
      return !owner.isDraft;
    });
    const times = new Map(names.map((name) => [name, changeTimeMs(join(folder, name))]));
    return names.sort((one, other) => times.get(other)! - times.get(one)!);
  } catch (error) {
    if (codeOf(error) !== "ENOENT") told(systemProblem(error, folder));
    return [];
  }
}

function removeDraft(path: string): void {
  try {
    rmSync(path, { force: true });
  } catch {
    // It only takes up room.
  }
}

const changeTimeMs = (path: string): number => statSync(path, { throwIfNoEntry: false })?.mtimeMs ?? 0;

/** Without a value where it is damaged. */
function readRecord(path: string): Result<JournalRecord | undefined, FileProblem> {
  const read = readRegularFile(path, MAX_JOURNAL_BYTES);
  if (!read.ok) return read;
  const text = decoded(read.value.bytes);
  return { ok: true, value: text === undefined ? undefined : readJournalText(text) };
}

function putAside(path: string): string {
  try {
    return plainText(`${path}: this journal is damaged; it is kept as ${setAside(path)}`, 1000);
  } catch (error) {
    return fileProblemText(systemProblem(error, path));
  }
}
