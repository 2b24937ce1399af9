import { itemInHand, type ListDialog, type ListItem, type QuestionDialog } from "../dialog.ts";
import { chainFileName } from "../file-name.ts";
import type { PresetLine } from "../message.ts";
import { type Step, step, told } from "../message.ts";
import type { EditorState } from "../state.ts";
import { ask } from "./ask.ts";
import { putAway } from "./files.ts";
import { rowInHand } from "./rows.ts";
import { nameOf } from "./stages.ts";

/** The list opens at once, so that keys typed ahead go to it, and is filled when the presets are known. */
export const browsePresets = (state: EditorState): Step =>
  step({ ...state, dialog: presetList([], NO_FILTER), notice: undefined }, { type: "list-presets" });

const NO_FILTER = { text: "", caret: 0 };

const presetList = (items: readonly ListItem[], filter: ListDialog["filter"]): ListDialog => ({
  type: "list",
  purpose: "presets",
  title: "presets",
  items,
  index: 0,
  filter,
  look: undefined,
});

const ORDER = ["shipped chains", "shipped stages", "your own chains", "your own stages"];

/** A preset's place in the list says whose it is and what it is. */
const groupOf = ({ origin, type }: PresetLine): string =>
  `${origin === "own" ? "your own" : "shipped"} ${type}s`;

/** Fills the list of presets; one that was closed meanwhile stays closed. The first item is looked at. */
export function showPresets(
  { dialog, ...rest }: EditorState,
  presets: readonly PresetLine[],
  opens: boolean,
): Step {
  const state = { ...rest, dialog };
  const isOpen = dialog?.type === "list" && dialog.purpose === "presets";
  if (!isOpen && !opens) return step(state);
  const inOrder = [...presets].sort(
    (one, other) => ORDER.indexOf(groupOf(one)) - ORDER.indexOf(groupOf(other)),
  );
  const items = inOrder.map(
    (preset): ListItem => ({
      value: preset.name,
      label: preset.name,
      detail: preset.title,
      group: groupOf(preset),
    }),
  );
  const list = presetList(items, isOpen ? dialog.filter : NO_FILTER);
  const first = itemInHand(list);
  const shown = { ...state, dialog: list };
  return first === undefined ? step(shown) : step(shown, { type: "look-at-preset", name: first.value });
}

/** Takes a preset: a stage goes in at the row in hand, a chain takes the place of the one there is. */
export function takePreset(state: EditorState, item: ListItem): Step {
  const isChain = item.group.endsWith("chains");
  return isChain
    ? putAway(state, { type: "take-preset", name: item.value })
    : step(state, { type: "take-preset", name: item.value });
}

export function askToKeepStage(state: EditorState): Step {
  const row = rowInHand(state);
  if (row.type !== "stage") return told(state, "take a stage in hand first", true);
  return ask(state, { type: "keep-stage" }, "keep this stage as preset", nameOf(row.stage));
}

export const askToKeepChain = (state: EditorState): Step =>
  ask(
    state,
    { type: "keep-chain" },
    "keep the chain as preset",
    chainFileName(state.resolved.title).replace(".chain.json", ""),
  );

const NAME_NEEDED = "a name for the preset is needed";

export function keepStageAs(state: EditorState, name: string): Step | string {
  const row = rowInHand(state);
  if (name === "") return NAME_NEEDED;
  return row.type === "stage" ? step(state, { type: "keep-stage", name, stage: row.stage }) : step(state);
}

export function keepChainAs(state: EditorState, name: string): Step | string {
  if (name === "") return NAME_NEEDED;
  return step(state, { type: "keep-chain", name, document: state.document, original: state.file });
}

export function askToRenamePreset(state: EditorState, item: ListItem): Step {
  if (!item.group.startsWith("your own")) return told(state, "a shipped preset keeps its name", true);
  return ask(
    state,
    { type: "rename-preset", name: item.value },
    `rename preset ${item.value} to`,
    item.value,
  );
}

export function renamePresetTo(state: EditorState, name: string, newName: string): Step | string {
  return newName === "" ? NAME_NEEDED : step(state, { type: "rename-preset", name, newName });
}

export function askToRemovePreset(state: EditorState, item: ListItem): Step {
  if (!item.group.startsWith("your own")) return told(state, "a shipped preset cannot be removed", true);
  const question: QuestionDialog = {
    type: "question",
    text: `Remove the preset "${item.value}"?`,
    answers: [
      { key: "r", words: "remove it", action: { type: "remove-preset", name: item.value } },
      { key: "c", words: "keep it", action: { type: "nothing" } },
    ],
  };
  return step({ ...state, dialog: question });
}
