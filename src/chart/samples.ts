import type { Chain } from "../core/chain.ts";
import { readAt } from "../core/response/exact.ts";
import { type SampledResponse, Sampler } from "../core/response/sampled.ts";

/**
 * The grid's response and that at the marks in one, ascending in frequency. Marks are evaluated together: at several
 * hundred of them that is far quicker than one reading each.
 */
export function withMarks(chain: Chain, grid: SampledResponse, marks: readonly number[]): SampledResponse {
  const atMarks = new Sampler(Float64Array.from(marks)).response(chain);
  const count = grid.freqHz.length + marks.length;
  const merged = {
    freqHz: new Float64Array(count),
    gainDb: new Float64Array(count),
    phaseDeg: new Float64Array(count),
  };
  let [g, m] = [0, 0];
  for (let k = 0; k < count; k++) {
    const fromGrid = m >= marks.length || grid.freqHz[g] <= marks[m];
    const from = fromGrid ? grid : atMarks;
    const index = fromGrid ? g++ : m++;
    merged.freqHz[k] = from.freqHz[index];
    merged.gainDb[k] = from.gainDb[index];
    merged.phaseDeg[k] = from.phaseDeg[index];
  }
  return fillLimits(chain, merged);
}

/** Single values that are missing between others are a zero over a zero; the exact reading takes the limit there. */
function fillLimits(chain: Chain, response: SampledResponse): SampledResponse {
  const { freqHz, gainDb, phaseDeg } = response;
  const missing = (k: number) => k >= 0 && k < gainDb.length && Number.isNaN(gainDb[k]);
  for (let k = 0; k < gainDb.length; k++) {
    if (!missing(k) || missing(k - 1) || missing(k + 1)) continue;
    const reading = readAt(chain, freqHz[k]);
    gainDb[k] = reading.gainDb;
    phaseDeg[k] = reading.phaseDeg;
  }
  return response;
}
