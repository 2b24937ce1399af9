import { type Stats, statSync } from "node:fs";
import { resolve } from "node:path";
import { fail, ok, type Problem, type Result } from "../core/result.ts";
import type { TabulatedResponse } from "../core/stages/kind.ts";
import { plainText } from "../core/text.ts";
import { readSweep } from "../document/sweep/read.ts";
import { tabulated } from "../document/sweep/tabulated.ts";
import { readTextFile } from "./read-file.ts";

type Table = Result<TabulatedResponse>;

/** A million rows of three long numbers fit in. */
export const MAX_SWEEP_BYTES = 200_000_000;
const MOST_KEPT = 16;

/** Measured responses by path, each read again only when its file has changed. The least recently used go first. */
const kept = new Map<string, { readonly state: string; readonly table: Table }>();

/** The response in a file named by a `table` stage; `file` is relative to `folder`. */
export function tableFile(folder: string, file: string): Table {
  const path = resolve(folder, file);
  const state = fileState(path);
  const before = kept.get(path);
  kept.delete(path);
  const table = before?.state === state ? before.table : readTable(path, file);
  kept.set(path, { state, table });
  if (kept.size > MOST_KEPT) kept.delete(kept.keys().next().value as string);
  return table;
}

/** Differs whenever the content may differ; empty where there is no file. */
export function fileState(path: string): string {
  let status: Stats | undefined;
  try {
    status = statSync(path, { throwIfNoEntry: false });
  } catch {
    // Whatever is in the way is said when the file is read.
  }
  if (status === undefined) return "";
  return [status.dev, status.ino, status.size, status.mtimeMs, status.ctimeMs].join(" ");
}

function readTable(path: string, file: string): Table {
  const read = readTextFile(path, MAX_SWEEP_BYTES);
  const name = plainText(file, 200);
  if (!read.ok) return fail(placed(name, read.problem));
  const sweep = readSweep(read.value.text, file);
  if (sweep.ok) return ok(tabulated(sweep.value));
  const { line } = sweep.problem;
  return fail(placed(line === undefined ? name : `${name}:${line}`, sweep.problem));
}

const placed = (place: string, { found, allowed }: Problem): Problem => ({
  found: `${place}: ${found}`,
  allowed,
});
