import type { Chain } from "./chain.ts";
import { foldHz } from "./fold.ts";
import { type Reading, readAt } from "./response/exact.ts";
import { type Sweep, sweepFrequencies } from "./response/grid.ts";
import { marksOf } from "./response/marks.ts";
import { unwrapAlong, unwrappedAt } from "./response/phase.ts";

/**
 * One reading as it is handed out. Where nothing comes out at all (a null, −∞ dB) the ratio is 0 and everything else
 * that is read from the response is null.
 */
export interface ChainReading {
  readonly freqHz: number;
  readonly gainDb: number | null;
  /** −gain. */
  readonly attenuationDb: number | null;
  /** |H|; null where it is beyond a double: above about 1e308, or below about 1e-308 and yet no null. */
  readonly ratio: number | null;
  /** (−180, 180]. */
  readonly phaseDeg: number | null;
  /** Continuous along the sweep, equal to the wrapped phase where the sweep starts. */
  readonly phaseUnwrappedDeg: number | null;
  /** −dφ/dω. */
  readonly groupDelayS: number | null;
  /** d(gain)/d(log10 f). */
  readonly slopeDbPerDecade: number | null;
  /** The source first, then the stages in the line; single readings only. */
  readonly shares?: readonly Share[];
  /** Where the frequency lands when sampled; only with a sample rate. */
  readonly foldHz?: number;
}

export interface Share {
  readonly name: string;
  /** Null where there is no voltage on one side of the stage or where it is beyond all bounds. */
  readonly gainDb: number | null;
}

export interface ChainReadings {
  /** In the order of the frequencies asked for. */
  readonly readings: readonly ChainReading[];
  /** Frequencies in Hz at which there is no value: outside a measured response, or right on a lossless resonance. */
  readonly withoutValueHz: readonly number[];
}

/** Readings with shares at single frequencies (Hz, greater than zero); phase is counted from the sweep's start. */
export function readings(
  chain: Chain,
  sweep: Sweep,
  freqsHz: readonly number[],
  rateHz?: number,
): ChainReadings {
  const ascending = [...new Set(freqsHz)].sort((a, b) => a - b);
  // Beyond what can be evaluated there is no phase to follow either.
  const readable = ascending.filter((freqHz) => hasValue(readAt(chain, freqHz)));
  const unwrapped = unwrappedAt(chain, sweep, readable);
  const phaseDeg = new Map(readable.map((freqHz, k) => [freqHz, unwrapped[k]]));
  return gathered(
    freqsHz,
    (freqHz) => readAt(chain, freqHz),
    (reading) => ({
      ...response(reading, phaseDeg.get(reading.freqHz) as number),
      shares: reading.shares.map(({ name, gainDb }) => ({ name, gainDb: finiteOrNull(gainDb) })),
      ...fold(reading.freqHz, rateHz),
    }),
  );
}

/** Readings without shares at every frequency of a sweep, the continuous phase starting at its first value. */
export function sweepReadings(chain: Chain, sweep: Sweep, rateHz?: number): ChainReadings {
  const freqHz = sweepFrequencies(sweep);
  const read = Array.from(freqHz, (freq) => withoutShares(readAt(chain, freq)));
  const sampled = {
    freqHz,
    gainDb: Float64Array.from(read, ({ gainDb }) => gainDb),
    phaseDeg: Float64Array.from(read, ({ phaseDeg }) => phaseDeg),
  };
  const unwrapped = unwrapAlong(chain, sampled, marksOf(chain, sweep.fromHz, sweep.toHz));
  return gathered(
    [...read.keys()],
    (k) => read[k],
    (reading, k) => ({ ...response(reading, unwrapped[k]), ...fold(reading.freqHz, rateHz) }),
  );
}

type Response = Omit<Reading, "shares" | "impedanceOhm">;

/** Without what only single readings tell, so that a long sweep does not fill the memory. */
function withoutShares({ shares: _, impedanceOhm: __, ...rest }: Reading): Response {
  return rest;
}

function gathered<K extends number, R extends Response>(
  keys: readonly K[],
  read: (key: K) => R,
  made: (reading: R, key: K) => ChainReading,
): ChainReadings {
  const found: ChainReading[] = [];
  const withoutValueHz: number[] = [];
  for (const key of keys) {
    const reading = read(key);
    if (hasValue(reading)) found.push(made(reading, key));
    else withoutValueHz.push(reading.freqHz);
  }
  return { readings: found, withoutValueHz };
}

/** A null has a value, −∞ dB; a gain beyond all bounds and a missing one have none. */
const hasValue = ({ gainDb }: Response): boolean => gainDb < Infinity;

function response(reading: Response, unwrappedDeg: number): ChainReading {
  const { freqHz, gainDb } = reading;
  return {
    freqHz,
    gainDb: finiteOrNull(gainDb),
    // Not −0 where the gain is 0 dB.
    attenuationDb: finiteOrNull(0 - gainDb),
    ratio: gainDb === -Infinity ? 0 : finiteOrNull(reading.ratio) || null,
    phaseDeg: finiteOrNull(reading.phaseDeg),
    phaseUnwrappedDeg: finiteOrNull(unwrappedDeg),
    groupDelayS: finiteOrNull(reading.groupDelayS),
    slopeDbPerDecade: finiteOrNull(reading.slopeDbPerDecade),
  };
}

const fold = (freqHz: number, rateHz: number | undefined) =>
  rateHz === undefined ? {} : { foldHz: foldHz(freqHz, rateHz) };

const finiteOrNull = (value: number): number | null => (Number.isFinite(value) ? value + 0 : null);
