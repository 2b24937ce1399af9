import type { Problem } from "../../core/result.ts";
import { plainText, quoted } from "../../core/text.ts";

/** Why a text is no sweep. `found` and `allowed` are safe to show; `allowed` follows the words "allowed are". */
export interface SweepProblem extends Problem {
  /** As given by the caller. */
  readonly file: string;
  /** From 1; absent where the problem is the whole file or an option. */
  readonly line?: number;
}

/** Makes the problems of one file. */
export type Refuse = (found: string, allowed: string, line?: number) => SweepProblem;

export const refuseIn =
  (file: string): Refuse =>
  (found, allowed, line) => ({ file, ...(line === undefined ? {} : { line }), found, allowed });

/** One line: `pump2.csv:17: "abc" is no number; allowed are rows of frequency, dB and degrees`. */
export function sweepProblemText({ file, line, found, allowed }: SweepProblem): string {
  const place = line === undefined ? plainText(file, 200) : `${plainText(file, 200)}:${line}`;
  return `${place}: ${found}; allowed are ${allowed}`;
}

/** Longest stretch of foreign text that is cleaned at all: a line can be megabytes long. */
const MAX_LOOKED_AT = 256;

/** Foreign text in quotation marks, cleaned and cut. */
export const shown = (text: string): string => quoted(text.slice(0, MAX_LOOKED_AT));

/** `a`, `a and b`, `a, b and c`. */
export function listed(words: readonly string[]): string {
  if (words.length < 2) return words.join("");
  return `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`;
}
