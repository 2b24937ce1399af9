import { STAGE_KINDS, stageKind } from "../../core/stages/index.ts";
import type { LimitQuantity } from "../../document/types.ts";
import { lacksFormulas, resolvedIn } from "../apply.ts";
import { fittingItems, itemInHand, type ListDialog, type ListItem } from "../dialog.ts";
import { type Message, type Step, step, told } from "../message.ts";
import { NUDGE_STEPS, nudgeWords } from "../nudge.ts";
import { type EditorState, OVERLAY_NAMES, type OverlayName } from "../state.ts";
import { typeInto } from "../text-field.ts";
import { ask } from "./ask.ts";
import { cursorAt } from "./cursor.ts";
import { askToRemovePreset, askToRenamePreset, takePreset } from "./presets.ts";
import { addKind, addLimit, chainOfOne, initialStage } from "./stages.ts";

const listOf = (
  purpose: ListDialog["purpose"],
  title: string,
  items: readonly ListItem[],
  index = 0,
): ListDialog => ({
  type: "list",
  purpose,
  title,
  items,
  index,
  filter: { text: "", caret: 0 },
  look: undefined,
});

const LIMITS: readonly ListItem[] = (["gain", "phase", "delay"] as const).map((quantity) => ({
  value: `limit ${quantity}`,
  label: `limit on ${quantity}`,
  detail: `bound on ${quantity === "delay" ? "group delay" : quantity} over a range of frequencies`,
  group: "limits",
}));

/** The chooser: every kind of stage by group, and limits. */
export function chooseWhatToAdd(state: EditorState): Step {
  const kinds = STAGE_KINDS.map(
    ({ kind, group, summary }): ListItem => ({
      value: kind,
      label: kind,
      detail: summary,
      group,
    }),
  );
  return withLook({ ...state, notice: undefined }, listOf("add", "add", [...kinds, ...LIMITS]));
}

export function chooseNudge(state: EditorState): Step {
  const items = NUDGE_STEPS.map(
    ({ words, step: { type } }): ListItem => ({
      value: words,
      label: words,
      detail: type === "series" ? "preferred numbers of IEC 60063" : "of the value",
      group: "",
    }),
  );
  const now = items.findIndex(({ value }) => value === nudgeWords(state.nudge));
  return step({ ...state, dialog: listOf("nudge", "one press of + or -", items, now), notice: undefined });
}

export const chooseOverlays = (state: EditorState): Step =>
  step({ ...state, dialog: overlayList(state, 0), notice: undefined });

const overlayList = ({ overlays }: EditorState, index: number): ListDialog =>
  listOf(
    "overlays",
    "laid over the charts",
    OVERLAY_NAMES.map((name) => ({
      value: name,
      label: name,
      detail: overlays[name] ? "shown" : "not shown",
      group: "",
    })),
    index,
  );

/** A key while a list is open: arrows move, letters narrow it down. */
export function listKey(state: EditorState, list: ListDialog, message: Message & { type: "key" }): Step {
  const { key } = message;
  switch (key.name) {
    case "escape":
      return step({ ...state, dialog: undefined });
    case "up":
    case "down":
      return inHand(state, list, list.index + (key.name === "up" ? -1 : 1));
    case "pageup":
    case "pagedown":
      return inHand(state, list, list.index + (key.name === "pageup" ? -PAGE : PAGE));
    case "home":
    case "end":
      return inHand(state, list, key.name === "home" ? 0 : Number.MAX_SAFE_INTEGER);
    case "enter":
      return take(state, list);
    case "delete":
      return onPreset(state, list, askToRemovePreset);
    default:
      if (key.ctrl && key.text === "r") return onPreset(state, list, askToRenamePreset);
      return narrowed(state, list, message);
  }
}

const PAGE = 10;

function inHand(state: EditorState, list: ListDialog, index: number): Step {
  const last = fittingItems(list).length - 1;
  return withLook(state, { ...list, index: Math.max(0, Math.min(last, index)) });
}

function narrowed(state: EditorState, list: ListDialog, { key }: Message & { type: "key" }): Step {
  const filter = typeInto(list.filter, key);
  if (filter === undefined || filter.text === list.filter.text) return step(state);
  return withLook(state, { ...list, filter, index: 0 });
}

const onPreset = (
  state: EditorState,
  list: ListDialog,
  action: (state: EditorState, item: ListItem) => Step,
): Step => {
  const item = itemInHand(list);
  return list.purpose !== "presets" || item === undefined ? step(state) : action(state, item);
};

/** The list with the response of the item in hand, which a preset has to be read for. */
function withLook(state: EditorState, list: ListDialog): Step {
  const item = itemInHand(list);
  const shown = {
    ...state,
    dialog: { ...list, look: list.look?.value === item?.value ? list.look : undefined },
  };
  if (item === undefined || shown.dialog.look !== undefined) return step(shown);
  if (list.purpose === "presets") return step(shown, { type: "look-at-preset", name: item.value });
  return list.purpose === "add" ? lookAtKind(shown, shown.dialog, item.value) : step(shown);
}

/** The default response of a kind, alone behind an ideal source and into an open output. */
function lookAtKind(state: EditorState, list: ListDialog, value: string): Step {
  const kind = stageKind(value);
  if (kind === undefined) return step(state);
  const document = chainOfOne(initialStage(kind), state.document.sweep);
  // Without the reader of formulas there is nothing to look at yet, and nothing is wrong.
  if (lacksFormulas(state, document)) return step(state);
  const resolved = resolvedIn(state, document);
  const look = resolved.ok
    ? { value, resolved: resolved.value, problem: undefined }
    : { value, resolved: undefined, problem: undefined };
  return step({ ...state, dialog: { ...list, look } });
}

/** Enter on an item. */
function take(state: EditorState, list: ListDialog): Step {
  const item = itemInHand(list);
  if (item === undefined) return step(state);
  const closed = { ...state, dialog: undefined };
  switch (list.purpose) {
    case "add":
      return add(closed, item.value);
    case "presets":
      return takePreset(closed, item);
    case "go-to":
      return item.freqHz === undefined ? step(closed) : told(cursorAt(closed, item.freqHz), item.label);
    case "nudge": {
      const chosen = NUDGE_STEPS.find(({ words }) => words === item.value);
      return step(chosen === undefined ? closed : { ...closed, nudge: chosen.step });
    }
    case "overlays": {
      const name = item.value as OverlayName;
      const toggled = { ...state, overlays: { ...state.overlays, [name]: !state.overlays[name] } };
      return step({ ...toggled, dialog: overlayList(toggled, list.index) });
    }
  }
}

function add(state: EditorState, value: string): Step {
  if (value.startsWith("limit ")) return addLimit(state, value.slice("limit ".length) as LimitQuantity);
  const needsFile = stageKind(value)?.parts.find(({ type }) => type === "file");
  if (needsFile !== undefined) return ask(state, { type: "file-of", kind: value }, needsFile.what);
  return addKind(state, value, { type: "kind-chosen", kind: value });
}
