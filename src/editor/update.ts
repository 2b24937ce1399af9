import { problemText } from "../document/problem.ts";
import { resolveChain } from "../document/resolve.ts";
import { designed, designKey } from "./actions/design.ts";
import { editField, fieldKey, leave } from "./actions/field.ts";
import { saveWasHeld, wasSaved } from "./actions/files.ts";
import { helpKey } from "./actions/help.ts";
import { listKey } from "./actions/list.ts";
import { showPresets } from "./actions/presets.ts";
import { promptKey } from "./actions/prompt.ts";
import { questionKey } from "./actions/question.ts";
import { fieldInHand } from "./actions/rows.ts";
import { addKind, chainOfOne, insertStage, nameOf } from "./actions/stages.ts";
import { itemInHand, type Look, type QuestionDialog } from "./dialog.ts";
import { type KeyPress, keyWord } from "./key-press.ts";
import { bindingOf } from "./keymap.ts";
import {
  type KeepCommand,
  type LeftWork,
  type Message,
  type OpenedChain,
  type PresetLook,
  type Step,
  step,
  told,
} from "./message.ts";
import { type EditorState, openedState } from "./state.ts";

type KeyMessage = Message & { readonly type: "key" };

/** The state after a message, and what is to be done outside. Pure: it never waits and touches nothing. */
export function update(state: EditorState, message: Message): Step {
  switch (message.type) {
    case "key":
      return onKey(state, message);
    case "resized":
      return step({ ...state, size: message.size });
    case "kind-chosen":
      return addKind(state, message.kind, message);
    case "context-changed":
      return step({ ...state, context: message.context });
    case "chain-opened":
      return opened(state, message.chain);
    case "stage-taken":
      return insertStage(
        { ...state, context: message.context },
        message.stage,
        `add ${nameOf(message.stage)}`,
        message,
      );
    case "saved":
      return wasSaved(state, message.file, message.after);
    case "save-held":
      return saveWasHeld(state, message.path, message.words, message.after);
    case "presets-listed":
      return showPresets(state, message.presets, message.opens);
    case "preset-seen":
      return seen(state, message.name, message.look);
    case "left-behind":
      return askAboutLeftWork(state, message.work);
    case "designed":
      return designed(state, message.designed);
    case "judged":
      return step({ ...state, judged: message.judged });
    case "preset-held":
      return askToReplace(state, message.name, message.command);
    case "told":
      return told(state, message.text, message.bad);
  }
}

function onKey(state: EditorState, message: KeyMessage): Step {
  const { dialog } = state;
  // Leaving is possible from everywhere; what is unsaved is asked about.
  if (keyWord(message.key) === "ctrl+c" && dialog !== undefined && dialog.type !== "question") {
    const before = dialog.type === "field" ? leave(state, dialog).state : { ...state, dialog: undefined };
    return onKey(before, message);
  }
  switch (dialog?.type) {
    case "field":
      return fieldKey(state, dialog, message);
    case "prompt":
      return promptKey(state, dialog, message);
    case "list":
      return listKey(state, dialog, message);
    case "design":
      return designKey(state, dialog, message);
    case "question":
      return questionKey(state, dialog, message);
    case "help":
      return helpKey(state, dialog, message);
    default:
      return chainKey(state, message.key);
  }
}

function chainKey(state: EditorState, key: KeyPress): Step {
  const bound = bindingOf(keyWord(key));
  if (bound !== undefined) return bound.action(state);
  if (startsNumber(state, key)) return editField(state, key.text);
  return step(state.notice === undefined ? state : { ...state, notice: undefined });
}

/** A digit types over a number at once. */
const startsNumber = (state: EditorState, key: KeyPress): boolean =>
  key.name === "character" &&
  !key.ctrl &&
  !key.alt &&
  /^\d$/.test(key.text) &&
  fieldInHand(state)?.type === "number";

function opened(
  state: EditorState,
  { document, resolved, context, file, saved, isRecovered, shownName }: OpenedChain,
): Step {
  const fresh = openedState({ document, resolved, context, file, size: state.size });
  const after = isRecovered ? { ...fresh, saved } : fresh;
  return told(
    { ...after, nudge: state.nudge, overlays: state.overlays },
    `${isRecovered ? "taken up again" : "opened"}: ${shownName}`,
  );
}

/** A preset that was asked for is looked at, unless the list has gone on since. */
function seen(state: EditorState, name: string, look: PresetLook): Step {
  const { dialog } = state;
  if (dialog?.type !== "list" || itemInHand(dialog)?.value !== name) return step(state);
  return step({ ...state, dialog: { ...dialog, look: { value: name, ...looked(state, look) } } });
}

function looked(state: EditorState, look: PresetLook): Omit<Look, "value"> {
  if (!look.ok) return { resolved: undefined, problem: look.words };
  const document = look.type === "chain" ? look.document : chainOfOne(look.stage, state.document.sweep);
  const resolved = resolveChain(document, look.context);
  return resolved.ok
    ? { resolved: resolved.value, problem: undefined }
    : { resolved: undefined, problem: problemText(resolved.problem) };
}

function askToReplace(state: EditorState, name: string, command: KeepCommand): Step {
  const question: QuestionDialog = {
    type: "question",
    text: `There is a preset "${name}" already.`,
    answers: [
      { key: "r", words: "replace it", action: { type: "replace-preset", command } },
      { key: "c", words: "keep it as it is", action: { type: "nothing" } },
    ],
  };
  return step({ ...state, dialog: question });
}

function askAboutLeftWork(state: EditorState, { id, title, when }: LeftWork): Step {
  const question: QuestionDialog = {
    type: "question",
    text: `Unsaved work was left behind ${when}: ${title}.`,
    answers: [
      { key: "t", words: "take it up again", action: { type: "recover", id } },
      { key: "d", words: "drop it for good", action: { type: "discard", id } },
      { key: "l", words: "leave it for later", action: { type: "nothing" } },
    ],
  };
  return step({ ...state, dialog: question });
}
