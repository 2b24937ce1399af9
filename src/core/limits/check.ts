import type { Chain } from "../chain.ts";
import { readAt } from "../response/exact.ts";
import { decadesBetween, logSpaced, type Sweep } from "../response/grid.ts";
import { marksOf } from "../response/marks.ts";
import { unwrappedAt } from "../response/phase.ts";
import { Sampler } from "../response/sampled.ts";
import { wrapDeg } from "../units/decibel.ts";
import { type Limit, marginOf, type Verdict } from "./limit.ts";
import { leastOf, type Sample } from "./search.ts";

const SEARCH_PER_DECADE = 40;

/**
 * The worst point of a limit and the margin there, found on the exact response: a notch or peak of any narrowness is
 * bracketed by its root's own marks (see `response/marks.ts`) and refined by Brent's method. Phase is counted from the
 * wrapped phase at the start of the sweep.
 *
 * Where the chain has no value in all of the limit's range it does not pass, and worst value and margin are NaN.
 */
export function checkLimit(chain: Chain, limit: Limit, sweep: Sweep): Verdict {
  const { at, samples } = measured(chain, limit, sweep);
  const margins = samples.map(({ freqHz, value }) => ({ freqHz, value: marginOf(limit, value) }));
  const worst = leastOf(margins, (freqHz, near) => marginOf(limit, at(freqHz, near)));
  if (worst === undefined) {
    return { pass: false, worstFreqHz: limit.fromHz, worstValue: Number.NaN, margin: Number.NaN };
  }
  const near = samples.findLastIndex(({ freqHz }) => freqHz <= worst.freqHz);
  return {
    pass: worst.value >= -roundingOf(limit),
    worstFreqHz: worst.freqHz,
    worstValue: at(worst.freqHz, near),
    margin: worst.value,
  };
}

/** A bound that is met exactly is met: a design lies right on its pass edge. In dB and degrees, or of the bound in s. */
const ROUNDING = 1e-9;

const roundingOf = ({ quantity, atLeast = 0, atMost = 0 }: Limit): number =>
  quantity === "delay" ? ROUNDING * Math.max(Math.abs(atLeast), Math.abs(atMost)) : ROUNDING;

interface Measured {
  /** The limit's quantity at a frequency between the samples beside the one numbered `near`. */
  readonly at: (freqHz: number, near: number) => number;
  readonly samples: readonly Sample[];
}

function measured(chain: Chain, limit: Limit, sweep: Sweep): Measured {
  const freqsHz = searchGrid(chain, limit.fromHz, limit.toHz);
  if (limit.quantity === "phase") return measuredPhase(chain, freqsHz, sweep);
  if (limit.quantity === "gain") return measuredGain(chain, freqsHz, limit.reHz);
  const at = (freqHz: number) => readAt(chain, freqHz).groupDelayS;
  return { at, samples: freqsHz.map((freqHz) => ({ freqHz, value: at(freqHz) })) };
}

/** The search goes over the array loops, which are quicker by far; what is refined is the exact response. */
function measuredGain(chain: Chain, freqsHz: readonly number[], reHz: number | undefined): Measured {
  const zeroDb = reHz === undefined ? 0 : readAt(chain, reHz).gainDb;
  const { gainDb } = new Sampler(Float64Array.from(freqsHz)).response(chain);
  return {
    at: (freqHz) => readAt(chain, freqHz).gainDb - zeroDb,
    samples: freqsHz.map((freqHz, k) => ({ freqHz, value: gainDb[k] - zeroDb })),
  };
}

function measuredPhase(chain: Chain, freqsHz: readonly number[], sweep: Sweep): Measured {
  const phases = unwrappedAt(chain, sweep, freqsHz);
  const samples = freqsHz.map((freqHz, k) => ({ freqHz, value: phases[k] }));
  return {
    samples,
    at: (freqHz, near) => {
      const { value } = samples[near];
      return value + wrapDeg(readAt(chain, freqHz).phaseDeg - value);
    },
  };
}

/** Equal logarithmic steps and the chain's marks, both ends included; no frequency twice. */
function searchGrid(chain: Chain, fromHz: number, toHz: number): readonly number[] {
  const count = Math.max(5, Math.ceil(decadesBetween(fromHz, toHz) * SEARCH_PER_DECADE) + 1);
  const all = [...logSpaced(fromHz, toHz, count), ...marksOf(chain, fromHz, toHz)].sort((a, b) => a - b);
  return all.filter((freqHz, k) => freqHz !== all[k - 1]);
}
