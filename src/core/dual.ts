import type { Polynomial, Rational } from "./rational.ts";

/**
 * A complex number together with its derivative by angular frequency (forward differentiation, e.g. Griewank and
 * Walther, Evaluating Derivatives, ch. 3): what group delay and slope are read from, exactly, at one frequency.
 */
export interface Dual {
  readonly re: number;
  readonly im: number;
  /** d re / dω */
  readonly dRe: number;
  /** d im / dω */
  readonly dIm: number;
}

export const dual = (re: number, im = 0, dRe = 0, dIm = 0): Dual => ({ re, im, dRe, dIm });

export const ZERO = dual(0);
export const ONE = dual(1);

export function add(p: Dual, q: Dual): Dual {
  return dual(p.re + q.re, p.im + q.im, p.dRe + q.dRe, p.dIm + q.dIm);
}

export function multiply(p: Dual, q: Dual): Dual {
  return dual(
    p.re * q.re - p.im * q.im,
    p.re * q.im + p.im * q.re,
    p.dRe * q.re - p.dIm * q.im + p.re * q.dRe - p.im * q.dIm,
    p.dRe * q.im + p.dIm * q.re + p.re * q.dIm + p.im * q.dRe,
  );
}

/** `p / q` by Smith's scheme (Comm. ACM 5, 1962), so that neither tiny nor huge divisors overflow. */
export function divide(p: Dual, q: Dual): Dual {
  const [re, im] = quotient(p.re, p.im, q.re, q.im);
  const dRe = p.dRe - (re * q.dRe - im * q.dIm);
  const dIm = p.dIm - (re * q.dIm + im * q.dRe);
  const [quotientRe, quotientIm] = quotient(dRe, dIm, q.re, q.im);
  return dual(re, im, quotientRe, quotientIm);
}

function quotient(a: number, b: number, c: number, d: number): [number, number] {
  if (Math.abs(c) >= Math.abs(d)) {
    const r = d / c;
    const t = 1 / (c + d * r);
    return [(a + b * r) * t, (b - a * r) * t];
  }
  const r = c / d;
  const t = 1 / (c * r + d);
  return [(a * r + b) * t, (b * r - a) * t];
}

export function scale(p: Dual, factor: number): Dual {
  return dual(p.re * factor, p.im * factor, p.dRe * factor, p.dIm * factor);
}

export const magnitude = (p: Dual): number => Math.hypot(p.re, p.im);

/**
 * A polynomial in `x = jω/omega0`. A real or imaginary part that is nothing but the rounding of its terms is taken
 * as the zero that it stands for: a null then reads as a null, not as −310 dB.
 */
export function evaluatePolynomial(p: Polynomial, omega: number, omega0: number): Dual {
  const x = omega / omega0;
  const even = alternating(p, 0, x);
  const odd = alternating(p, 1, x);
  return dual(even.value, odd.value, even.slope / omega0, odd.slope / omega0);
}

/** Terms of one parity, with the signs that powers of j bring: `Σ ± p[k]·x^k` and its derivative by x. */
function alternating(p: Polynomial, parity: 0 | 1, x: number): { value: number; slope: number } {
  let value = 0;
  let slope = 0;
  let size = 0;
  let sign = 1;
  for (let k = parity; k < p.length; k += 2) {
    const term = p[k] * x ** k;
    value += sign * term;
    size += Math.abs(term);
    if (k > 0) slope += sign * k * p[k] * x ** (k - 1);
    sign = -sign;
  }
  return { value: Math.abs(value) <= ROUNDING * size ? 0 : value, slope };
}

const ROUNDING = 4 * Number.EPSILON;

export function evaluateRational(f: Rational, omega: number): { num: Dual; den: Dual } {
  return {
    num: evaluatePolynomial(f.num, omega, f.omega0),
    den: evaluatePolynomial(f.den, omega, f.omega0),
  };
}
