import { stageKind } from "../../core/stages/index.ts";
import type { DocumentProblem } from "../../document/problem.ts";
import type { ChainDocument, RawValue } from "../../document/types.ts";
import { changed, lacksFormulas, remembered, replaced, resolvedIn, wordsAt } from "../apply.ts";
import type { FieldDialog } from "../dialog.ts";
import { setAt } from "../document-edit.ts";
import type { KeyPress } from "../key-press.ts";
import { type Message, type Step, step, told } from "../message.ts";
import { nudged } from "../nudge.ts";
import type { Field } from "../rows.ts";
import type { EditorState } from "../state.ts";
import { textField, typeInto } from "../text-field.ts";
import { fieldInHand, fieldsInHand, rowInHand } from "./rows.ts";
import { nameOf } from "./stages.ts";

/** Begins to edit the value in hand; with `first` typed over, without as it stands. A choice goes on to its next. */
export function editField(state: EditorState, first?: string): Step {
  const field = fieldInHand(state);
  if (field === undefined) return told(state, "there is nothing to edit here", true);
  if (field.type === "choice") return nudge(state, "up");
  const dialog: FieldDialog = {
    type: "field",
    field,
    input: textField(first ?? String(field.raw ?? "")),
    problem: undefined,
    before: state.document,
    isTolerance: false,
  };
  const begun = { ...state, dialog, notice: undefined };
  return first === undefined ? step(begun) : typed(begun, dialog, { type: "key", key: NO_KEY });
}

const NO_KEY: KeyPress = { name: "", text: "", ctrl: false, alt: false, shift: false };

export function editTolerance(state: EditorState): Step {
  const field = fieldInHand(state);
  if (field?.tolerance === undefined) return told(state, "this value has no tolerance", true);
  const tolerance: Field = {
    label: `tolerance of ${field.label}`,
    what: "tolerance, as in 5%; empty for none",
    path: field.tolerance.path,
    type: "text",
    raw: field.tolerance.raw,
    optional: true,
  };
  const dialog: FieldDialog = {
    type: "field",
    field: tolerance,
    input: textField(String(tolerance.raw ?? "")),
    problem: undefined,
    before: state.document,
    isTolerance: true,
  };
  return step({ ...state, dialog, notice: undefined });
}

/** A key while a value is being edited. */
export function fieldKey(state: EditorState, dialog: FieldDialog, message: Message & { type: "key" }): Step {
  switch (message.key.name) {
    case "enter":
      return accept(state, dialog);
    case "escape":
      return leave(state, dialog);
    case "tab":
    case "backtab":
    case "up":
    case "down":
      return onwards(accept(state, dialog), message.key.name);
    default:
      return typed(state, dialog, message);
  }
}

/** Accepts what was typed and goes on to the next value; what is not accepted stays open. */
function onwards(after: Step, key: string): Step {
  const { state } = after;
  if (state.dialog !== undefined) return after;
  const direction = key === "tab" || key === "down" ? 1 : -1;
  const count = Math.max(1, fieldsCount(state));
  return {
    ...after,
    state: { ...state, field: (Math.min(state.field, count - 1) + direction + count) % count },
  };
}

const fieldsCount = (state: EditorState): number => fieldsInHand(state).length;

/** Takes a key into the text and, wherever it is a value, the value into the chain at once. */
function typed(state: EditorState, dialog: FieldDialog, message: Message & { type: "key" }): Step {
  const input = message.key === NO_KEY ? dialog.input : typeInto(dialog.input, message.key);
  if (input === undefined) return step(state);
  const document = withValue(dialog, input.text);
  if (lacksFormulas(state, document)) return step(state, { type: "load-formula", again: message });
  const after = replaced(state, document);
  if (after.ok) return step({ ...after.value, dialog: { ...dialog, input, problem: undefined } });
  return step({ ...state, dialog: { ...dialog, input, problem: wordsAt(after.problem, dialog.field.path) } });
}

/** The document before the edit with the text in the place of the value. */
function withValue({ field, before }: FieldDialog, text: string): ChainDocument {
  const value = rawOf(text.trim(), field);
  return value === field.raw ? before : setAt(before, field.path, value);
}

/** As it was written: a bare number stays one where it was one. Empty is left out. */
function rawOf(text: string, field: Field): RawValue | undefined {
  if (text === "") return field.optional ? undefined : "";
  if (text === String(field.raw)) return field.raw;
  const isNumber = typeof field.raw === "number" || (field.whole === true && field.raw === undefined);
  return isNumber && String(Number(text)) === text ? Number(text) : text;
}

function accept(state: EditorState, dialog: FieldDialog): Step {
  if (dialog.problem !== undefined) return step(state);
  if (state.document === dialog.before) return step({ ...state, dialog: undefined });
  return step({ ...remembered(state, stepName(state, dialog.field), dialog.before), dialog: undefined });
}

/** Gives the edit up: the chain is as it was before. */
export function leave(state: EditorState, dialog: FieldDialog): Step {
  const before = replaced({ ...state, dialog: undefined }, dialog.before);
  return step(before.ok ? before.value : { ...state, dialog: undefined });
}

/** `R of RFI filter`, `EMF of source`. */
function stepName(state: EditorState, field: Field): string {
  const row = rowInHand(state);
  if (row.type === "chain") return field.label;
  if (row.type === "stage") return `${field.label} of ${nameOf(row.stage)}`;
  return `${field.label} of ${row.type === "limit" ? row.limit.name || "limit" : row.type}`;
}

/** One step up or down for the value in hand. */
export function nudge(state: EditorState, direction: "up" | "down"): Step {
  const field = fieldInHand(state);
  if (field === undefined) return told(state, "there is nothing to nudge here", true);
  const next = nudged(field, state.nudge, direction);
  if (next === undefined) return told(state, `${field.label} cannot be nudged; Enter edits it`, true);
  const document = setAt(state.document, field.path, next);
  return changed(
    state,
    stepName(state, field),
    field.type === "choice" ? completed(state, document) : document,
  );
}

const MOST_MISSING = 4;

/** After a choice: parts that only the new choice asks for get a value to begin with. */
function completed(state: EditorState, document: ChainDocument): ChainDocument {
  let complete = document;
  for (let round = 0; round < MOST_MISSING; round++) {
    const resolved = resolvedIn(state, complete);
    if (resolved.ok) return complete;
    const value = valueToBeginWith(complete, resolved.problem);
    if (value === undefined) return document;
    complete = setAt(complete, resolved.problem.path, value);
  }
  return complete;
}

function valueToBeginWith(document: ChainDocument, { path }: DocumentProblem): string | undefined {
  const [section, index, list, part] = path;
  if (section !== "stages" || list !== "parts" || typeof index !== "number") return undefined;
  const stage = document.stages[index];
  if (stage === undefined || stage.parts?.[String(part)] !== undefined) return undefined;
  const spec = stageKind(stage.kind)?.parts.find(({ name }) => name === part);
  return spec?.suggested ?? spec?.initial;
}
