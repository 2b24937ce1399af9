import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import type { QuestionDialog } from "../editor/dialog.ts";
import type { Size } from "../editor/state.ts";
import { fittedLine, wrappedLines } from "./cells.ts";
import { type Line, piece } from "./paint.ts";

/** A question in the place of the chain, each answer with its key. */
export function questionPane(
  { text, answers }: QuestionDialog,
  size: Size,
  charset: Charset,
): readonly Line[] {
  const lines: Line[] = [
    [],
    ...wrappedLines(plainText(text, 600), size.columns, "strong"),
    [],
    ...answers.map(({ key, words }): Line => [piece(`  ${key}`, "inHand"), piece(`  ${words}`)]),
  ];
  while (lines.length < size.rows) lines.push([]);
  return lines.slice(0, size.rows).map((line) => fittedLine(line, size.columns, charset));
}
