import type { Charset } from "../core/units/format.ts";
import type { Size } from "../editor/state.ts";
import { fitted, fittedLine } from "./cells.ts";
import { type Line, piece } from "./paint.ts";
import { signsOf } from "./signs.ts";

/** What of a long text has to be seen: a block of lines, and one line of it before all. */
export interface Focus {
  readonly first: number;
  readonly last: number;
  readonly line: number;
}

/**
 * As many lines as there are rows, those in focus among them. A sign at the right end of the first and last line says
 * that there is more above and below.
 */
export function shownLines(
  lines: readonly Line[],
  focus: Focus,
  size: Size,
  charset: Charset,
): readonly Line[] {
  const from = scrollTo(lines.length, focus, size.rows);
  const shown = lines.slice(from, from + size.rows).map((line) => fittedLine(line, size.columns, charset));
  while (shown.length < size.rows) shown.push([piece(" ".repeat(size.columns))]);
  if (from > 0) shown[0] = withMore(shown[0] as Line, "above", size.columns, charset);
  if (from + size.rows < lines.length) {
    shown[size.rows - 1] = withMore(shown[size.rows - 1] as Line, "below", size.columns, charset);
  }
  return shown;
}

/** A third of the rows is kept above the block; where it is longer than the pane its one line is what counts. */
function scrollTo(count: number, { first, last, line }: Focus, rows: number): number {
  if (count <= rows) return 0;
  const block = first - Math.floor((rows - Math.min(rows, last - first)) / 3);
  const wanted = Math.max(block, line - rows + 2);
  return Math.max(0, Math.min(count - rows, wanted));
}

function withMore(line: Line, where: "above" | "below", columns: number, charset: Charset): Line {
  const words = ` ${signsOf(charset).more} more ${where}`;
  return [
    ...fittedLine(line, columns - words.length, charset),
    piece(fitted(words, words.length, "left", charset), "faint"),
  ];
}
