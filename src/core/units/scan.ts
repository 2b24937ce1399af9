import type { Decimal } from "./decimal.ts";
import { prefixExponent } from "./prefix.ts";
import { spellingsOf, type Unit } from "./unit.ts";

/** The number at the start of a text and what follows it. */
export interface Scanned {
  readonly decimal: Decimal;
  /** What follows, without blanks around it. */
  readonly suffix: string;
  /** Letter of IEC 60062 that stood for the decimal point; the suffix can then be a bare unit only. */
  readonly letter?: string;
}

const SIGN = /^[+\-\u2212]/;
/** No two parts can match the same digit, so reading takes time in proportion to the length. */
const NUMBER = /^(\d+(?:\.\d*)?|\.\d+)(?:[eE]([+-]?\d+))?/;
const LETTER_CODE = /^(\d*)([A-Za-zµ])(\d+)/;

/** The number a text begins with, or undefined when it begins with none. */
export function scan(text: string, unit: Unit): Scanned | undefined {
  const negative = text.startsWith("-") || text.startsWith("\u2212");
  const body = text.replace(SIGN, "").trimStart();
  return scanLetterCode(body, negative, unit) ?? scanNumber(body, negative);
}

function scanNumber(body: string, negative: boolean): Scanned | undefined {
  const match = NUMBER.exec(body);
  if (match === null) return undefined;
  const decimal = { negative, digits: match[1], exponent: Number(match[2] ?? 0) };
  return { decimal, suffix: body.slice(match[0].length).trim() };
}

/** IEC 60062: the letter stands where the decimal point would and is the multiplier, `4k7`, `R47`, `p33`. */
function scanLetterCode(body: string, negative: boolean, unit: Unit): Scanned | undefined {
  const match = LETTER_CODE.exec(body);
  if (match === null) return undefined;
  const [whole, before, letter, after] = match;
  const exponent = letterExponent(letter, unit);
  if (exponent === undefined) return undefined;
  const decimal = { negative, digits: `${before}.${after}`, exponent };
  return { decimal, suffix: body.slice(whole.length).trim(), letter };
}

function letterExponent(letter: string, unit: Unit): number | undefined {
  if (Object.hasOwn(unit.codeLetters, letter)) return unit.codeLetters[letter];
  // `4m7` in metres could be 4.7 mm or 4.7 m: a prefix that is also the unit is no code letter.
  if (unit.prefixes === "none" || spellingsOf(unit).includes(letter)) return undefined;
  return prefixExponent(letter);
}

/** Power of ten of what follows a number (prefix, unit, both or nothing); undefined when it does not fit the unit. */
export function suffixExponent({ suffix, letter }: Scanned, unit: Unit): number | undefined {
  if (letter !== undefined && Object.hasOwn(unit.codeLetters, letter)) return suffix === "" ? 0 : undefined;
  const spellings = spellingsOf(unit);
  if (spellings.includes(suffix)) return 0;
  if (letter !== undefined) return undefined;
  if (suffix === "%" && unit.percent) return -2;
  if (Object.hasOwn(unit.codeLetters, suffix)) return unit.codeLetters[suffix];
  if (unit.prefixes === "none") return undefined;
  return spellings.includes(suffix.slice(1).trimStart()) ? prefixExponent(suffix[0]) : undefined;
}
