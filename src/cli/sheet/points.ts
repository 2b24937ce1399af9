import { crossings, extremes, gainPoints, greatestGain } from "../../core/response/features.ts";
import type { ResolvedChain } from "../../document/resolve.ts";

/** A frequency worth a line in the sheet. */
export interface SheetPoint {
  readonly freqHz: number;
  /** Empty for a decade. */
  readonly what: string;
}

export interface SheetPoints {
  /** Ascending. */
  readonly points: readonly SheetPoint[];
  /** How many more peaks, dips and nulls there are. */
  readonly leftOut: number;
}

/** Half the power: 10·log10(1/2) dB. */
const HALF_POWER_DB = 10 * Math.log10(1 / 2);
const MOST_FEATURES = 24;

/** Decades, ends, half-power points, peaks, dips and nulls of the sweep, and where folding begins. */
export function sheetPoints({ chain, sweep, converter }: ResolvedChain): SheetPoints {
  const { fromHz, toHz } = sweep;
  const gains = gainPoints(chain, fromHz, toHz);
  const top = greatestGain(chain, gains);
  const level = top === undefined || !Number.isFinite(top.gainDb) ? undefined : top.gainDb + HALF_POWER_DB;
  const halfPower = level === undefined ? [] : crossings(chain, gains, level);
  const features = [
    ...halfPower.map((freqHz) => ({ freqHz, what: "half power" })),
    ...extremes(chain, gains).map(({ freqHz, what }) => ({ freqHz, what })),
  ];
  const edges =
    converter === undefined
      ? []
      : [
          ...(converter.bandHz === undefined ? [] : [{ freqHz: converter.bandHz, what: "band edge" }]),
          { freqHz: converter.rateHz / 2, what: "half rate" },
        ].filter(({ freqHz }) => freqHz >= fromHz && freqHz <= toHz);
  const plain = [...new Set([fromHz, ...decades(fromHz, toHz), toHz])].map((freqHz) => ({
    freqHz,
    what: "",
  }));
  const points = ordered([...features.slice(0, MOST_FEATURES), ...edges, ...plain]);
  return { points, leftOut: Math.max(0, features.length - MOST_FEATURES) };
}

function decades(fromHz: number, toHz: number): readonly number[] {
  const found: number[] = [];
  for (let exponent = Math.ceil(Math.log10(fromHz)); exponent <= Math.log10(toHz); exponent++) {
    found.push(Number(`1e${exponent}`));
  }
  return found.filter((freqHz) => freqHz > fromHz && freqHz < toHz);
}

/** By frequency; a decade where something else is told already is told no more. */
function ordered(points: readonly SheetPoint[]): readonly SheetPoint[] {
  const named = new Set(points.flatMap(({ freqHz, what }) => (what === "" ? [] : freqHz)));
  return points
    .filter(({ freqHz, what }) => what !== "" || !named.has(freqHz))
    .sort((one, other) => one.freqHz - other.freqHz);
}
