import type { TabulatedResponse } from "../../core/stages/kind.ts";
import { wrapDeg } from "../../core/units/decibel.ts";
import type { MeasuredSweep } from "./sweep.ts";

/** A measured sweep as a `table` stage: phase unwrapped from row to row, 0° throughout where none was measured. */
export function tabulated({ freqHz, gainDb, phaseDeg }: MeasuredSweep): TabulatedResponse {
  const phase = phaseDeg ? unwrapped(phaseDeg) : new Float64Array(freqHz.length);
  return { type: "table", freqHz, gainDb, phaseDeg: phase };
}

/** Whole turns added so that no step is larger than half a turn; the first angle stays. */
export function unwrapped(anglesDeg: Float64Array): Float64Array {
  const result = Float64Array.from(anglesDeg);
  let turnsDeg = 0;
  for (let index = 1; index < result.length; index += 1) {
    const step = anglesDeg[index] - anglesDeg[index - 1];
    // Whole turns, not sums of steps: what was unwrapped already stays the same to the last bit.
    if (Math.abs(step) > 180) turnsDeg += 360 * Math.round((wrapDeg(step) - step) / 360);
    result[index] = anglesDeg[index] + turnsDeg;
  }
  return result;
}
