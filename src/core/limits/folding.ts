import type { Chain } from "../chain.ts";
import { readAt } from "../response/exact.ts";
import { gainPoints, greatestGain } from "../response/features.ts";
import { logSpaced } from "../response/grid.ts";
import { marksOf } from "../response/marks.ts";
import { Sampler } from "../response/sampled.ts";
import { leastOf } from "./search.ts";

export interface Sampling {
  readonly rateHz: number;
  /** Highest frequency of interest. */
  readonly bandHz: number;
  /** Wanted below the gain at the reference, in dB. */
  readonly neededDb: number;
  /** What images are counted against; without it the greatest gain within the band. */
  readonly referenceHz?: number;
}

/** The worst of what folds into the band. */
export interface Folding {
  readonly pass: boolean;
  /** Before folding. */
  readonly worstFreqHz: number;
  /** Below the gain at the reference; Infinity where nothing comes through, NaN where the chain has no value there. */
  readonly attenuationDb: number;
  readonly neededDb: number;
  readonly marginDb: number;
}

/** Signal to noise of an ideal converter with a full-scale sine, dB. Source: W. R. Bennett, Spectra of Quantized Signals (1948). */
export const idealSignalToNoiseDb = (bits: number): number => 6.02 * bits + 1.76;

/** Images are looked at up to here at least, in sample rates; beyond, a chain of parts only falls. */
const LEAST_IMAGES = 50;
const MOST_IMAGES = 2000;
const POINTS_PER_IMAGE = 9;

/**
 * The greatest gain in any image of the band, k·rate ± band for k = 1, 2, …, against the gain at the reference.
 * Source: sampling folds f to |f − rate·round(f/rate)|, Shannon, Communication in the Presence of Noise (1949).
 */
export function checkFolding(chain: Chain, sampling: Sampling, sweepToHz: number): Folding {
  const { rateHz, bandHz, neededDb } = sampling;
  const worst = worstImage(chain, rateHz, bandHz, sweepToHz);
  const attenuationDb = referenceGainDb(chain, sampling) - (worst?.gainDb ?? Number.NaN);
  const marginDb = attenuationDb - neededDb;
  return {
    // No gain at the reference is no pass: −∞ less −∞ is no number.
    pass: marginDb >= 0,
    worstFreqHz: worst?.freqHz ?? rateHz - bandHz,
    attenuationDb,
    neededDb,
    marginDb,
  };
}

function referenceGainDb(chain: Chain, { bandHz, referenceHz }: Sampling): number {
  if (referenceHz !== undefined) return readAt(chain, referenceHz).gainDb;
  return greatestGain(chain, gainPoints(chain, bandHz / DECADES_BELOW, bandHz))?.gainDb ?? Number.NaN;
}

/** How far down the band the greatest gain is looked for. */
const DECADES_BELOW = 1e4;

function worstImage(chain: Chain, rateHz: number, bandHz: number, sweepToHz: number) {
  const images = Math.min(MOST_IMAGES, Math.max(LEAST_IMAGES, Math.ceil(sweepToHz / rateHz)));
  const freqsHz = imagePoints(chain, rateHz, bandHz, images);
  const { gainDb } = new Sampler(freqsHz).response(chain);
  const samples = Array.from(freqsHz, (freqHz, k) => ({ freqHz, value: -gainDb[k] }));
  const inImage = (freqHz: number) =>
    Math.abs(freqHz - rateHz * Math.round(freqHz / rateHz)) <= bandHz * (1 + 1e-12);
  const least = leastOf(samples, (freqHz) => (inImage(freqHz) ? -readAt(chain, freqHz).gainDb : Number.NaN));
  return least === undefined ? undefined : { freqHz: least.freqHz, gainDb: -least.value };
}

/** Ends, inside and marks of every image, ascending. */
function imagePoints(chain: Chain, rateHz: number, bandHz: number, images: number): Float64Array {
  const points: number[] = [];
  const marks = marksOf(chain, rateHz - bandHz, images * rateHz + bandHz);
  let next = 0;
  for (let k = 1; k <= images; k++) {
    const [low, high] = [k * rateHz - bandHz, k * rateHz + bandHz];
    const inside: number[] = [];
    for (; next < marks.length && marks[next] <= high; next++)
      if (marks[next] >= low) inside.push(marks[next]);
    points.push(...[...logSpaced(low, high, POINTS_PER_IMAGE), ...inside].sort((a, b) => a - b));
  }
  return Float64Array.from(points);
}
