import { converterEdges, gainLimitLines } from "../../chart/chain-overlays.ts";
import { drawChart, drawFrequencyAxis } from "../../chart/chart.ts";
import { glyphsOf } from "../../chart/glyphs.ts";
import { plotColumns } from "../../chart/scale.ts";
import type { Span } from "../../chart/spans.ts";
import { TraceMaker } from "../../chart/traces.ts";
import type { Charset } from "../../core/units/format.ts";
import type { ResolvedChain } from "../../document/resolve.ts";

const GAIN_ROWS = 13;
const PHASE_ROWS = 9;

/** Gain and phase, one above the other over one logarithmic frequency axis. */
export function chartLines(resolved: ResolvedChain, columns: number, charset: Charset): readonly string[] {
  const { chain, sweep } = resolved;
  const scale = { fromHz: sweep.fromHz, toHz: sweep.toHz, columns: plotColumns(columns) };
  const { gainDb, phaseDeg, phaseIsWrapped } = new TraceMaker().traces(chain, scale);
  const shared = { columns, scale, charset };
  const edges = converterEdges(resolved);
  const limits = gainLimitLines(resolved);
  const gain = drawChart({
    ...shared,
    quantity: "gain",
    rows: GAIN_ROWS,
    values: gainDb,
    overlays: { edges, limits },
  });
  const phase = drawChart({
    ...shared,
    quantity: "phase",
    rows: PHASE_ROWS,
    values: phaseDeg,
    overlays: { edges },
  });
  return [
    `gain${legend(resolved, charset)}`,
    ...gain.map(textOf),
    `phase${phaseIsWrapped ? ", -180 to 180 degrees" : ""}`,
    ...phase.map(textOf),
    ...drawFrequencyAxis(shared).map(textOf),
  ];
}

const textOf = (spans: readonly Span[]): string => spans.map(({ text }) => text).join("");

/** What is laid over the gain, by its sign. */
function legend({ converter, limits }: ResolvedChain, charset: Charset): string {
  const glyphs = glyphsOf(charset);
  const onGain = limits.filter(({ quantity }) => quantity === "gain");
  const entries = [
    ...(converter === undefined ? [] : [`${glyphs.fold} half the sample rate`]),
    ...(converter?.bandHz === undefined ? [] : [`${glyphs.bandEdge} band edge`]),
    ...(onGain.some(({ atMost }) => atMost !== undefined) ? [`${glyphs.atMost} at most`] : []),
    ...(onGain.some(({ atLeast }) => atLeast !== undefined) ? [`${glyphs.atLeast} at least`] : []),
  ];
  return entries.length === 0 ? "" : `  (${entries.join(", ")})`;
}
