import { type Dual, dual, exponentOf, isModerate, timesPowerOfTwo, ZERO } from "./dual.ts";
import type { Polynomial, Rational } from "./rational.ts";

export function evaluateRational(f: Rational, omega: number): { num: Dual; den: Dual } {
  return {
    num: evaluatePolynomial(f.num, omega, f.omega0),
    den: evaluatePolynomial(f.den, omega, f.omega0),
  };
}

/**
 * A polynomial in `x = jω/omega0`. A real or imaginary part that is nothing but the rounding of its terms is taken
 * as the zero that it stands for: a null then reads as a null, not as −310 dB.
 */
export function evaluatePolynomial(p: Polynomial, omega: number, omega0: number): Dual {
  const x = omega / omega0;
  const { sum, size } = sumOfTerms(p, x, 0);
  if (size === 0 && p.every((coefficient) => coefficient === 0)) return ZERO;
  return isModerate(size) && isModerate(x ** (p.length - 1)) ? sum : farOut(p, omega, omega0);
}

/** With powers of two taken out of x and of the terms, so that none leaves double precision. */
function farOut(p: Polynomial, omega: number, omega0: number): Dual {
  const [omegaPower, omega0Power] = [exponentOf(omega), exponentOf(omega0)];
  const x = timesPowerOfTwo(omega, -omegaPower) / timesPowerOfTwo(omega0, -omega0Power);
  const power = omegaPower - omega0Power;
  const exponent = Math.max(...p.map((c, k) => (c === 0 ? -Infinity : exponentOf(Math.abs(c)) + k * power)));
  const near = p.map((c, k) => timesPowerOfTwo(c, k * power - exponent));
  return sumOfTerms(near, x, exponent).sum;
}

/** Even powers of j are real, odd ones imaginary, with signs by turns; `size` is that of the terms. */
function sumOfTerms(p: Polynomial, x: number, exponent: number): { sum: Dual; size: number } {
  const even = alternating(p, 0, x);
  const odd = alternating(p, 1, x);
  return {
    sum: dual(even.value, odd.value, even.slope, odd.slope, exponent),
    size: Math.max(even.size, odd.size),
  };
}

/** Terms of one parity: `Σ ± p[k]·x^k` and its derivative by ln x. */
function alternating(
  p: Polynomial,
  parity: 0 | 1,
  x: number,
): { value: number; slope: number; size: number } {
  let value = 0;
  let slope = 0;
  let size = 0;
  let sign = 1;
  for (let k = parity; k < p.length; k += 2) {
    const term = sign * p[k] * x ** k;
    value += term;
    size += Math.abs(term);
    slope += k * term;
    sign = -sign;
  }
  return { value: Math.abs(value) <= ROUNDING * size ? 0 : value, slope, size };
}

const ROUNDING = 4 * Number.EPSILON;
