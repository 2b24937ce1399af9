import type { Brush } from "./brush.ts";
import { isSureWidth } from "./cells.ts";
import type { Row } from "./frame.ts";
import { plain } from "./style.ts";

/** Cells it takes before erasing to the end of the row is shorter than writing blanks. */
const worthErasing = 4;

const isSameCell = (before: Row, after: Row, x: number): boolean =>
  before.clusters[x] === after.clusters[x] && before.styles[x]!.key === after.styles[x]!.key;

/** Writes the cells in which `after` differs from `before`, from left to right. */
export function paintRow(brush: Brush, y: number, before: Row, after: Row): void {
  if (before === after) return;
  const columns = after.clusters.length;
  const end = endOfChanges(before, after);
  const blankFrom = startOfBlankEnd(after);
  let x = 0;
  while (x < end) {
    if (isSameCell(before, after, x)) {
      x += 1;
      continue;
    }
    approach(brush, { x, y }, after);
    if (x >= blankFrom && end - x >= worthErasing) {
      brush.eraseRest();
      return;
    }
    const width = after.clusters[x + 1] === "" ? 2 : 1;
    brush.put(after.clusters[x]!, width, after.styles[x]!, columns);
    x += width;
  }
}

function endOfChanges(before: Row, after: Row): number {
  let end = after.clusters.length;
  while (end > 0 && isSameCell(before, after, end - 1)) end -= 1;
  return end;
}

function startOfBlankEnd(row: Row): number {
  let start = row.clusters.length;
  while (start > 0 && row.clusters[start - 1] === " " && row.styles[start - 1]!.key === plain.key) start -= 1;
  return start;
}

/** Goes to a cell: by writing the unchanged cells in between once more where that is no longer than a move. */
function approach(brush: Brush, to: { x: number; y: number }, row: Row): void {
  const at = brush.at;
  if (at !== undefined && at.y === to.y && at.x < to.x) {
    const gap = row.clusters.slice(at.x, to.x);
    const isCheap = Buffer.byteLength(gap.join("")) <= brush.costOfMove(to);
    if (isCheap && canRewrite(brush, row, at.x, to.x)) {
      for (const cluster of gap) brush.put(cluster, 1, brush.style, row.clusters.length);
      return;
    }
  }
  brush.moveTo(to);
}

/** Only single-column cells of sure width in the style at hand: nothing else is as short as it looks. */
function canRewrite(brush: Brush, row: Row, from: number, to: number): boolean {
  for (let x = from; x < to; x += 1) {
    const isWide = row.clusters[x] === "" || row.clusters[x + 1] === "";
    if (isWide || row.styles[x]!.key !== brush.style.key || !isSureWidth(row.clusters[x]!)) return false;
  }
  return true;
}
