import { type Step, step } from "../message.ts";
import { type Field, fieldsOf, type Row, rowsOf } from "../rows.ts";
import type { EditorState } from "../state.ts";

export const rowInHand = (state: EditorState): Row => rowsOf(state.document)[state.row] as Row;

export const fieldsInHand = (state: EditorState): readonly Field[] =>
  fieldsOf(state.document, rowInHand(state));

/** The value in hand; undefined for a row without any. */
export function fieldInHand(state: EditorState): Field | undefined {
  const fields = fieldsInHand(state);
  return fields[Math.min(state.field, fields.length - 1)];
}

/** The next row up or down; at either end it stays. */
export function toRow(state: EditorState, direction: 1 | -1): Step {
  const last = rowsOf(state.document).length - 1;
  const row = Math.max(0, Math.min(last, state.row + direction));
  return step({ ...state, row, field: row === state.row ? state.field : 0, notice: undefined });
}

/** The next value of the row, round and round. */
export function toField(state: EditorState, direction: 1 | -1): Step {
  const count = fieldsInHand(state).length;
  if (count === 0) return step(state);
  const now = Math.min(state.field, count - 1);
  return step({ ...state, field: (now + direction + count) % count, notice: undefined });
}
