import { frequencyOfColumn } from "../../chart/scale.ts";
import { layoutOf } from "../layout.ts";
import { type Step, step } from "../message.ts";
import type { EditorState, Window } from "../state.ts";

/** Columns of the charts; where there is no room for any, those of a small screen. */
const FALLBACK_COLUMNS = 40;
export const columnsOf = ({ size }: EditorState): number => layoutOf(size)?.plotColumns ?? FALLBACK_COLUMNS;

const scaleOf = (state: EditorState) => ({ ...state.window, columns: Math.max(2, columnsOf(state)) });

/** Where the cursor stands, in columns and parts of one. */
function columnOfCursor(state: EditorState): number {
  const { fromHz, toHz, columns } = scaleOf(state);
  return ((columns - 1) * Math.log(state.cursorHz / fromHz)) / Math.log(toHz / fromHz);
}

/** A frequency that is off a column's middle goes to the next middle on its way. */
const NEAR = 1e-6;

export function byColumn(state: EditorState, direction: 1 | -1): Step {
  const column = columnOfCursor(state);
  const next = direction > 0 ? Math.floor(column + NEAR) + 1 : Math.ceil(column - NEAR) - 1;
  return step(moved(state, frequencyOfColumn(scaleOf(state), next)));
}

const FINE_STEPS_PER_COLUMN = 20;

export function byFineStep(state: EditorState, direction: 1 | -1): Step {
  const { fromHz, toHz, columns } = scaleOf(state);
  const ratio = (toHz / fromHz) ** (1 / ((columns - 1) * FINE_STEPS_PER_COLUMN));
  return step(moved(state, state.cursorHz * ratio ** direction));
}

export const byDecade = (state: EditorState, direction: 1 | -1): Step =>
  step(moved(state, state.cursorHz * 10 ** direction));

export const toEnd = (state: EditorState, end: "low" | "high"): Step =>
  step(moved(state, end === "low" ? state.window.fromHz : state.window.toHz));

/** The cursor within the sweep, or within the window where that reaches further; the window goes with it. */
function moved(state: EditorState, freqHz: number): EditorState {
  const { sweep } = state.resolved;
  const low = Math.min(sweep.fromHz, state.window.fromHz);
  const high = Math.max(sweep.toHz, state.window.toHz);
  return cursorAt(state, Math.min(high, Math.max(low, freqHz)));
}

/** The cursor at a frequency wherever it is; a window that does not hold it is moved until it does. */
export function cursorAt(state: EditorState, freqHz: number): EditorState {
  return { ...state, cursorHz: freqHz, window: following(state.window, freqHz), notice: undefined };
}

function following(window: Window, freqHz: number): Window {
  const { fromHz, toHz } = window;
  if (freqHz >= fromHz && freqHz <= toHz) return window;
  const ratio = freqHz < fromHz ? freqHz / fromHz : freqHz / toHz;
  const moved = { fromHz: fromHz * ratio, toHz: toHz * ratio };
  // Rounding must not leave the cursor outside after all.
  return freqHz < fromHz ? { ...moved, fromHz: freqHz } : { ...moved, toHz: freqHz };
}

/** Pins the cursor's frequency; a pin that stands there already is taken up. */
export const pin = (state: EditorState): Step =>
  step({ ...state, pinHz: state.pinHz === state.cursorHz ? undefined : state.cursorHz, notice: undefined });

export function exchangePin(state: EditorState): Step {
  if (state.pinHz === undefined)
    return step({ ...state, notice: { text: "there is no pin; p sets one", bad: true } });
  return step({ ...cursorAt(state, state.pinHz), pinHz: state.cursorHz });
}
