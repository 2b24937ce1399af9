import { findLeast, findZero } from "../brent.ts";
import type { Chain } from "../chain.ts";
import { readAt } from "./exact.ts";
import { decadesBetween, logSpaced } from "./grid.ts";
import { marksOf } from "./marks.ts";

/** Points per decade of the search between the marks. */
const SEARCH_PER_DECADE = 40;

/** One point of the exact gain. */
export interface GainPoint {
  readonly freqHz: number;
  /** −Infinity at a null. */
  readonly gainDb: number;
}

/** A greatest or least gain, local, or a null. */
export interface Extreme extends GainPoint {
  readonly what: "peak" | "dip" | "null";
}

/**
 * The gain between two frequencies on a grid that no peak or notch can hide in: equal logarithmic steps, and beside
 * every complex root. Ascending; where there is no value there is no point.
 */
export function gainPoints(chain: Chain, fromHz: number, toHz: number): readonly GainPoint[] {
  const count = Math.max(3, Math.ceil(decadesBetween(fromHz, toHz) * SEARCH_PER_DECADE) + 1);
  const freqsHz = [...logSpaced(fromHz, toHz, count), ...marksOf(chain, fromHz, toHz)].sort((a, b) => a - b);
  return apart(freqsHz)
    .map((freqHz) => ({ freqHz, gainDb: readAt(chain, freqHz).gainDb }))
    .filter((point) => !Number.isNaN(point.gainDb));
}

/** Frequencies that are the same but for rounding are one, the middle one: between them nothing rises or falls. */
function apart(ascending: readonly number[]): readonly number[] {
  const runs: number[][] = [];
  for (const freqHz of ascending) {
    const run = runs[runs.length - 1];
    if (run !== undefined && freqHz <= run[0] * (1 + ROUNDING)) run.push(freqHz);
    else runs.push([freqHz]);
  }
  return runs.map((run) => run[Math.floor(run.length / 2)]);
}

const ROUNDING = 1e-14;

/** Less than this below its surroundings a dip is rounding; in dB. */
const LEAST_DEPTH_DB = 1e-9;
/** So far down a dip that goes on falling to the last digit of its frequency is a null. */
const NULL_DB = -240;

/** So many of each are looked for, from the lowest frequency on: a sampled stage has them without end. */
const MOST_EXTREMES = 400;
const MOST_CROSSINGS = 400;

/** By the points they were found between: several questions about one range ask for the same ones. */
const known = new WeakMap<readonly GainPoint[], readonly Extreme[]>();

/**
 * Local peaks, dips and nulls among the points, ascending, each to the last digits where the slope of the chain's
 * exact response is zero; at most `MOST_EXTREMES` of them.
 */
export function extremes(chain: Chain, points: readonly GainPoint[]): readonly Extreme[] {
  const found = known.get(points) ?? findExtremes(chain, points);
  known.set(points, found);
  return found;
}

function findExtremes(chain: Chain, points: readonly GainPoint[]): readonly Extreme[] {
  const found: Extreme[] = [];
  for (let k = 1; k + 1 < points.length && found.length < MOST_EXTREMES; k++) {
    const [before, here, after] = [points[k - 1], points[k], points[k + 1]];
    if (isPeak(points, k)) found.push(refine(chain, before, after, "peak"));
    else if (rises(here, before) && rises(here, after)) found.push(refineDip(chain, before, here, after));
  }
  return found;
}

const isPeak = (points: readonly GainPoint[], k: number): boolean =>
  k > 0 && k + 1 < points.length && rises(points[k - 1], points[k]) && rises(points[k + 1], points[k]);

const rises = (from: GainPoint, to: GainPoint): boolean => to.gainDb - from.gainDb > LEAST_DEPTH_DB;

function refineDip(chain: Chain, before: GainPoint, here: GainPoint, after: GainPoint): Extreme {
  if (here.gainDb === -Infinity) return { ...here, what: "null" };
  const dip = refine(chain, before, after, "dip");
  const lower = dip.gainDb <= here.gainDb ? dip : { ...here, what: "dip" as const };
  const top = Math.max(before.gainDb, after.gainDb);
  return lower.gainDb - top < NULL_DB + 60 && lower.gainDb < NULL_DB ? { ...lower, what: "null" } : lower;
}

