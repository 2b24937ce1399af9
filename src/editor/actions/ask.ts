import type { PromptDialog, PromptPurpose } from "../dialog.ts";
import { type Step, step } from "../message.ts";
import type { EditorState } from "../state.ts";
import { textField } from "../text-field.ts";

/** Asks for one line at the foot of the screen. */
export function ask(state: EditorState, purpose: PromptPurpose, label: string, text = ""): Step {
  const dialog: PromptDialog = { type: "prompt", purpose, label, input: textField(text), problem: undefined };
  return step({ ...state, dialog, notice: undefined });
}
