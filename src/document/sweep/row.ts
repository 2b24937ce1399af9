import type { Problem } from "../../core/result.ts";
import { toDb, toDegrees } from "../../core/units/decibel.ts";
import type { Layout } from "./layout.ts";

/** A double holds ratios up to ±6165 dB. */
const MAX_GAIN_DB = 6000;
/** Beyond this a double no longer resolves a fraction of a degree worth having. */
const MAX_PHASE_DEG = 1e9;

/** One row as a response; used again for every row. */
export interface Row {
  freqHz: number;
  gainDb: number;
  phaseDeg: number;
}

/** Turns the numbers of a row, in the order of `positions` and already in Hz, V and degrees, into a response. */
export function fillRow(row: Row, { gain, hasPhase, positions }: Layout, numbers: Float64Array): void {
  const [freqHz, first, second] = numbers;
  row.freqHz = freqHz;
  row.gainDb = gainOf(gain, first, second);
  if (gain === "parts") row.phaseDeg = toDegrees(Math.atan2(second, first));
  else row.phaseDeg = hasPhase ? numbers[positions.length - 1] : 0;
}

function gainOf(gain: Layout["gain"], first: number, second: number): number {
  if (gain === "gainDb") return first;
  if (gain === "ratio") return toDb(first);
  if (gain === "parts") return toDb(Math.hypot(first, second));
  // The difference of levels, since the quotient of two voltages could overflow.
  return toDb(second) - toDb(first);
}

/** Whether the row is a response: frequency above 0, gain and phase finite and within reason. */
export const isResponse = ({ freqHz, gainDb, phaseDeg }: Row): boolean =>
  freqHz > 0 && freqHz < Infinity && Math.abs(gainDb) <= MAX_GAIN_DB && Math.abs(phaseDeg) <= MAX_PHASE_DEG;

/** Why a row of numbers is no response. */
export function rowProblem({ freqHz, gainDb }: Row, gain: Layout["gain"], numbers: Float64Array): Problem {
  const [, first, second] = numbers;
  if (!(freqHz > 0)) return { found: `a frequency of ${freqHz} Hz`, allowed: "frequencies above 0" };
  if (freqHz === Infinity) return { found: "a frequency beyond 1e308 Hz", allowed: "finite frequencies" };
  if (gain === "ratio" && !(first > 0))
    return {
      found: `a ratio of ${first}`,
      allowed: "ratios above 0, or gains in dB where the header says so",
    };
  if (gain === "voltages" && !(first > 0 && second > 0))
    return { found: `voltages of ${first} V and ${second} V`, allowed: "amplitudes above 0" };
  if (gain === "parts" && first === 0 && second === 0)
    return {
      found: "real and imaginary parts both 0, which is no gain in dB",
      allowed: "responses other than 0",
    };
  if (!(Math.abs(gainDb) <= MAX_GAIN_DB))
    return { found: `a gain of ${gainDb} dB`, allowed: `gains from -${MAX_GAIN_DB} dB to ${MAX_GAIN_DB} dB` };
  return { found: "a phase beyond 1e9 degrees", allowed: "phases from -1e9 to 1e9 degrees" };
}
