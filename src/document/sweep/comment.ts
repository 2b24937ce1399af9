import { isBlank } from "./lines.ts";
import type { Separator } from "./separator.ts";

/** Each starts a comment that takes the whole line. */
export const COMMENT_MARKS = "#!%";

const HASH = 35;
const BANG = 33;
const PERCENT = 37;
const QUOTE = 34;

/**
 * Where a row of numbers ends before a trailing comment. A mark counts only behind a blank or a separator, and `%`
 * only with words behind it: `50%` and `50 %` are left whole and refused as numbers, never read as 50.
 */
export function endOfRow(text: string, start: number, end: number, separator: Separator): number {
  let inQuotes = false;
  for (let index = start; index < end; index += 1) {
    const code = text.charCodeAt(index);
    if (code > PERCENT) continue;
    if (code === QUOTE) inQuotes = !inQuotes;
    if (inQuotes || (code !== HASH && code !== BANG && code !== PERCENT)) continue;
    const before = text.charCodeAt(index - 1);
    if (!isBlank(before) && before !== separator.code) continue;
    if (code !== PERCENT || saysSomething(text, index + 1, end, separator)) return index;
  }
  return end;
}

function saysSomething(text: string, from: number, end: number, separator: Separator): boolean {
  let index = from;
  while (index < end && isBlank(text.charCodeAt(index))) index += 1;
  return index < end && text.charCodeAt(index) !== separator.code;
}
