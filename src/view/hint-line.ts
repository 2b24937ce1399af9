import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import type { PromptDialog } from "../editor/dialog.ts";
import { hintsOf } from "../editor/keymap.ts";
import type { EditorState } from "../editor/state.ts";
import { fittedLine, widthOf } from "./cells.ts";
import { type Line, type Piece, piece } from "./paint.ts";
import { plainWords } from "./signs.ts";
import { typedPieces } from "./typed.ts";

/** What was just done or asked for, and what the keys do here, as many as there is room for. */
export function hintLine(state: EditorState, columns: number, charset: Charset): Line {
  const front = frontOf(state, columns, charset);
  const used = front.reduce((sum, { text }) => sum + widthOf(text), 0);
  return fittedLine([...front, ...hintPieces(state, columns - used, charset)], columns, charset);
}

function frontOf({ dialog, notice }: EditorState, columns: number, charset: Charset): Line {
  if (dialog?.type === "prompt") return promptPieces(dialog, columns, charset);
  if (notice === undefined) return [];
  return [
    piece(` ${plainWords(plainText(notice.text, 400), charset)} `, notice.bad ? "bad" : "good"),
    piece(" "),
  ];
}

function promptPieces({ label, input, problem }: PromptDialog, columns: number, charset: Charset): Line {
  const words = problem === undefined ? "" : `  ${plainWords(plainText(problem, 300), charset)}`;
  const front = ` ${label}: `;
  // What is wrong is never crowded out by what was typed.
  const room = Math.max(12, columns - widthOf(front) - Math.min(widthOf(words), Math.floor(columns / 2)) - 2);
  return [piece(front, "strong"), ...typedPieces(input, room, charset), piece(words, "bad"), piece("  ")];
}

function hintPieces(state: EditorState, columns: number, charset: Charset): readonly Piece[] {
  const pieces: Piece[] = [];
  let left = columns;
  for (const [keys, does] of hintsOf(state)) {
    const [shown, words] = [plainWords(` ${keys}`, charset), plainWords(` ${does} `, charset)];
    const width = widthOf(shown) + widthOf(words);
    if (width > left) break;
    pieces.push(piece(shown, "strong"), piece(words, "faint"));
    left -= width;
  }
  return pieces;
}
