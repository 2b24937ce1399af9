import { findZero } from "../brent.ts";
import type { Chain } from "../chain.ts";
import { wrapDeg } from "../units/decibel.ts";
import { readAt } from "./exact.ts";
import { decadesBetween, logSpaced } from "./grid.ts";
import { marksOf } from "./marks.ts";

/** Points per decade of the search between the marks. */
const SEARCH_PER_DECADE = 40;
/** A larger step between neighbours is a jump at a null, not a crossing that could be followed. */
const LARGEST_STEP_DEG = 120;

/**
 * Frequencies in Hz, ascending, at which the phase passes `phaseDeg` give or take whole turns, on the exact response
 * to the last digits. At most `most` are looked for: a long delay turns the phase without end.
 */
export function phaseCrossings(
  chain: Chain,
  fromHz: number,
  toHz: number,
  phaseDeg: number,
  most = 200,
): readonly number[] {
  const count = Math.max(3, Math.ceil(decadesBetween(fromHz, toHz) * SEARCH_PER_DECADE) + 1);
  const grid = [...logSpaced(fromHz, toHz, count), ...marksOf(chain, fromHz, toHz)].sort((a, b) => a - b);
  const offset = (freqHz: number) => wrapDeg(readAt(chain, freqHz).phaseDeg - phaseDeg);
  const found: number[] = [];
  let before = { freqHz: grid[0], offsetDeg: offset(grid[0]) };
  for (const freqHz of grid.slice(1)) {
    const here = { freqHz, offsetDeg: offset(freqHz) };
    if (isPassed(before.offsetDeg, here.offsetDeg)) {
      const at = findZero((x) => offset(Math.exp(x)), Math.log(before.freqHz), Math.log(freqHz));
      found.push(Math.exp(at));
      if (found.length >= most) return found;
    }
    before = here;
  }
  return found;
}

/** NaN, at a null, compares false. */
const isPassed = (before: number, here: number): boolean =>
  Math.abs(here - before) < LARGEST_STEP_DEG && before !== 0 && (here === 0 || before > 0 !== here > 0);
