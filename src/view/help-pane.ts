import type { Charset } from "../core/units/format.ts";
import { BINDINGS, KEY_GROUPS } from "../editor/keymap.ts";
import type { Size } from "../editor/state.ts";
import { fitted, fittedLine, wrappedLines } from "./cells.ts";
import { type Line, piece } from "./paint.ts";
import { plainWords, signsOf } from "./signs.ts";

const KEY_COLUMNS = 11;
/** Two columns of groups from here on. */
const WIDE = 96;

const CAUTION =
  "The program models; it does not approve. Voltage and power ratings are not checked, and nothing here clears a chain " +
  "for patient contact, protection or safety functions. A filter connected to the mains needs parts certified for it " +
  "(IEC 60384-14 classes X and Y), local codes and a licensed electrician. Charged capacitors hurt.";

/** Every key by what one wants to do, generated from the key table. */
export function helpPane(scroll: number, size: Size, charset: Charset): readonly Line[] {
  const lines = helpLines(size.columns, charset);
  const from = Math.min(scroll, Math.max(0, lines.length - size.rows));
  const shown = lines.slice(from, from + size.rows);
  while (shown.length < size.rows) shown.push([]);
  if (from + size.rows < lines.length) {
    shown[size.rows - 1] = [piece(`${signsOf(charset).more} more below`, "faint")];
  }
  return shown.map((line) => fittedLine(line, size.columns, charset));
}

function helpLines(columns: number, charset: Charset): Line[] {
  const width = columns >= WIDE ? Math.floor((columns - 2) / 2) : columns;
  const blocks = KEY_GROUPS.map((group) => groupLines(group, width, charset));
  const body = columns >= WIDE ? sideBySide(blocks, width) : blocks.flat();
  return [...body, [], ...wrappedLines(CAUTION, columns, "faint")];
}

function groupLines(group: (typeof KEY_GROUPS)[number], columns: number, charset: Charset): Line[] {
  const keys = BINDINGS.filter((each) => each.group === group);
  return [
    [piece(group, "heading")],
    ...keys.map(
      ({ shown, does }): Line => [
        piece(fitted(plainWords(shown, charset), keyColumns(charset), "left", charset), "value"),
        piece(plainWords(` ${does}`, charset)),
      ],
    ),
    [],
  ].map((line) => fittedLine(line, columns, charset));
}

/** Arrows spelt out take more room. */
const keyColumns = (charset: Charset): number => (charset === "ascii" ? KEY_COLUMNS + 5 : KEY_COLUMNS);

/** Groups in two columns of about the same height, in their order. */
function sideBySide(blocks: readonly Line[][], width: number): Line[] {
  const total = blocks.reduce((sum, block) => sum + block.length, 0);
  const left: Line[] = [];
  const right: Line[] = [];
  for (const block of blocks) (left.length < total / 2 && right.length === 0 ? left : right).push(...block);
  const blank: Line = [piece(" ".repeat(width))];
  return Array.from({ length: Math.max(left.length, right.length) }, (_, k) => [
    ...(left[k] ?? blank),
    piece("  "),
    ...(right[k] ?? blank),
  ]);
}
