import type { Chain } from "../chain.ts";
import { crossings, extremes, gainPoints, greatestGain } from "./features.ts";
import { phaseCrossings } from "./phase-crossings.ts";

/** A frequency of note of the exact response. */
export interface Landmark {
  readonly freqHz: number;
  readonly what: "half power" | "peak" | "dip" | "null" | "unity gain" | "±180°";
}

/** Half the power: 10·log10(1/2) dB. */
export const HALF_POWER_DB = 10 * Math.log10(1 / 2);

/** Half-power points (against the greatest gain), extremes, nulls, unity gain and ±180° between two frequencies, ascending. */
export function landmarks(chain: Chain, fromHz: number, toHz: number): readonly Landmark[] {
  const points = gainPoints(chain, fromHz, toHz);
  const top = greatestGain(chain, points)?.gainDb;
  const halfPower =
    top === undefined || !Number.isFinite(top) ? [] : crossings(chain, points, top + HALF_POWER_DB);
  const all: readonly Landmark[] = [
    ...halfPower.map((freqHz) => ({ freqHz, what: "half power" as const })),
    ...extremes(chain, points).map(({ freqHz, what }) => ({ freqHz, what })),
    ...crossings(chain, points, 0).map((freqHz) => ({ freqHz, what: "unity gain" as const })),
    ...phaseCrossings(chain, fromHz, toHz, 180).map((freqHz) => ({ freqHz, what: "±180°" as const })),
  ];
  return [...all].sort((one, other) => one.freqHz - other.freqHz);
}
