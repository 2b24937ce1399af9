import type { Problem } from "../result.ts";
import { quoted } from "../text.ts";
import { type Scanned, suffixExponent } from "./scan.ts";
import { UNITS, type UnitTag } from "./unit.ts";

/** The longest text that is read as a value. */
export const MAX_VALUE_LENGTH = 64;

export const tooLong = (text: string): Problem => ({
  found: `${quoted(text)} is ${text.length} characters long`,
  allowed: `at most ${MAX_VALUE_LENGTH} characters`,
});

export const empty = (wanted: string): Problem => ({ found: "nothing", allowed: wanted });

export const notFinite = (shown: string): Problem => ({
  found: `${shown} is not a finite number`,
  allowed: "a finite number, at most about 1e308",
});

export const vanishing = (text: string): Problem => ({
  found: `${quoted(text)} is too small to be told from zero`,
  allowed: "0, or at least about 1e-323",
});

/** A text that does not begin with a number. */
export function noNumber(text: string, wanted: string): Problem {
  if (/^[+\-\u2212]?\s*(nan|inf(inity)?|∞)$/i.test(text)) return notFinite(quoted(text));
  return { found: `${quoted(text)} does not begin with a number`, allowed: wanted };
}

/** `corrected`: whether the text with a point instead of the comma would be taken. */
export function comma(text: string, corrected: boolean): Problem {
  const found = `${quoted(text)} has a comma`;
  if (/,\d{3}(?!\d)/.test(text) || !corrected)
    return { found, allowed: "a decimal point, as in 4.7, and nothing between thousands" };
  return { found, allowed: `a decimal point, as in ${text.replace(",", ".")}` };
}

/** A number followed by something that does not fit: another unit, or none that is known. */
export function badSuffix(text: string, scanned: Scanned, wanted: string): Problem {
  const other = unitNamed(scanned);
  if (other !== undefined) return { found: `${quoted(text)} is in ${other}`, allowed: wanted };
  return { found: `${quoted(text)} has ${quoted(scanned.suffix)} after the number`, allowed: wanted };
}

function unitNamed(scanned: Scanned): string | undefined {
  if (scanned.suffix === "%") return "percent";
  const tags = Object.keys(UNITS) as UnitTag[];
  const tag = tags.find((candidate) => {
    const unit = UNITS[candidate];
    return (
      unit.symbol !== "" &&
      endsInUnit(scanned.suffix, unit.symbol, unit.ascii, unit.alsoRead) &&
      suffixExponent(scanned, unit) !== undefined
    );
  });
  return tag && UNITS[tag].symbol;
}

const endsInUnit = (suffix: string, symbol: string, ascii: string, alsoRead: readonly string[]): boolean =>
  [symbol, ascii, ...alsoRead].some((spelling) => suffix.endsWith(spelling));
