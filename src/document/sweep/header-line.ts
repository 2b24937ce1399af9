import type { Column } from "./column.ts";
import { COMMENT_MARKS } from "./comment.ts";
import { Fields, splitFields } from "./fields.ts";
import { columnsOfHeader } from "./header.ts";
import { layoutOf } from "./layout.ts";
import { Lines } from "./lines.ts";
import { BLANKS, type Separator } from "./separator.ts";

/** Longer header cells are cut. */
const MAX_CELL_LENGTH = 200;

/** Cells of the header on the present line. */
export function headerCells(lines: Lines, separator: Separator): string[] {
  const { text, start, end } = lines;
  const whole = cellsOf(text, start, end, separator);
  return separator === BLANKS
    ? (cellsBetweenBlanks(text.slice(start, end), rowWidth(lines)) ?? whole)
    : whole;
}

function cellsOf(text: string, start: number, end: number, separator: Separator): string[] {
  const fields = new Fields();
  splitFields(fields, text, start, end, separator);
  const cells = Array.from({ length: fields.count }, (_, index) => fields.at(index));
  const last = cells.findLastIndex((cell) => cell !== "");
  return cells.slice(0, last + 1).map((cell) => cell.slice(0, MAX_CELL_LENGTH).replaceAll('""', '"'));
}

const MAX_BLANK_HEADER = 2000;

/** Between blanks, `Frequency (Hz)` is one cell or two: whichever way gives as many as the rows have. */
function cellsBetweenBlanks(line: string, width: number): string[] | undefined {
  if (line.length > MAX_BLANK_HEADER || line.includes('"')) return undefined;
  const ways = [/\s+/, /\s+(?![([{/])/, /\s{2,}|\t/].map((way) => line.trim().split(way));
  return ways.find((cells) => cells.length === width) ?? ways[1];
}

/** Number of fields in the row under the present line. */
function rowWidth({ text, end }: Lines): number {
  const below = new Lines(text.slice(end + 1, end + 1 + MAX_BLANK_HEADER));
  if (!below.advanceToContent(COMMENT_MARKS)) return 0;
  return cellsOf(below.text, below.start, below.end, BLANKS).length;
}

/**
 * What to say when the comment right above the first row reads like a header that differs from what is assumed:
 * comments are not read, but kHz taken for Hz should not pass in silence.
 */
export function commentedHeader(
  { text, start, line }: Lines,
  separator: Separator,
  assumed: readonly Column[],
): string | undefined {
  const above = new Lines(text.slice(Math.max(0, start - MAX_BLANK_HEADER), start));
  let comment = "";
  while (above.advance()) {
    const first = above.firstVisible();
    if (first < above.end) comment = above.text.slice(first, above.end);
  }
  const words = comment.replace(/^[#!%\s]+/, "");
  const cells =
    separator === BLANKS
      ? cellsBetweenBlanks(words, assumed.length)
      : cellsOf(words, 0, words.length, separator);
  const named = cells && columnsOfHeader(cells);
  if (!cells || !named?.ok || !layoutOf(named.value.columns, cells).ok) return undefined;
  const isSame = named.value.columns.every(({ label }, index) => label === assumed[index]?.label);
  return isSame
    ? undefined
    : `the comment above line ${line} looks like a header but is not read as one; --columns can say so`;
}
