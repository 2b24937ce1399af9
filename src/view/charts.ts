import { converterEdges, gainLimitLines } from "../chart/chain-overlays.ts";
import { drawChart, drawFrequencyAxis } from "../chart/chart.ts";
import type { Overlays, VerticalEdge } from "../chart/overlays.ts";
import { columnOfFrequency, type FrequencyScale } from "../chart/scale.ts";
import type { Span } from "../chart/spans.ts";
import { HALF_POWER_DB } from "../core/response/landmarks.ts";
import type { Charset } from "../core/units/format.ts";
import type { Layout } from "../editor/layout.ts";
import { chainOnCharts, windowOnCharts } from "../editor/selectors.ts";
import type { EditorState } from "../editor/state.ts";
import { type Line, lookOfRole } from "./paint.ts";
import type { ShownTraces } from "./use-traces.ts";

/** Gain, phase and the frequency axis, one above the other. */
export function chartLines(
  state: EditorState,
  layout: Layout,
  traces: ShownTraces,
  charset: Charset,
): readonly Line[] {
  const { columns } = layout.charts;
  const scale: FrequencyScale = { ...windowOnCharts(state), columns: layout.plotColumns };
  const marks = {
    cursorColumn: columnOfFrequency(scale, state.cursorHz),
    pinColumn: state.pinHz === undefined ? undefined : columnOfFrequency(scale, state.pinHz),
  };
  const shared = { columns, scale, charset, ...marks };
  const gain = drawChart({
    ...shared,
    quantity: "gain",
    rows: layout.gainRows,
    values: traces.chain.gainDb,
    overlays: gainOverlays(state, traces),
    axis: fixedGain(state),
  });
  const phase = drawChart({
    ...shared,
    quantity: "phase",
    rows: layout.phaseRows,
    values: traces.chain.phaseDeg,
    overlays: { ghost: traces.ghost?.phaseDeg, edges: edgesOf(state) },
    axis: undefined,
  });
  return [...gain, ...phase, ...drawFrequencyAxis(shared)].map(lineOf);
}

const lineOf = (spans: readonly Span[]): Line =>
  spans.map(({ text, role }) => ({ text, look: lookOfRole(role) }));

const fixedGain = ({ gainRange }: EditorState) =>
  gainRange === undefined ? undefined : { low: gainRange.lowDb, high: gainRange.highDb };

function gainOverlays(state: EditorState, traces: ShownTraces): Overlays {
  const { overlays } = state;
  return {
    ghost: traces.ghost?.gainDb,
    edges: edgesOf(state),
    limits: overlays.limits ? gainLimitLines(chainOnCharts(state)) : [],
    levels: overlays["half power"] ? [greatest(traces.chain.gainDb) + HALF_POWER_DB] : [],
  };
}

function edgesOf(state: EditorState): readonly VerticalEdge[] {
  const { overlays } = state;
  return converterEdges(chainOnCharts(state)).filter(({ kind }) =>
    kind === "fold" ? overlays["folding edge"] : overlays["band edge"],
  );
}

const greatest = (values: ArrayLike<number>): number =>
  Math.max(...Array.from(values).filter((value) => !Number.isNaN(value)));
