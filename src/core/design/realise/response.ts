import { makeChain } from "../../chain.ts";
import { rational } from "../../rational.ts";
import { Sampler } from "../../response/sampled.ts";
import { buildStage } from "../../stages/build.ts";
import type { RealisedStage, SectionTarget } from "./types.ts";

/** Gain in dB of stages behind an ideal source, over frequencies in Hz. */
export class GainOf {
  readonly #sampler: Sampler;

  constructor(freqsHz: Float64Array) {
    this.#sampler = new Sampler(freqsHz);
  }

  stages(stages: readonly RealisedStage[]): Float64Array {
    const chain = makeChain({
      source: rational([0]),
      stages: stages.map(({ kind, name, values }) => buildStage(kind, values, name)),
    });
    return this.#sampler.response(chain).gainDb;
  }
}

/** Gain in dB of an ideal section, one at 0 Hz: `1/(1 + x/Q·j − x²)`, or `1/(1 + j·x)`. */
export function idealGainDb({ f0Hz, q }: SectionTarget, freqHz: number): number {
  const x = freqHz / f0Hz;
  if (q === undefined) return -10 * Math.log10(1 + x * x);
  return -10 * Math.log10((1 - x * x) ** 2 + (x / q) ** 2);
}
