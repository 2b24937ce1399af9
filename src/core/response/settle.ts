import type { Chain } from "../chain.ts";
import { readAt } from "./exact.ts";

/**
 * Reads again, exactly, where the arithmetic of plain doubles gave no finite gain: a zero over a zero, or numbers
 * beyond a double, which pass for a null or for no value. Written into the arrays.
 */
export function settle(
  chain: Chain,
  freqHz: Float64Array,
  gainDb: Float64Array,
  phaseDeg: Float64Array,
): void {
  // Outside a measured response there is no value, at many frequencies at once: nothing to be found there.
  const hasGaps = chain.stages.some(({ kind }) => kind === "table");
  for (let k = 0; k < gainDb.length; k++) {
    if (Number.isFinite(gainDb[k]) || (hasGaps && Number.isNaN(gainDb[k]))) continue;
    const reading = readAt(chain, freqHz[k]);
    gainDb[k] = reading.gainDb;
    phaseDeg[k] = reading.phaseDeg;
  }
}
