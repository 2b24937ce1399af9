import { useMemo } from "react";
import type { FrequencyScale } from "../chart/scale.ts";
import { TraceMaker, type Traces } from "../chart/traces.ts";
import { unwrappedAt } from "../core/response/phase.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { Layout } from "../editor/layout.ts";
import { chainOnCharts, ghostOnCharts, windowOnCharts } from "../editor/selectors.ts";
import type { EditorState } from "../editor/state.ts";

export interface ShownTraces {
  readonly chain: Traces;
  readonly ghost: Traces | undefined;
}

/** Traces are made anew only when a chain, the frequencies shown or the columns are other ones. */
export function useTraces(state: EditorState, { plotColumns }: Layout): ShownTraces {
  const chain = chainOnCharts(state);
  const ghost = ghostOnCharts(state);
  const { fromHz, toHz } = windowOnCharts(state);
  const scale = useMemo(() => ({ fromHz, toHz, columns: plotColumns }), [fromHz, toHz, plotColumns]);
  return { chain: useTracesOf(chain, scale) as Traces, ghost: useTracesOf(ghost, scale) };
}

/** Each response has a maker of its own, so that an edit of one stage evaluates that stage only. */
function useTracesOf(chain: ResolvedChain | undefined, scale: FrequencyScale): Traces | undefined {
  const maker = useMemo(() => new TraceMaker(), []);
  return useMemo(
    () => (chain === undefined ? undefined : anchored(maker, chain, scale)),
    [maker, chain, scale],
  );
}

/** Where the charts begin above the sweep the phase is still counted from the sweep's start, as in every reading. */
function anchored(maker: TraceMaker, { chain, sweep }: ResolvedChain, scale: FrequencyScale): Traces {
  const traces = maker.traces(chain, scale);
  const first = traces.phaseDeg.findIndex(Number.isFinite);
  if (scale.fromHz === sweep.fromHz || traces.phaseIsWrapped || first < 0) return traces;
  const [startDeg] = unwrappedAt(chain, sweep, [traces.freqHz[first]]);
  const turns = Math.round((startDeg - traces.phaseDeg[first]) / 360);
  if (!Number.isFinite(turns) || turns === 0) return traces;
  return { ...traces, phaseDeg: traces.phaseDeg.map((phaseDeg) => phaseDeg + 360 * turns) };
}
