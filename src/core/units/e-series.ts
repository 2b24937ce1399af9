/**
 * Preferred number series for resistors and capacitors, IEC 60063:2015.
 *
 * E3 to E24 are tables; E48, E96 and E192 are `10^(k/N)` rounded to three digits, with one exception in E192.
 */

export const SERIES_NAMES = ["E3", "E6", "E12", "E24", "E48", "E96", "E192"] as const;
export type SeriesName = (typeof SERIES_NAMES)[number];

/** Members of one decade as whole numbers, ascending, so that values come out as exact decimals. */
interface Decade {
  readonly members: readonly number[];
  /** Power of ten that brings the first member to 1. */
  readonly scale: number;
}

const E24 = [10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91];

/** 9.20 where the rule gives 9.19. */
const E192_EXCEPTION = { k: 185, member: 920 };

const everySecond = (members: readonly number[]): number[] => members.filter((_, index) => index % 2 === 0);

function rounded(count: number): Decade {
  const members = Array.from({ length: count }, (_, k) => Math.round(100 * 10 ** (k / count)));
  if (count === 192) members[E192_EXCEPTION.k] = E192_EXCEPTION.member;
  return { members, scale: -2 };
}

const E12 = everySecond(E24);
const E6 = everySecond(E12);

const DECADES: Readonly<Record<SeriesName, Decade>> = {
  E3: { members: everySecond(E6), scale: -1 },
  E6: { members: E6, scale: -1 },
  E12: { members: E12, scale: -1 },
  E24: { members: E24, scale: -1 },
  E48: rounded(48),
  E96: rounded(96),
  E192: rounded(192),
};

/** Relative distance within which a computed value counts as the member it was meant to be. */
const SAME = 1e-9;

/** Beyond these, neighbours could leave the range of normal doubles. */
const SMALLEST = 1e-300;
const LARGEST = 1e300;

/** One decade of the series from 1 to below 10, ascending. */
export const seriesMantissas = (series: SeriesName): readonly number[] =>
  DECADES[series].members.map((_, index) => memberAt(series, index));

/** The member nearest to `value` by ratio, the lower of two equally near; undefined unless 1e-300 ≤ value < 1e300. */
export function nearestInSeries(value: number, series: SeriesName): number | undefined {
  if (!isServed(value)) return undefined;
  const index = indexAtOrBelow(value, series);
  const lower = memberAt(series, index);
  const upper = memberAt(series, index + 1);
  return value / lower <= upper / value ? lower : upper;
}

/**
 * The next member above or below `value`; a value off the series goes to its neighbour on that side.
 * Undefined unless 1e-300 ≤ value < 1e300.
 */
export function stepInSeries(
  value: number,
  series: SeriesName,
  direction: "up" | "down",
): number | undefined {
  if (!isServed(value)) return undefined;
  const index = indexAtOrBelow(value, series);
  const nearby = [index - 1, index, index + 1, index + 2].map((each) => memberAt(series, each));
  return direction === "up"
    ? nearby.find((member) => member > value * (1 + SAME))
    : nearby.findLast((member) => member < value * (1 - SAME));
}

/** All members from `from` to `to`, both included, ascending; empty unless 1e-300 ≤ from ≤ to < 1e300. */
export function valuesInSeries(series: SeriesName, from: number, to: number): number[] {
  if (!isServed(from) || !isServed(to)) return [];
  const first = indexAtOrBelow(from, series);
  const count = indexAtOrBelow(to, series) - first + 1;
  const values = Array.from({ length: Math.max(0, count) }, (_, offset) => memberAt(series, first + offset));
  return values.filter((member) => member >= from && member <= to);
}

/**
 * Member by its number, counted through all decades from 0 for the value 1.
 *
 * Read from decimal text: `47e2` is exactly 4700, where a product with powers of ten would miss by a bit.
 */
function memberAt(series: SeriesName, index: number): number {
  const { members, scale } = DECADES[series];
  const decade = Math.floor(index / members.length);
  return Number(`${members[index - decade * members.length]}e${decade + scale}`);
}

/** Number of the largest member that is not above `value`, give or take the last bit of `value`. */
function indexAtOrBelow(value: number, series: SeriesName): number {
  const { members, scale } = DECADES[series];
  // The text gives the decade exactly, unlike the floor of a logarithm.
  const [mantissa, decade] = value.toExponential().split("e").map(Number);
  const scaled = mantissa * 10 ** -scale;
  return decade * members.length + members.findLastIndex((member) => member <= scaled);
}

const isServed = (value: number): boolean => value >= SMALLEST && value < LARGEST;
