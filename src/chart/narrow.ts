/**
 * What a column shows when something happens between its middle and its neighbours'.
 *
 * A slope needs no help: all its values lie between those of the columns around. What reaches beyond them is a peak
 * or a dip that the columns' middles miss, and the farthest point of it is shown instead.
 */

/** Values at ascending samples, and for each column the index of its middle among them. */
export interface ColumnSamples {
  readonly values: Float64Array;
  readonly middle: Int32Array;
  /** Index of the first sample of each column's bin; one entry more than there are columns. */
  readonly start: Int32Array;
}

/** For each column the index of the sample to show. `tolerance`: a smaller departure (dB or degrees) is let be. */
export function shownSamples({ values, middle, start }: ColumnSamples, tolerance: number): Int32Array {
  const shown = Int32Array.from(middle);
  for (let column = 0; column < middle.length; column++) {
    let [low, high] = [Infinity, -Infinity];
    for (let near = Math.max(0, column - 1); near <= Math.min(middle.length - 1, column + 1); near++) {
      const value = values[middle[near]];
      // Comparisons with NaN are false: a gap bounds nothing.
      if (value < low) low = value;
      if (value > high) high = value;
    }
    shown[column] =
      farthest(values, start[column], start[column + 1], low - tolerance, high + tolerance) ?? middle[column];
  }
  return shown;
}

/** The sample that reaches farthest below `low` or above `high`. A null is farther than anything. */
function farthest(
  values: Float64Array,
  from: number,
  to: number,
  low: number,
  high: number,
): number | undefined {
  let found: number | undefined;
  let distance = 0;
  for (let k = from; k < to; k++) {
    const beyond = Math.max(low - values[k], values[k] - high);
    if (beyond > distance) [found, distance] = [k, beyond];
  }
  return found;
}

/** Greatest less least finite value; 0 where there is none. */
export function finiteSpan(values: ArrayLike<number>): number {
  let [low, high] = [Infinity, -Infinity];
  for (let k = 0; k < values.length; k++) {
    if (!Number.isFinite(values[k])) continue;
    if (values[k] < low) low = values[k];
    if (values[k] > high) high = values[k];
  }
  return high > low ? high - low : 0;
}
