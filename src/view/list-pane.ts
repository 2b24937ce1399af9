import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import { fittingItems, type ListDialog, type ListItem } from "../editor/dialog.ts";
import type { Size } from "../editor/state.ts";
import { cut, fittedLine, wrappedLines } from "./cells.ts";
import { type Line, piece } from "./paint.ts";
import { shownLines } from "./scroll.ts";
import { plainWords, signsOf } from "./signs.ts";
import { typedPieces } from "./typed.ts";

/** Title, and what is typed to narrow the list down. */
const HEAD_ROWS = 2;
/** What the item in hand is, below a blank line. */
const DETAIL_ROWS = 4;

/** A list in the place of the chain. */
export function listPane(list: ListDialog, size: Size, charset: Charset): readonly Line[] {
  const items = fittingItems(list);
  const inHand = items[list.index];
  const count = `  ${items.length === 0 ? "none" : `${list.index + 1} of ${items.length}`}`;
  const head: readonly Line[] = [
    [piece(list.title, "heading"), piece(count, "faint")],
    [piece("narrow down: ", "faint"), ...typedPieces(list.filter, size.columns - 14, charset)],
  ];
  const rows = size.rows - HEAD_ROWS - DETAIL_ROWS;
  const { lines, line } = listLines(items, list.index, size.columns, charset);
  const body = shownLines(
    lines,
    { first: line, last: line + 1, line },
    { columns: size.columns, rows },
    charset,
  );
  const all = [...head, ...body, ...detailLines(inHand, list, size.columns, charset)];
  return all.slice(0, size.rows).map((each) => fittedLine(each, size.columns, charset));
}

function listLines(items: readonly ListItem[], index: number, columns: number, charset: Charset) {
  const lines: Line[] = [];
  let line = 0;
  for (const [k, item] of items.entries()) {
    if (item.group !== "" && item.group !== items[k - 1]?.group) lines.push([piece(item.group, "faint")]);
    if (k === index) line = lines.length;
    lines.push(itemLine(item, k === index, columns, charset));
  }
  return { lines, line };
}

/** Short details stand behind the name where there is room; long ones are told below the list. */
function itemLine({ label, detail }: ListItem, isInHand: boolean, columns: number, charset: Charset): Line {
  const sign = isInHand ? signsOf(charset).row : " ";
  const name = `${sign} ${plainText(label, 200)}`;
  const room = columns - name.length - 2;
  const shown =
    detail.length <= room ? [piece(`  ${plainWords(plainText(detail, 200), charset)}`, "faint")] : [];
  return [piece(cut(name, columns, charset), isInHand ? "inHand" : "plain"), ...shown];
}

function detailLines(
  item: ListItem | undefined,
  list: ListDialog,
  columns: number,
  charset: Charset,
): readonly Line[] {
  const problem = list.look?.problem;
  const detail = item === undefined ? "nothing fits what was typed" : plainText(item.detail, 300);
  const lines =
    problem === undefined
      ? wrappedLines(plainWords(detail, charset), columns, "plain")
      : wrappedLines(plainText(problem, 300), columns, "bad");
  const shown: Line[] = [[], ...lines].slice(0, DETAIL_ROWS);
  while (shown.length < DETAIL_ROWS) shown.push([]);
  return shown;
}
