import { replaced } from "../apply.ts";
import { stepBack, stepForward } from "../history.ts";
import { type Step, step, told } from "../message.ts";
import type { EditorState } from "../state.ts";

export function undo(state: EditorState): Step {
  const back = stepBack(state.history, state.document);
  if (back === undefined) return told(state, "nothing to undo", true);
  return restored(state, back, `undone: ${back.step.name}`);
}

export function redo(state: EditorState): Step {
  const forward = stepForward(state.history, state.document);
  if (forward === undefined) return told(state, "nothing to redo", true);
  return restored(state, forward, `done again: ${forward.step.name}`);
}

function restored(
  state: EditorState,
  { step: past, history }: NonNullable<ReturnType<typeof stepBack>>,
  words: string,
): Step {
  const after = replaced(state, past.document);
  // A measured file that was moved since can keep a past chain from resolving.
  if (!after.ok) return told(state, `${past.name} cannot be taken back: ${after.problem.found}`, true);
  return step({ ...after.value, history, notice: { text: words, bad: false } });
}
