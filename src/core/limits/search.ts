import { findLeast } from "../brent.ts";

/** A function of frequency at one point of it. */
export interface Sample {
  readonly freqHz: number;
  /** NaN where there is no value. */
  readonly value: number;
}

/**
 * Where a function of frequency is least: the least of its samples and of its local minima, each refined between the
 * samples beside it. Samples ascend; between neighbours the function turns at most once. Undefined without any value.
 *
 * Only the minima are refined that by their parabola may lie below the rest, at most `most` of them.
 */
export function leastOf(
  samples: readonly Sample[],
  valueAt: (freqHz: number, near: number) => number,
  most = 40,
): Sample | undefined {
  const known = samples
    .filter(({ value }) => !Number.isNaN(value))
    .reduce<Sample | undefined>(
      (least, sample) => (least === undefined || sample.value < least.value ? sample : least),
      undefined,
    );
  if (known === undefined || known.value === -Infinity) return known;
  return candidates(samples, known.value)
    .slice(0, most)
    .map((k) => refined(samples, k, valueAt))
    .reduce((least, sample) => (sample.value < least.value ? sample : least), known);
}

/** Positions of local minima that may reach below the least sample, the most promising first. */
function candidates(samples: readonly Sample[], least: number): readonly number[] {
  return samples
    .map((_, k) => ({ k, depth: estimate(samples, k) }))
    .filter(({ depth }) => depth !== undefined && depth.least <= least + depth.slack)
    .sort((one, other) => (one.depth?.least ?? 0) - (other.depth?.least ?? 0))
    .map(({ k }) => k);
}

/**
 * The vertex of the parabola through a local minimum and its neighbours, and by how much it may be off: a sharp
 * minimum reaches further down than its parabola.
 */
function estimate(samples: readonly Sample[], k: number): { least: number; slack: number } | undefined {
  const [before, here, after] = [samples[k - 1], samples[k], samples[k + 1]];
  if (
    before === undefined ||
    after === undefined ||
    !(here.value <= before.value && here.value <= after.value)
  )
    return undefined;
  const rise = Math.max(before.value, after.value) - here.value;
  if (!(rise > 0) || !Number.isFinite(rise)) return undefined;
  return { least: here.value - rise / 4, slack: rise };
}

function refined(
  samples: readonly Sample[],
  k: number,
  valueAt: (freqHz: number, near: number) => number,
): Sample {
  const at = (x: number) => {
    const value = valueAt(Math.exp(x), k);
    return Number.isNaN(value) ? Infinity : value;
  };
  const freqHz = Math.exp(findLeast(at, Math.log(samples[k - 1].freqHz), Math.log(samples[k + 1].freqHz)));
  return { freqHz, value: valueAt(freqHz, k) };
}
