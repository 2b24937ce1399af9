import { type Step, step } from "../message.ts";
import type { EditorState, Window } from "../state.ts";

/** No closer than this: columns are told apart well above the rounding of frequencies. */
const LEAST_RATIO = 1 + 1e-6;
/** Nor wider: far beyond any part's range. */
const GREATEST_RATIO = 1e18;
const LEAST_HZ = 1e-12;
const GREATEST_HZ = 1e15;

const ZOOM = 2;

/** Half or double the span, the cursor staying where it is on the screen. */
export function zoom(state: EditorState, direction: "in" | "out"): Step {
  const { fromHz, toHz } = state.window;
  const factor = direction === "in" ? 1 / ZOOM : ZOOM;
  const stretched = (freqHz: number) => state.cursorHz * (freqHz / state.cursorHz) ** factor;
  const window = { fromHz: stretched(fromHz), toHz: stretched(toHz) };
  if (!isFit(window))
    return step({ ...state, notice: { text: `the charts go no further ${direction}`, bad: true } });
  return step({ ...state, window, notice: undefined });
}

const PAN_PART = 0.25;

/** A quarter of the span to one side; the cursor is taken along where it would be left behind. */
export function pan(state: EditorState, direction: 1 | -1): Step {
  const { fromHz, toHz } = state.window;
  const ratio = (toHz / fromHz) ** (PAN_PART * direction);
  const window = { fromHz: fromHz * ratio, toHz: toHz * ratio };
  if (!isFit(window)) return step({ ...state, notice: { text: "the charts go no further", bad: true } });
  const cursorHz = Math.min(window.toHz, Math.max(window.fromHz, state.cursorHz));
  return step({ ...state, window, cursorHz, notice: undefined });
}

const isFit = ({ fromHz, toHz }: Window): boolean =>
  fromHz >= LEAST_HZ && toHz <= GREATEST_HZ && toHz / fromHz > LEAST_RATIO && toHz / fromHz < GREATEST_RATIO;

/** The chain's own sweep again, the cursor brought back into it. */
export function wholeSweep(state: EditorState): Step {
  const { fromHz, toHz } = state.resolved.sweep;
  const cursorHz = Math.min(toHz, Math.max(fromHz, state.cursorHz));
  return step({ ...state, window: { fromHz, toHz }, cursorHz, notice: undefined });
}
