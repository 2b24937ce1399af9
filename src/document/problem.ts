import type { Problem } from "../core/result.ts";
import { plainText, quoted } from "../core/text.ts";

/** Names and list positions that lead from the top of the file to a value. */
export type DocumentPath = readonly (string | number)[];

/** Where in the text: line and column count from 1, columns in characters (code points). */
export interface Place {
  readonly fileName: string;
  readonly line: number;
  readonly column: number;
}

/** What is wrong with a chain, by its path; with a place once it was found in a text. */
export interface DocumentProblem extends Problem {
  readonly path: DocumentPath;
  /** What the place points at: the value itself, or the name in front of it. */
  readonly at: "value" | "name";
  readonly place?: Place;
}

/** Parts of messages are short; this only bounds what a hostile file can put into one. */
const MAX_MESSAGE_LENGTH = 1500;
const MAX_NAME_LENGTH = 40;

export const problemAt = (
  path: DocumentPath,
  found: string,
  allowed: string,
  at: DocumentProblem["at"] = "value",
): DocumentProblem => ({ path, found, allowed, at });

/** The same problem seen from further out. */
export const within = (outer: DocumentPath, problem: DocumentProblem): DocumentProblem => ({
  ...problem,
  path: [...outer, ...problem.path],
});

/** `stages[2].parts.R`; names that are no plain words in brackets and quotation marks. */
export function pathText(path: DocumentPath): string {
  if (path.length === 0) return "the chain";
  return path.map(stepText).join("").replace(/^\./, "");
}

function stepText(step: string | number): string {
  if (typeof step === "number") return `[${step}]`;
  return /^[A-Za-z_][\w-]*$/.test(step) ? `.${plainText(step, MAX_NAME_LENGTH)}` : `[${quoted(step)}]`;
}

/** One line: `pump2.chain.json:12:31: stages[2].parts.R: "4,7k" has a comma; allowed is a decimal point, as in 4.7k`. */
export function problemText({ place, path, found, allowed }: DocumentProblem): string {
  const where =
    place === undefined ? "" : `${plainText(place.fileName, 200)}:${place.line}:${place.column}: `;
  return plainText(`${where}${pathText(path)}: ${found}; allowed is ${allowed}`, MAX_MESSAGE_LENGTH);
}

/** A JSON value in a few words, for what was found. */
export function described(value: unknown): string {
  if (typeof value === "string") return quoted(value);
  if (Array.isArray(value)) return value.length === 0 ? "an empty list" : "a list";
  if (typeof value === "object" && value !== null) return "an object in braces";
  return String(value);
}