function refine(chain: Chain, before: GainPoint, after: GainPoint, what: "peak" | "dip"): Extreme {
  const sign = what === "peak" ? -1 : 1;
  const read = (logFreq: number) => readAt(chain, Math.exp(logFreq));
  // At a null there is no slope: that is where a dip ends.
  const slopeAt = (x: number) => sign * (read(x).slopeDbPerDecade || 0);
  const [from, to] = inward(Math.log(before.freqHz), Math.log(after.freqHz));
  const turns = slopeAt(from) < 0 && slopeAt(to) > 0;
  const logFreq = turns ? findZero(slopeAt, from, to) : findLeast((x) => sign * read(x).gainDb, from, to);
  return { freqHz: Math.exp(logFreq), gainDb: read(logFreq).gainDb, what };
}

/** A hair inside: either end may be a null, which has no slope. */
function inward(from: number, to: number): readonly [number, number] {
  const hair = 1e-6 * (to - from);
  return [from + hair, to - hair];
}

/**
 * Frequencies at which the gain passes a level (dB), ascending, to the last digits; at most `MOST_CROSSINGS`. Between
 * two points of the search the gain also turns at its extremes: those are looked at too, so that a pair of crossings
 * is not missed. A gain that stays at the level, but for rounding, does not pass it; one that starts or ends there does.
 */
export function crossings(chain: Chain, points: readonly GainPoint[], levelDb: number): readonly number[] {
  const turns = [...points, ...extremes(chain, points)].sort((a, b) => a.freqHz - b.freqHz);
  const found: number[] = [];
  let last: GainPoint | undefined;
  for (const [k, here] of turns.entries()) {
    const side = sideOf(here, levelDb);
    if (side === 0 && isLoneEnd(turns, k, levelDb)) found.push(here.freqHz);
    if (side === 0) continue;
    if (last !== undefined && side !== sideOf(last, levelDb))
      found.push(crossing(chain, last.freqHz, here.freqHz, levelDb));
    if (found.length >= MOST_CROSSINGS) return found.slice(0, MOST_CROSSINGS);
    last = here;
  }
  return found;
}

/** Above the level, below it, or at it but for rounding. */
function sideOf({ gainDb }: GainPoint, levelDb: number): 1 | -1 | 0 {
  if (Math.abs(gainDb - levelDb) <= LEAST_DEPTH_DB) return 0;
  return gainDb > levelDb ? 1 : -1;
}

/** Whether the points start or end at the level, and leave it at once. */
function isLoneEnd(turns: readonly GainPoint[], k: number, levelDb: number): boolean {
  const neighbours = [turns[k - 1], turns[k + 1]].filter((turn) => turn !== undefined);
  return neighbours.length === 1 && sideOf(neighbours[0], levelDb) !== 0;
}

/** A null has no finite level to interpolate with; it stands for one that is lower than any. */
const FLOOR_DB = -1e4;

function crossing(chain: Chain, fromHz: number, toHz: number, levelDb: number): number {
  const above = (x: number) => Math.max(FLOOR_DB, readAt(chain, Math.exp(x)).gainDb) - levelDb;
  return Math.exp(findZero(above, Math.log(fromHz), Math.log(toHz)));
}

/** The highest peaks among the points are refined: one beside the highest point may rise above it. */
const MOST_TOPS = 20;

/** The greatest gain between two frequencies, its own frequency refined; undefined where there is no value. */
export function greatestGain(chain: Chain, points: readonly GainPoint[]): GainPoint | undefined {
  const tops = [...points.keys()]
    .filter((k) => isPeak(points, k))
    .sort((one, other) => points[other].gainDb - points[one].gainDb)
    .slice(0, MOST_TOPS)
    .map((k) => refine(chain, points[k - 1], points[k + 1], "peak"));
  return [...points, ...tops].reduce<GainPoint | undefined>(
    (best, point) => (best === undefined || point.gainDb > best.gainDb ? point : best),
    undefined,
  );
}
