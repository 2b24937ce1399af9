import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import type { TextField } from "../editor/text-field.ts";
import { widthOf } from "./cells.ts";
import { type Piece, piece } from "./paint.ts";

/** A line being typed with its caret, the part around the caret where there is no room for all of it. */
export function typedPieces(
  { text, caret }: TextField,
  columns: number,
  _charset: Charset,
): readonly Piece[] {
  // Each letter by itself, so that a letter that cannot be shown does not move the caret.
  const letters = [...text].map((letter) => plainText(letter) || "�");
  const [from, to] = around(letters, caret, Math.max(2, columns) - 1);
  return [
    piece(letters.slice(from, caret).join(""), "value"),
    piece(letters[caret] ?? " ", "caret"),
    piece(letters.slice(caret + 1, to).join(""), "value"),
  ];
}

/** As much before the caret as fits, then as much behind it. */
function around(
  letters: readonly string[],
  caret: number,
  columns: number,
): readonly [from: number, to: number] {
  let width = widthOf(letters[caret] ?? "");
  let from = caret;
  while (from > 0 && width + widthOf(letters[from - 1] as string) <= columns)
    width += widthOf(letters[--from] as string);
  let to = Math.min(letters.length, caret + 1);
  while (to < letters.length && width + widthOf(letters[to] as string) <= columns)
    width += widthOf(letters[to++] as string);
  return [from, to];
}
