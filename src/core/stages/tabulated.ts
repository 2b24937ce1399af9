import { dual, exponential } from "../dual.ts";
import type { IrrationalTransfer } from "../elements/element.ts";
import { DB_PER_NEPER } from "../units/decibel.ts";
import type { TabulatedResponse } from "./kind.ts";

const RADIANS = Math.PI / 180;
const NO_VALUE = dual(Number.NaN, Number.NaN, Number.NaN, Number.NaN);

/**
 * Gain in dB and unwrapped phase, each linear in log f between the rows; NaN outside them.
 * `d ln H/d ln ω` follows from the two slopes of the piece that the frequency lies in.
 */
export function tableTransfer(table: TabulatedResponse): Omit<IrrationalTransfer, "type"> {
  const { freqHz, gainDb, phaseDeg } = table;
  return {
    at: (omega) => {
      const freq = omega / (2 * Math.PI);
      const piece = pieceOf(freqHz, freq);
      if (piece === undefined) return NO_VALUE;
      const width = Math.log(freqHz[piece + 1] / freqHz[piece]);
      const part = Math.log(freq / freqHz[piece]) / width;
      const gainStep = gainDb[piece + 1] - gainDb[piece];
      const phaseStep = phaseDeg[piece + 1] - phaseDeg[piece];
      return exponential(
        (gainDb[piece] + part * gainStep) / DB_PER_NEPER,
        (phaseDeg[piece] + part * phaseStep) * RADIANS,
        gainStep / DB_PER_NEPER / width,
        (phaseStep * RADIANS) / width,
      );
    },
    delayS: 0,
    marks: (fromHz, toHz) => Array.from(freqHz).filter((freq) => freq >= fromHz && freq <= toHz),
  };
}

/** Index of the row at or below `freq`, by halving; undefined outside. A hair of rounding at both ends is let in. */
function pieceOf(freqHz: Float64Array, freq: number): number | undefined {
  const last = freqHz.length - 1;
  if (!(freq >= freqHz[0] * (1 - HAIR) && freq <= freqHz[last] * (1 + HAIR))) return undefined;
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (freqHz[middle] <= freq) low = middle;
    else high = middle;
  }
  return low;
}

const HAIR = 4 * Number.EPSILON;
