/**
 * Values as people write them: numbers in SI units, or texts with prefix and unit.
 *
 * Prefixes after the SI Brochure, letter codes (`4k7`, `R47`) after IEC 60062:2016.
 */
import { fail, ok, type Result } from "../result.ts";
import { quoted } from "../text.ts";
import { fromDb } from "./decibel.ts";
import { decimalValue, hasNonZeroDigit } from "./decimal.ts";
import {
  badSuffix,
  comma,
  empty,
  MAX_VALUE_LENGTH,
  noNumber,
  notFinite,
  tooLong,
  vanishing,
} from "./refusal.ts";
import { type Scanned, scan, suffixExponent } from "./scan.ts";
import { UNITS, type UnitTag, unifySymbols } from "./unit.ts";

/**
 * The value in SI units (`gain`: a ratio; `level`: dB; `degree`, `celsius`: as named), finite.
 *
 * A bare number is taken in the unit itself; for `gain` a value in dB is `10^(dB/20)`, a positive ratio.
 * Refused: a unit that does not fit, a comma, anything not finite or not decimal, more than 64 characters.
 */
export function parseQuantity(input: string | number, unit: UnitTag): Result<number> {
  if (typeof input === "number") return Number.isFinite(input) ? ok(input) : fail(notFinite(String(input)));
  const text = unifySymbols(input.trim());
  const { wanted } = UNITS[unit];
  if (text === "") return fail(empty(wanted));
  if (text.length > MAX_VALUE_LENGTH) return fail(tooLong(text));
  if (text.includes(",")) return fail(comma(text, parseQuantity(text.replace(",", "."), unit).ok));
  const scanned = scan(text, UNITS[unit]);
  return scanned === undefined ? fail(noNumber(text, wanted)) : scannedValue(text, scanned, unit);
}

function scannedValue(text: string, scanned: Scanned, unit: UnitTag): Result<number> {
  const isRatioInDb = unit === "gain" && scanned.suffix === "dB" && scanned.letter === undefined;
  const shift = isRatioInDb ? 0 : suffixExponent(scanned, UNITS[unit]);
  if (shift === undefined) return fail(badSuffix(text, scanned, UNITS[unit].wanted));
  const { decimal } = scanned;
  const number = decimalValue({ ...decimal, exponent: decimal.exponent + shift });
  const value = isRatioInDb ? fromDb(number) : number;
  if (!Number.isFinite(value)) return fail(notFinite(quoted(text)));
  if (value === 0 && (isRatioInDb || hasNonZeroDigit(decimal.digits))) return fail(vanishing(text));
  return ok(value);
}
