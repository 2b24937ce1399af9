/** A bound on gain (dB), phase (degrees, continuous) or group delay (s) over a range of frequencies. */
export interface Limit {
  readonly quantity: "gain" | "phase" | "delay";
  readonly fromHz: number;
  readonly toHz: number;
  readonly atLeast?: number;
  readonly atMost?: number;
  /** The gain at this frequency is the zero of the bounds; absent for absolute bounds. */
  readonly reHz?: number;
}

/** How a limit is kept, at the frequency where it is kept worst. */
export interface Verdict {
  readonly pass: boolean;
  readonly worstFreqHz: number;
  /** In the limit's quantity, relative where the limit is; −Infinity at a null, NaN where there is no value. */
  readonly worstValue: number;
  /** Distance to the nearer bound, negative beyond it. */
  readonly margin: number;
}

/** Distance of a value to the nearer of the limit's bounds; negative beyond, NaN for no value. */
export function marginOf({ atLeast, atMost }: Pick<Limit, "atLeast" | "atMost">, value: number): number {
  if (Number.isNaN(value)) return Number.NaN;
  const above = atLeast === undefined ? Infinity : value - atLeast;
  const below = atMost === undefined ? Infinity : atMost - value;
  return Math.min(above, below);
}
