/** The frequencies of a sweep. */
export interface Sweep {
  readonly fromHz: number;
  readonly toHz: number;
  readonly perDecade: number;
}

/** A sweep never has more points. */
export const MOST_SWEEP_POINTS = 200_000;

/** Decades from one frequency up to another, also where their ratio is beyond a double. */
export const decadesBetween = (fromHz: number, toHz: number): number =>
  toHz / fromHz < Infinity ? Math.log10(toHz / fromHz) : Math.log10(toHz) - Math.log10(fromHz);

/** The frequency so many decades up. */
const decadesAbove = (fromHz: number, decades: number): number =>
  decades < 300 ? fromHz * 10 ** decades : 10 ** (Math.log10(fromHz) + decades);

/** Their geometric mean. */
export const middleHz = (oneHz: number, otherHz: number): number => Math.sqrt(oneHz) * Math.sqrt(otherHz);

/** Number of points of a sweep: equal steps of 1/perDecade from `fromHz`, and `toHz` itself. */
export function sweepLength({ fromHz, toHz, perDecade }: Sweep): number {
  // A hair below the last step still counts as that step: 1 kHz / 1 Hz is three decades, not 2.9999….
  return Math.ceil(decadesBetween(fromHz, toHz) * perDecade - 1e-9) + 1;
}

/** `fromHz·10^(k/perDecade)`, ascending; the last one is `toHz`. */
export function sweepFrequencies(sweep: Sweep): Float64Array {
  const count = sweepLength(sweep);
  const freqHz = new Float64Array(count);
  for (let k = 0; k < count; k++) freqHz[k] = decadesAbove(sweep.fromHz, k / sweep.perDecade);
  freqHz[count - 1] = sweep.toHz;
  return freqHz;
}

/** `count` frequencies in equal logarithmic steps, both ends included; at least two. */
export function logSpaced(fromHz: number, toHz: number, count: number): Float64Array {
  const decades = decadesBetween(fromHz, toHz);
  const freqHz = new Float64Array(count);
  for (let k = 0; k < count; k++) freqHz[k] = decadesAbove(fromHz, (decades * k) / (count - 1));
  freqHz[count - 1] = toHz;
  return freqHz;
}
