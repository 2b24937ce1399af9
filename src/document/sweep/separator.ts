import { COMMENT_MARKS } from "./comment.ts";
import { Lines } from "./lines.ts";
import type { SeparatorName } from "./sweep.ts";

export interface Separator {
  readonly name: SeparatorName;
  /** Character code; that of a space stands for any run of blanks. */
  readonly code: number;
  /** Whether a comma inside a field can be a decimal mark. */
  readonly decimalComma: boolean;
}

const SEMICOLON: Separator = { name: "semicolon", code: 59, decimalComma: true };
const TAB: Separator = { name: "tab", code: 9, decimalComma: true };
const COMMA: Separator = { name: "comma", code: 44, decimalComma: false };
export const BLANKS: Separator = { name: "blanks", code: 32, decimalComma: false };

/** A semicolon or tab is never part of a number, a comma can be: hence the order. */
const CANDIDATES = [SEMICOLON, TAB, COMMA];
const SAMPLE_LINES = 20;
const SAMPLE_CHARACTERS = 10_000;

/**
 * The one of semicolon, tab and comma that stands in most rows, if it stands in half of them; else blanks. Where no line
 * begins like a number, all lines count as rows.
 */
export function detectSeparator(text: string): Separator {
  const lines = sampleOf(text);
  const rows = lines.filter((line) => /^[-+\u2212]?[.,]?\d/.test(line));
  const sample = rows.length > 0 ? rows : lines;
  let best = BLANKS;
  let most = 0;
  for (const candidate of CANDIDATES) {
    const count = sample.filter((line) => isSplitBy(line, candidate)).length;
    if (count <= most || count * 2 < sample.length) continue;
    best = candidate;
    most = count;
  }
  return best;
}

/** A tab among blanks is a blank: between tabs no field is two numbers. */
function isSplitBy(line: string, { code }: Separator): boolean {
  const fields = line.split(String.fromCharCode(code));
  return fields.length > 1 && (code !== TAB.code || !fields.some((field) => TWO_NUMBERS.test(field)));
}

const TWO_NUMBERS = /^\s*[-+\d.eE]+ +[-+\d.eE]+\s*$/;

/** First lines with content, without trailing comments; what is in quotation marks is blanked out to `0`. */
function sampleOf(text: string): string[] {
  const lines = new Lines(text);
  const sample: string[] = [];
  while (sample.length < SAMPLE_LINES && lines.advanceToContent(COMMENT_MARKS)) {
    const line = text.slice(lines.start, Math.min(lines.end, lines.start + SAMPLE_CHARACTERS));
    const unquoted = line.replace(/"[^"]*"/g, (field) => (/\d/.test(field[1]) ? "0" : ""));
    sample.push(unquoted.replace(/\s[#!%].*$/, "").trim());
  }
  return sample;
}
