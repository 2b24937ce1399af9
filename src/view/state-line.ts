import type { Against } from "../core/chain.ts";
import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import { type EditorState, isUnsaved, shownChain } from "../editor/state.ts";
import { spread } from "./cells.ts";
import { type Line, piece } from "./paint.ts";
import { signsOf } from "./signs.ts";

const AGAINST: Readonly<Record<Against, string>> = {
  emf: "gain against EMF",
  input: "gain against input",
  insertion: "insertion gain",
};

/** Title, whether anything is unsaved, and what gain is counted against. */
export function stateLine(state: EditorState, columns: number, charset: Charset): Line {
  const { dot } = signsOf(charset);
  const unsaved = isUnsaved(state) ? [piece(` ${dot} `, "faint"), piece("unsaved", "strong")] : [];
  const front = state.ghost?.inFront ? [piece(` ${dot} `, "faint"), piece("BEFORE", "strong")] : [];
  const title = plainText(state.resolved.title, 200) || "untitled chain";
  return spread(
    [piece(title, "strong")],
    [...front, ...unsaved, piece(`  ${AGAINST[shownChain(state).against]}`, "faint")],
    columns,
    charset,
  );
}
