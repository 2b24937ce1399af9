/**
 * SI prefixes as powers of ten (SI Brochure, 9th edition, table 7), with `u` for µ in ASCII
 * and the `K` of IEC 60062 for kilo.
 */
const PREFIX_EXPONENTS: Readonly<Record<string, number>> = {
  f: -15,
  p: -12,
  n: -9,
  u: -6,
  µ: -6,
  m: -3,
  k: 3,
  K: 3,
  M: 6,
  G: 9,
  T: 12,
};

const SHOWN: ReadonlyMap<number, string> = new Map([
  [-15, "f"],
  [-12, "p"],
  [-9, "n"],
  [-6, "µ"],
  [-3, "m"],
  [0, ""],
  [3, "k"],
  [6, "M"],
  [9, "G"],
  [12, "T"],
]);

/** Power of ten of a prefix letter, undefined when it is none. */
export const prefixExponent = (letter: string): number | undefined =>
  Object.hasOwn(PREFIX_EXPONENTS, letter) ? PREFIX_EXPONENTS[letter] : undefined;

/** Prefix for a power of ten that is a multiple of three, undefined beyond f and T. */
export const prefixFor = (exponent: number): string | undefined => SHOWN.get(exponent);
