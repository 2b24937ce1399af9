import type { AnswerAction, QuestionDialog } from "../dialog.ts";
import { type Message, type Step, step } from "../message.ts";
import type { EditorState } from "../state.ts";
import { askForName, goOn, overwrite, save } from "./files.ts";

/** Only the answers offered, and Esc for the last of them, which changes nothing. */
export function questionKey(
  state: EditorState,
  question: QuestionDialog,
  { key }: Message & { type: "key" },
): Step {
  const typed = key.name === "escape" ? question.answers.at(-1)?.key : key.text.toLowerCase();
  const answer = question.answers.find((each) => each.key === typed);
  if (answer === undefined || key.ctrl || key.alt) return step(state);
  return carryOut({ ...state, dialog: undefined, notice: undefined }, answer.action);
}

function carryOut(state: EditorState, action: AnswerAction): Step {
  switch (action.type) {
    case "nothing":
      return step(state);
    case "save-then":
      return save(state, action.after);
    case "drop-then":
      return goOn(state, action.after);
    case "overwrite":
      return overwrite(state, action.path, action.after);
    case "another-name":
      return askForName(state, action.after);
    case "recover":
      return step(state, { type: "recover", id: action.id });
    case "discard":
      return step(state, { type: "discard", id: action.id });
    case "remove-preset":
      return step(state, { type: "remove-preset", name: action.name });
    case "replace-preset":
      return step(state, action.command);
  }
}
