import { findZero } from "../../core/brent.ts";
import { realiseStage } from "../../core/design/realise/one-stage.ts";
import type { PartsBin } from "../../core/design/realise/types.ts";
import { readAt } from "../../core/response/exact.ts";
import { logSpaced } from "../../core/response/grid.ts";
import { Sampler } from "../../core/response/sampled.ts";
import { nearestInSeries, type SeriesName } from "../../core/units/e-series.ts";
import { formatQuantity } from "../../core/units/format.ts";
import { parseQuantity } from "../../core/units/quantity.ts";
import { shortValue } from "../../core/units/short-value.ts";
import { realisedStage } from "../../document/designed.ts";
import type { ChainDocument } from "../../document/types.ts";
import { changed, resolvedIn } from "../apply.ts";
import { setAt } from "../document-edit.ts";
import { type Step, told } from "../message.ts";
import type { Field } from "../rows.ts";
import type { EditorState } from "../state.ts";
import { fieldInHand, fieldsInHand, rowInHand } from "./rows.ts";
import { nameOf } from "./stages.ts";

/** Series that parts are snapped to and sections are made of: the one chosen for nudging, else a common one. */
const seriesOf = ({ nudge }: EditorState): SeriesName => (nudge.type === "series" ? nudge.series : "E24");

const LEVEL_OHM = 10_000;

/** The ideal stage in hand made of real parts, as one step; how far the parts are off is told. */
export function realiseInHand(state: EditorState): Step {
  const row = rowInHand(state);
  const resolved = row.type === "stage" ? state.resolved.stages[row.index] : undefined;
  if (row.type !== "stage" || resolved === undefined)
    return told(state, "take an ideal stage in hand first", true);
  const bin: PartsBin = { resistors: seriesOf(state), capacitors: "E12", resistanceOhm: LEVEL_OHM };
  const made = realiseStage(resolved.kind, resolved.values, bin);
  if (!made.ok) return told(state, `${made.problem.found}; allowed is ${made.problem.allowed}`, true);
  const stages = [...state.document.stages];
  const name = nameOf(row.stage);
  const parts = made.value.stages.map((stage) => ({
    ...realisedStage(stage),
    name: `${name}, ${stage.name}`,
  }));
  stages.splice(row.index, 1, ...parts);
  const after = changed(state, `realise ${name}`, { ...state.document, stages });
  if (after.state.document === state.document) return after;
  const words = `${name} of ${bin.resistors} resistors and ${bin.capacitors} capacitors: within ${made.value.stopErrorDb.toFixed(2)} dB of the ideal`;
  return told(after.state, words);
}

/** All resistors, capacitors and inductors of the stage in hand to their nearest members of the series. */
export function snapInHand(state: EditorState): Step {
  const row = rowInHand(state);
  if (row.type !== "stage") return told(state, "take a stage in hand first", true);
  const series = seriesOf(state);
  let document = state.document;
  for (const field of fieldsInHand(state)) {
    const snapped = snappedValue(field, series);
    if (snapped !== undefined) document = setAt(document, field.path, snapped);
  }
  if (document === state.document) return told(state, `all parts are in ${series} already`);
  const after = changed(state, `snap ${nameOf(row.stage)} to ${series}`, document);
  if (after.state.document === state.document) return after;
  return told(after.state, `${nameOf(row.stage)} snapped to ${series}: ${effectWords(state, after.state)}`);
}

function snappedValue({ type, unit, raw }: Field, series: SeriesName): string | undefined {
  if (type !== "number" || raw === undefined || (unit !== "ohm" && unit !== "farad" && unit !== "henry"))
    return undefined;
  const value = parseQuantity(raw, unit);
  const nearest = value.ok && value.value > 0 ? nearestInSeries(value.value, series) : undefined;
  if (nearest === undefined || !value.ok || Math.abs(nearest / value.value - 1) < 1e-9) return undefined;
  return shortValue(nearest, unit);
}

const COMPARED_AT = 200;

/** By how much the response moved: at the cursor, and at most over the frequencies shown. */
function effectWords(before: EditorState, after: EditorState): string {
  const { cursorHz, window } = before;
  const atCursor =
    readAt(after.resolved.chain, cursorHz).gainDb - readAt(before.resolved.chain, cursorHz).gainDb;
  const sampler = new Sampler(logSpaced(window.fromHz, window.toHz, COMPARED_AT));
  const [was, is] = [before, after].map(({ resolved }) => sampler.response(resolved.chain).gainDb);
  const most = Math.max(
    ...Array.from(is as Float64Array, (value, k) => Math.abs(value - (was as Float64Array)[k]) || 0),
  );
  return `${atCursor >= 0 ? "+" : ""}${atCursor.toFixed(3)} dB at the cursor, at most ${most.toFixed(3)} dB`;
}

/** How far from its present value a part is looked for. */
const DECADES = 3;
const SEARCH_STEPS = 120;

/** The value in hand that gives the chain a typed gain at the cursor; the nearest to the present one. */
export function solveFor(state: EditorState, text: string): Step | string {
  const field = fieldInHand(state);
  if (field?.type !== "number" || field.unit === undefined)
    return "the value in hand is no number to be solved for";
  const wanted = parseQuantity(text, "level");
  if (!wanted.ok) return `${wanted.problem.found}; allowed is ${wanted.problem.allowed}`;
  const raw = field.raw ?? field.fallback;
  const now = raw === undefined ? undefined : parseQuantity(raw, field.unit);
  if (now === undefined || !now.ok || !(now.value > 0))
    return `${field.label} has no value above zero to begin from`;
  const unit = field.unit;
  const withValue = (value: number): ChainDocument =>
    setAt(state.document, field.path, shortValue(value, unit));
  const missDb = (logValue: number): number => {
    const resolved = resolvedIn(state, withValue(Math.exp(logValue)));
    return resolved.ok ? readAt(resolved.value.chain, state.cursorHz).gainDb - wanted.value : Number.NaN;
  };
  const solved = nearestZero(missDb, Math.log(now.value));
  const frequency = formatQuantity(state.cursorHz, "hertz", 5);
  if (solved === undefined) {
    return `no ${field.label} within ${DECADES} decades gives ${formatQuantity(wanted.value, "level")} at ${frequency}`;
  }
  const value = Number(Math.exp(solved).toPrecision(6));
  const words = `${field.label} for ${formatQuantity(wanted.value, "level")} at ${frequency}`;
  return changed(state, words, withValue(value));
}

/** A zero as near to the start as there is, looked for in equal steps to both sides at once. */
function nearestZero(f: (x: number) => number, start: number): number | undefined {
  const step = (DECADES * Math.LN10) / SEARCH_STEPS;
  const here = f(start);
  if (here === 0) return start;
  let [below, above] = [here, here];
  for (let k = 1; k <= SEARCH_STEPS; k++) {
    const [nextAbove, nextBelow] = [f(start + k * step), f(start - k * step)];
    if (nextAbove * above < 0) return findZero(f, start + (k - 1) * step, start + k * step);
    if (nextBelow * below < 0) return findZero(f, start - k * step, start - (k - 1) * step);
    if (!Number.isNaN(nextAbove)) above = nextAbove;
    if (!Number.isNaN(nextBelow)) below = nextBelow;
  }
  return undefined;
}
