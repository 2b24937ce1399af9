/** A decimal number as text, times a power of ten: kept as text so that `4.7n` is read as exactly `4.7e-9`. */
export interface Decimal {
  readonly negative: boolean;
  /** Digits with at most one point: `4.7`, `.5`, `5.`. */
  readonly digits: string;
  readonly exponent: number;
}

/** Beyond this a double is zero or infinite whatever 64 characters of digits precede it. */
const EXPONENT_BOUND = 9999;

/** The nearest double: ±Infinity or ±0 beyond its range. */
export function decimalValue({ negative, digits, exponent }: Decimal): number {
  const bounded = Math.min(EXPONENT_BOUND, Math.max(-EXPONENT_BOUND, exponent));
  return Number(`${negative ? "-" : ""}${digits}e${bounded}`);
}

export const hasNonZeroDigit = (digits: string): boolean => /[1-9]/.test(digits);

/** Significant digits without a point and the power of ten of the first; without `count` the shortest that round-trip. */
export function significantDigits(magnitude: number, count?: number): { digits: string; exponent: number } {
  const text = count === undefined ? magnitude.toExponential() : magnitude.toExponential(count - 1);
  const [mantissa, exponent] = text.split("e");
  const digits = mantissa.replace(".", "").replace(/0+$/, "");
  return { digits: digits === "" ? "0" : digits, exponent: Number(exponent) };
}

/** `digits` written out with the first of them at ten to `exponent`: `("47", 3)` is `4700`, `("47", -2)` is `0.047`. */
export function plainDecimal(digits: string, exponent: number): string {
  if (exponent < 0) return `0.${"0".repeat(-exponent - 1)}${digits}`;
  const whole = digits.slice(0, exponent + 1).padEnd(exponent + 1, "0");
  const fraction = digits.slice(exponent + 1);
  return fraction === "" ? whole : `${whole}.${fraction}`;
}

export function scientificDecimal(digits: string, exponent: number): string {
  const fraction = digits.slice(1);
  return `${digits[0]}${fraction === "" ? "" : `.${fraction}`}e${exponent}`;
}
