import { readAt } from "../../core/response/exact.ts";
import { crossings, gainPoints } from "../../core/response/features.ts";
import { landmarks } from "../../core/response/landmarks.ts";
import { formatQuantity } from "../../core/units/format.ts";
import { parseQuantity } from "../../core/units/quantity.ts";
import type { ListItem } from "../dialog.ts";
import { type Step, step, told } from "../message.ts";
import { type EditorState, shownChain, verdictsNow } from "../state.ts";
import { cursorAt } from "./cursor.ts";

interface Place {
  readonly freqHz: number;
  readonly what: string;
}

/** Everything of note within the frequencies shown, ascending, found on the exact response. */
export function placesOf(state: EditorState): readonly Place[] {
  const { fromHz, toHz } = state.window;
  const { chain, converter } = shownChain(state);
  const edges: readonly Place[] =
    converter === undefined
      ? []
      : [
          ...(converter.bandHz === undefined ? [] : [{ freqHz: converter.bandHz, what: "band edge" }]),
          { freqHz: converter.rateHz / 2, what: "half the sample rate" },
        ];
  return [
    ...worstPoints(state),
    ...landmarks(chain, fromHz, toHz),
    ...edges.filter(({ freqHz }) => freqHz >= fromHz && freqHz <= toHz),
  ].sort((one, other) => one.freqHz - other.freqHz);
}

/** Where limits and folding are kept worst, once that is known. */
function worstPoints(state: EditorState): readonly Place[] {
  const verdicts = verdictsNow(state);
  const { fromHz, toHz } = state.window;
  const limits = (verdicts?.limits ?? []).map(({ worstFreqHz }, k) => ({
    freqHz: worstFreqHz,
    what: `worst of ${state.resolved.limits[k]?.name}`,
  }));
  const folding =
    verdicts?.folding === undefined
      ? []
      : [{ freqHz: verdicts.folding.worstFreqHz, what: "worst of what folds" }];
  return [...limits, ...folding].filter(({ freqHz }) => freqHz >= fromHz && freqHz <= toHz);
}

/** The next place of note above or below the cursor. */
export function toNextPlace(state: EditorState, direction: 1 | -1): Step {
  const places = placesOf(state);
  const next =
    direction > 0
      ? places.find(({ freqHz }) => isAbove(freqHz, state.cursorHz))
      : places.findLast(({ freqHz }) => isAbove(state.cursorHz, freqHz));
  if (next === undefined)
    return told(state, `nothing of note ${direction > 0 ? "above" : "below"} the cursor`, true);
  return told(cursorAt(state, next.freqHz), next.what);
}

/** Two places that are the same but for rounding do not hold the cursor up. */
const isAbove = (freqHz: number, thanHz: number): boolean => freqHz > thanHz * (1 + 1e-12);

/** The places of note as a list to choose from. */
export function listPlaces(state: EditorState): Step {
  const { chain } = shownChain(state);
  const items = placesOf(state).map(
    ({ freqHz, what }, k): ListItem => ({
      value: String(k),
      label: what,
      detail: `${formatQuantity(freqHz, "hertz", 5)}  ${formatQuantity(readAt(chain, freqHz).gainDb, "level", 4)}`,
      group: "",
      freqHz,
    }),
  );
  if (items.length === 0) return told(state, "nothing of note within the frequencies shown", true);
  const dialog = {
    type: "list",
    purpose: "go-to",
    title: "go to",
    items,
    index: 0,
    filter: { text: "", caret: 0 },
    look: undefined,
  } as const;
  return step({ ...state, dialog, notice: undefined });
}

/** To a frequency as typed; what is wrong with it otherwise. */
export function toTypedFrequency(state: EditorState, text: string): Step | string {
  const value = parseQuantity(text, "hertz");
  if (!value.ok) return `${value.problem.found}; allowed is ${value.problem.allowed}`;
  if (value.value < 1e-12 || value.value > 1e15)
    return `${text} is out of range; allowed is 1e-12 to 1e15 Hz`;
  return step(cursorAt(state, value.value));
}

/** To the next crossing of a typed level above the cursor, else the first one from below. */
export function toTypedLevel(state: EditorState, text: string): Step | string {
  const value = parseQuantity(text, "level");
  if (!value.ok) return `${value.problem.found}; allowed is ${value.problem.allowed}`;
  const { fromHz, toHz } = state.window;
  const { chain } = shownChain(state);
  const found = crossings(chain, gainPoints(chain, fromHz, toHz), value.value);
  const next = found.find((freqHz) => isAbove(freqHz, state.cursorHz)) ?? found[0];
  if (next === undefined)
    return `the gain never passes ${formatQuantity(value.value, "level")} within the frequencies shown`;
  const place = found.indexOf(next) + 1;
  return told(
    cursorAt(state, next),
    `crossing ${place} of ${found.length} of ${formatQuantity(value.value, "level")}`,
  );
}
