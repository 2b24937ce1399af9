import type { Charset } from "../core/units/format.ts";
import { toAscii } from "./ascii.ts";

/** A column of a table for people. */
export interface Column<Row> {
  readonly head: string;
  /** Numbers stand to the right, words to the left. */
  readonly side: "left" | "right";
  readonly cell: (row: Row) => string;
}

const GAP = "  ";

/** Lines with a heading, columns aligned, no blanks at the end. */
export async function tableLines<Row>(
  columns: readonly Column<Row>[],
  rows: readonly Row[],
  charset: Charset,
): Promise<readonly string[]> {
  const shown = (text: string) => (charset === "ascii" ? toAscii(text) : text);
  const cells = columns.map(({ head, cell }) => [shown(head), ...rows.map((row) => shown(cell(row)))]);
  const widthOf = await widthFor(cells);
  const padded = cells.map((texts, k) => aligned(texts, columns[k].side, widthOf));
  return Array.from({ length: rows.length + 1 }, (_, line) =>
    padded
      .map((texts) => texts[line])
      .join(GAP)
      .trimEnd(),
  );
}

type WidthOf = (text: string) => number;

/** Latin and Greek letters and the signs that values are written with: one cell each. */
const NARROW = /^[ -~\u00a1-\u00ac\u00ae-\u02ff\u0391-\u03c9−√∞]*$/;

const lengthOf: WidthOf = (text) => text.length;

/** The library that knows all widths takes long to load, and few tables need it. */
async function widthFor(cells: readonly (readonly string[])[]): Promise<WidthOf> {
  if (cells.every((texts) => texts.every((text) => NARROW.test(text)))) return lengthOf;
  const { default: stringWidth } = await import("string-width");
  return (text) => (NARROW.test(text) ? text.length : stringWidth(text));
}

function aligned(
  texts: readonly string[],
  side: Column<unknown>["side"],
  widthOf: WidthOf,
): readonly string[] {
  const widths = texts.map(widthOf);
  const width = widths.reduce((most, one) => Math.max(most, one), 0);
  return texts.map((text, k) => {
    const blanks = " ".repeat(width - widths[k]);
    return side === "right" ? blanks + text : text + blanks;
  });
}
