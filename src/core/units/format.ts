/** Values as texts that `parseQuantity` takes back: what is shown can be typed. */
import { plainDecimal, scientificDecimal, significantDigits } from "./decimal.ts";
import { prefixFor } from "./prefix.ts";
import { UNITS, type UnitTag } from "./unit.ts";

/** `ascii` writes `ohm`, `u`, `V/rtHz` and `deg`. */
export type Charset = "unicode" | "ascii";

/** Without prefixes, powers of ten from here up to 14 are written out. */
const SMALLEST_PLAIN_EXPONENT = -6;
const LARGEST_PLAIN_EXPONENT = 14;

/**
 * The value rounded to `digits` significant digits (1 to 17), trailing zeros left out: `4.7 kΩ`, `15.92 kHz`, `-3.01 dB`.
 *
 * Scientific only beyond the prefixes f to T. Negative zero is shown as `0`. Not finite: `∞`, `-∞` (`inf`) or
 * `no value`, which cannot be typed.
 */
export function formatQuantity(
  value: number,
  unit: UnitTag,
  digits = 4,
  charset: Charset = "unicode",
): string {
  if (!Number.isFinite(value)) return withoutNumber(value, unit, charset);
  const rounded = Number(value.toExponential(digits - 1));
  // Rounding up the largest doubles would leave their range.
  const shown = Number.isFinite(rounded) ? rounded : value;
  return formatExact(shown === 0 ? 0 : shown, unit, charset);
}

/** The shortest text that reads back as exactly the same double, negative zero included (`-0 Ω`). */
export function formatExact(value: number, unit: UnitTag, charset: Charset = "unicode"): string {
  if (!Number.isFinite(value)) return withoutNumber(value, unit, charset);
  const sign = value < 0 || Object.is(value, -0) ? "-" : "";
  const { number, prefix } = magnitudeText(Math.abs(value), UNITS[unit].prefixes === "shown");
  const shownPrefix = charset === "ascii" ? prefix.replace("µ", "u") : prefix;
  return withSymbol(sign + number, shownPrefix, unit, charset);
}

/** A fraction in percent, `0.05` as `5 %`, exact like `formatExact`. */
export function formatPercent(fraction: number): string {
  if (!Number.isFinite(fraction)) return `${withoutNumber(fraction, "number", "unicode")} %`;
  const { digits, exponent } = significantDigits(Math.abs(fraction));
  return `${fraction < 0 ? "-" : ""}${unprefixed(digits, digits === "0" ? 0 : exponent + 2)} %`;
}

function magnitudeText(magnitude: number, prefixed: boolean): { number: string; prefix: string } {
  const { digits, exponent } = significantDigits(magnitude);
  if (!prefixed) return { number: unprefixed(digits, exponent), prefix: "" };
  const step = 3 * Math.floor(exponent / 3);
  const prefix = prefixFor(step);
  if (prefix === undefined) return { number: scientificDecimal(digits, exponent), prefix: "" };
  return { number: plainDecimal(digits, exponent - step), prefix };
}

function unprefixed(digits: string, exponent: number): string {
  const isPlain = exponent >= SMALLEST_PLAIN_EXPONENT && exponent <= LARGEST_PLAIN_EXPONENT;
  return isPlain ? plainDecimal(digits, exponent) : scientificDecimal(digits, exponent);
}

function withSymbol(number: string, prefix: string, unit: UnitTag, charset: Charset): string {
  const symbol = prefix + UNITS[unit][charset === "ascii" ? "ascii" : "symbol"];
  // SI Brochure 5.4.3: a blank before every symbol but the degree of plane angle.
  return symbol === "" || symbol === "°" ? number + symbol : `${number} ${symbol}`;
}

function withoutNumber(value: number, unit: UnitTag, charset: Charset): string {
  if (Number.isNaN(value)) return "no value";
  const infinite = charset === "ascii" ? "inf" : "∞";
  return withSymbol(value < 0 ? `-${infinite}` : infinite, "", unit, charset);
}
