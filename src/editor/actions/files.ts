import type { AfterSave, QuestionDialog } from "../dialog.ts";
import { chainFileName, withEnding } from "../file-name.ts";
import { type Command, type Step, step, told } from "../message.ts";
import { type EditorState, type FileOrigin, isUnsaved } from "../state.ts";
import { ask } from "./ask.ts";

const saveCommand = (
  state: EditorState,
  path: string,
  overwrite: boolean,
  after: AfterSave | undefined,
): Command => ({ type: "save", path, document: state.document, original: state.file, overwrite, after });

/** Saves to the chain's own file, or asks for a name where it has none. */
export function save(state: EditorState, after?: AfterSave): Step {
  if (state.file === undefined) return askForName(state, after);
  return step(state, saveCommand(state, state.file.path, false, after));
}

export const askForName = (state: EditorState, after?: AfterSave): Step =>
  ask(state, { type: "save-as", after }, "save as", state.file?.path ?? chainFileName(state.resolved.title));

export const saveUnder = (state: EditorState, path: string, after: AfterSave | undefined): Step =>
  step(state, saveCommand(state, withEnding(path), false, after));

export const overwrite = (state: EditorState, path: string, after: AfterSave | undefined): Step =>
  step(state, saveCommand(state, path, true, after));

/** The chain is on the disk: it counts as saved as it was written, whatever was edited since. */
export function wasSaved(state: EditorState, file: FileOrigin, after: AfterSave | undefined): Step {
  const saved = { ...state, file, saved: file.document };
  if (after !== undefined) return goOn(saved, after);
  return told(saved, `saved to ${file.path}`);
}

/** The file on the disk is not the one that was read: nothing was written, and it is asked what to do. */
export function saveWasHeld(
  state: EditorState,
  path: string,
  words: string,
  after: AfterSave | undefined,
): Step {
  const question: QuestionDialog = {
    type: "question",
    text: `${path}: ${words}. Nothing was written.`,
    answers: [
      { key: "o", words: "overwrite it", action: { type: "overwrite", path, after } },
      { key: "n", words: "save under another name", action: { type: "another-name", after } },
      { key: "c", words: "carry on editing", action: { type: "nothing" } },
    ],
  };
  return step({ ...state, dialog: question });
}

/** Does what puts the chain away, after a question where work is unsaved. */
export function putAway(state: EditorState, after: AfterSave): Step {
  if (!isUnsaved(state)) return goOn(state, after);
  const question: QuestionDialog = {
    type: "question",
    text: `"${state.resolved.title || "untitled chain"}" has unsaved work.`,
    answers: [
      { key: "s", words: "save it first", action: { type: "save-then", after } },
      { key: "d", words: "drop it", action: { type: "drop-then", after } },
      { key: "c", words: "carry on editing", action: { type: "nothing" } },
    ],
  };
  return step({ ...state, dialog: question });
}

export function goOn(state: EditorState, after: AfterSave): Step {
  switch (after.type) {
    case "quit":
      return step(state, { type: "quit" });
    case "open":
      return step(state, { type: "open", name: after.name });
    case "take-preset":
      return step(state, { type: "take-preset", name: after.name });
  }
}

export const openNamed = (state: EditorState, name: string): Step => putAway(state, { type: "open", name });

export const askToOpen = (state: EditorState): Step => ask(state, { type: "open" }, "open file or preset");

export const quit = (state: EditorState): Step => putAway(state, { type: "quit" });
