import type { Against } from "../core/chain.ts";
import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import { chainOnCharts, lookOf } from "../editor/selectors.ts";
import { type EditorState, isUnsaved, verdictsNow } from "../editor/state.ts";
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
  const title = plainText(state.resolved.title, 200) || "untitled chain";
  return spread(
    [piece(title, "strong"), ...onCharts(state, dot)],
    [...unsaved, ...limitsMet(state), piece(`  ${AGAINST[chainOnCharts(state).against]}`, "faint")],
    columns,
    charset,
  );
}

/** Whether the limits are met; nothing where there are none. */
function limitsMet(state: EditorState): Line {
  const { limits } = state.resolved;
  const verdicts = verdictsNow(state);
  if (limits.length === 0 && verdicts?.folding === undefined) return [];
  if (verdicts === undefined) return [piece("  limits ...", "faint")];
  const all = [...verdicts.limits, ...(verdicts.folding === undefined ? [] : [verdicts.folding])];
  const failed = all.filter(({ pass }) => !pass).length;
  if (failed === 0) return [piece("  limits met", "good")];
  return [piece(`  ${failed} of ${all.length} limits NOT met`, "bad")];
}

/** What the charts show where that is not the chain as it stands. */
function onCharts(state: EditorState, dot: string): Line {
  const look = lookOf(state)?.resolved;
  const words =
    look !== undefined
      ? `charts show ${plainText(look.title, 200) || "an untitled chain"}`
      : state.ghost?.inFront
        ? "charts show the response BEFORE"
        : undefined;
  return words === undefined ? [] : [piece(` ${dot} `, "faint"), piece(words, "inHand")];
}
