import { filterStage, realisedStage } from "../../document/designed.ts";
import type { StageDocument } from "../../document/types.ts";
import { changed } from "../apply.ts";
import { type DesignForm, FORM_ROWS, requestOf, startingForm } from "../design-form.ts";
import type { DesignDialog } from "../dialog.ts";
import type { Designed, Message, Step } from "../message.ts";
import { step, told } from "../message.ts";
import { rowOfStage } from "../rows.ts";
import type { EditorState } from "../state.ts";
import { textField, typeInto } from "../text-field.ts";
import { positionToInsert } from "./stages.ts";

/** Opens the form, filled in from the converter where there is one, and asks for the designs at once. */
export function openDesign(state: EditorState): Step {
  const form = startingForm(state.resolved.converter);
  const dialog: DesignDialog = {
    type: "design",
    form,
    index: 0,
    input: textField(form.pass),
    problem: undefined,
    families: [],
    chosen: undefined,
    look: undefined,
    request: 0,
  };
  return requested({ ...state, notice: undefined }, dialog);
}

const FAMILIES = 5;
const LAST = FORM_ROWS.length + FAMILIES - 1;

export const familyIndex = ({ index }: DesignDialog): number | undefined =>
  index < FORM_ROWS.length ? undefined : index - FORM_ROWS.length;

export function designKey(
  state: EditorState,
  dialog: DesignDialog,
  { key }: Message & { type: "key" },
): Step {
  switch (key.name) {
    case "escape":
      return step({ ...state, dialog: undefined });
    case "up":
    case "backtab":
      return moved(state, dialog, -1);
    case "down":
    case "tab":
      return moved(state, dialog, 1);
    case "enter":
      return familyIndex(dialog) === undefined ? moved(state, dialog, 1) : take(state, dialog);
    default:
      return edited(state, dialog, key);
  }
}

function moved(state: EditorState, dialog: DesignDialog, by: 1 | -1): Step {
  const index = Math.max(0, Math.min(LAST, dialog.index + by));
  const row = FORM_ROWS[index];
  const input = row === undefined ? dialog.input : textField(String(dialog.form[row.name]));
  const next = { ...dialog, index, input };
  // The family in hand is the one that is made and shown.
  return familyIndex(next) === undefined ? step({ ...state, dialog: next }) : requested(state, next);
}

function edited(state: EditorState, dialog: DesignDialog, key: Parameters<typeof typeInto>[1]): Step {
  const row = FORM_ROWS[dialog.index];
  if (row === undefined) return step(state);
  if (row.choices !== undefined) {
    const by = key.name === "left" || key.text === "-" ? -1 : 1;
    if (!["left", "right"].includes(key.name) && !["-", "+", " "].includes(key.text)) return step(state);
    const now = row.choices.indexOf(String(dialog.form[row.name]));
    const value = row.choices[(now + by + row.choices.length) % row.choices.length];
    return requested(state, { ...dialog, form: { ...dialog.form, [row.name]: value } as DesignForm });
  }
  const input = typeInto(dialog.input, key);
  if (input === undefined) return step(state);
  const next = { ...dialog, input, form: { ...dialog.form, [row.name]: input.text } };
  return input.text === dialog.input.text ? step({ ...state, dialog: next }) : requested(state, next);
}

/** Asks for the designs of the form as it is now; what is wrong with it is said instead. */
function requested(state: EditorState, dialog: DesignDialog): Step {
  const request = requestOf(dialog.form);
  if (!request.ok) {
    const { row, found, allowed } = request.problem;
    const label = FORM_ROWS.find(({ name }) => name === row)?.label ?? "";
    const problem = `${label}: ${found}; allowed is ${allowed}`;
    return step({ ...state, dialog: { ...dialog, problem } });
  }
  const next = { ...dialog, problem: undefined, request: dialog.request + 1 };
  return step(
    { ...state, dialog: next },
    { type: "design", id: next.request, request: request.value, family: familyIndex(next) ?? 0 },
  );
}

/** What was worked out; an answer to an older form is let go. */
export function designed(state: EditorState, found: Designed): Step {
  const { dialog } = state;
  if (dialog?.type !== "design" || found.id !== dialog.request) return step(state);
  const { families, chosen, look } = found;
  return step({ ...state, dialog: { ...dialog, families, chosen, look } });
}

/** Inserts the family in hand at the row in hand, as one step. */
function take(state: EditorState, dialog: DesignDialog): Step {
  const { chosen } = dialog;
  if (chosen === undefined) return step(state);
  if (!chosen.ok)
    return told({ ...state, dialog }, `${chosen.problem.found}; allowed is ${chosen.problem.allowed}`, true);
  const { spec, realisation } = chosen.value;
  const added: readonly StageDocument[] =
    realisation === undefined ? [filterStage(spec)] : realisation.stages.map(realisedStage);
  const at = positionToInsert(state);
  const stages = [...state.document.stages.slice(0, at), ...added, ...state.document.stages.slice(at)];
  const closed = { ...state, dialog: undefined };
  const after = changed(closed, `design ${spec.family} ${spec.order}`, { ...state.document, stages });
  if (after.state.document === state.document) return after;
  const words =
    realisation?.sourceOhm === undefined
      ? `designed: ${spec.family} of order ${spec.order}`
      : `designed for ${realisation.sourceOhm} ohm in front and ${realisation.loadOhm} ohm behind`;
  return told({ ...after.state, row: rowOfStage(at), field: 0 }, words);
}
