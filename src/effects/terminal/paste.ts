import { stripVTControlCharacters } from "node:util";

/** The longest paste handed on, in UTF-16 units; what is beyond it is dropped. */
export const longestPaste = 10_000;

/** Adds to a paste under way, never beyond the longest. */
export const extendPaste = (sofar: string, more: string): string => (sofar + more).slice(0, longestPaste);

/** Pasted text made one harmless line: no control characters or sequences, line breaks and tabs as one blank. */
export function cleanPaste(raw: string): string {
  return stripVTControlCharacters(raw)
    .replace(/[\r\n]+$/, "")
    .replace(/[\r\n\t]+/g, " ")
    .replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029]/g, "")
    .replace(/[\ud800-\udbff]$/, "");
}
