import type { FilterSpec } from "../../filters/transform.ts";
import { nearestInSeries, valuesInSeries } from "../../units/e-series.ts";
import type { PartsBin, RealisedStage } from "./types.ts";

/** Gain at 0 Hz of the ideal filter: even orders of Chebyshev begin at the bottom of their ripple. */
export const levelOf = ({ family, order, rippleDb = 0 }: FilterSpec): number =>
  family === "chebyshev" && order % 2 === 0 ? 10 ** (-rippleDb / 20) : 1;

/** A divider of series resistors with a follower behind it, for a level below one, and by how much it misses in dB. */
export function levelStages(
  level: number,
  { resistors, resistanceOhm, gbwHz }: PartsBin,
): { readonly stages: readonly RealisedStage[]; readonly errorDb: number } {
  if (level === 1) return { stages: [], errorDb: 0 };
  let best = { R1: 0, R2: 0, errorDb: Infinity };
  for (const R2 of valuesInSeries(resistors, resistanceOhm, 10 * resistanceOhm)) {
    const R1 = nearestInSeries(R2 * (1 / level - 1), resistors);
    if (R1 === undefined) continue;
    const errorDb = 20 * Math.log10(R2 / (R1 + R2) / level);
    if (Math.abs(errorDb) < Math.abs(best.errorDb)) best = { R1, R2, errorDb };
  }
  const { R1, R2, errorDb } = best;
  const follower = gbwHz === undefined ? { gain: 1 } : { gain: 1, bandwidth: gbwHz };
  return {
    stages: [
      { kind: "divider", name: "level", values: { R1, R2 } },
      { kind: "amplifier", name: "level follower", values: follower },
    ],
    errorDb,
  };
}
