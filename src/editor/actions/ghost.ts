import { type Step, step, told } from "../message.ts";
import type { EditorState } from "../state.ts";

/** Keeps the present response behind the charts, in the place of any kept before. */
export const keepGhost = (state: EditorState): Step =>
  told(
    { ...state, ghost: { document: state.document, resolved: state.resolved, inFront: false } },
    "the present response is kept behind the charts",
  );

export const dropGhost = (state: EditorState): Step =>
  state.ghost === undefined
    ? told(state, "no response is kept", true)
    : told({ ...state, ghost: undefined }, "the response behind the charts is dropped");

/** Before and after change places on the charts and in the reading. */
export function flipGhost(state: EditorState): Step {
  const { ghost } = state;
  if (ghost === undefined) return told(state, "no response is kept; b keeps the present one", true);
  return step({ ...state, ghost: { ...ghost, inFront: !ghost.inFront }, notice: undefined });
}
