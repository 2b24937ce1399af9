import { resolve } from "node:path";
import type { DocumentContext, FormulaParser } from "../document/context.ts";
import { loadFormulaParser, needsFormulaParser } from "../document/formula-text.ts";
import { fileState, tableFile } from "./table-files.ts";

/** A context whose tables are files on the disk. */
export interface FileContext extends DocumentContext {
  /** That file names are relative to. */
  readonly folder: string;
  /** Whether every table is still as it was when it was looked up; if not, resolve with `renewed`. */
  readonly isCurrent: () => boolean;
  /** The same context as a new object, so that stages are resolved again. */
  readonly renewed: () => FileContext;
}

let parser: FormulaParser | undefined;

/** Loads the parser of formulas once, for a chain that gets its first formula stage. */
export async function formulaParser(): Promise<FormulaParser> {
  parser ??= await loadFormulaParser();
  return parser;
}

/** The context of a chain file in `folder`; the parser of formulas is there if `chainText` may need it. */
export async function documentContext(folder: string, chainText = ""): Promise<FileContext> {
  return fileContext(folder, needsFormulaParser(chainText) ? await formulaParser() : undefined);
}

/** The same without waiting, with a parser that is loaded or without one. */
export function fileContext(folder: string, formula: FormulaParser | undefined = parser): FileContext {
  const states = new Map<string, string>();
  return {
    formula,
    folder,
    table: (file) => {
      // A NUL ends the path for the system and would name another file than the one that is shown.
      if (file.includes("\0")) return { ok: false, problem: NUL };
      const path = resolve(folder, file);
      states.set(path, fileState(path));
      return tableFile(folder, file);
    },
    isCurrent: () => [...states].every(([path, state]) => fileState(path) === state),
    renewed: () => fileContext(folder, formula),
  };
}

const NUL = { found: "the name holds a NUL character", allowed: "a file name without NUL" };
