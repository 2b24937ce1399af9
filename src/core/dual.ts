/**
 * A complex number `(re + j·im)·2^exponent` together with its derivative by ln ω, which shares the exponent.
 *
 * The derivative is what group delay and slope are read from, exactly, at one frequency (forward differentiation,
 * e.g. Griewank and Walther, Evaluating Derivatives, ch. 3); by ln ω it is of the number's own size from millihertz to
 * gigahertz. The exponent keeps products of any length, and responses thousands of decibels down, clear of overflow
 * and of the underflow that would pass for a null.
 */
export interface Dual {
  readonly re: number;
  readonly im: number;
  /** d re / d ln ω */
  readonly dRe: number;
  /** d im / d ln ω */
  readonly dIm: number;
  readonly exponent: number;
}

export const dual = (re: number, im = 0, dRe = 0, dIm = 0, exponent = 0): Dual =>
  normalised(re, im, dRe, dIm, exponent);

/** Within these the products of two numbers, and sums of those, stay in double precision. */
const LARGE = 2 ** 400;
const SMALL = 2 ** -400;

export const isModerate = (size: number): boolean => size > SMALL && size < LARGE;

function normalised(re: number, im: number, dRe: number, dIm: number, exponent: number): Dual {
  const size = Math.max(Math.abs(re), Math.abs(im));
  if (isModerate(size)) return { re, im, dRe, dIm, exponent };
  const shift = exponentOf(size > 0 ? size : Math.max(Math.abs(dRe), Math.abs(dIm)));
  return {
    re: timesPowerOfTwo(re, -shift),
    im: timesPowerOfTwo(im, -shift),
    dRe: timesPowerOfTwo(dRe, -shift),
    dIm: timesPowerOfTwo(dIm, -shift),
    exponent: exponent + shift,
  };
}

/** The power of two that brings a magnitude near one; none for zero and for what is not finite. */
export const exponentOf = (size: number): number =>
  size > 0 && size < Infinity ? Math.round(Math.log2(size)) : 0;

/** `x·2^power` in two steps, so that the power itself may be beyond a double. */
export function timesPowerOfTwo(x: number, power: number): number {
  if (x === 0 || power === 0) return x;
  const half = Math.trunc(power / 2);
  return x * 2 ** half * 2 ** (power - half);
}

export const ZERO = dual(0);
export const ONE = dual(1);

export function add(p: Dual, q: Dual): Dual {
  if (p.exponent === q.exponent)
    return normalised(p.re + q.re, p.im + q.im, p.dRe + q.dRe, p.dIm + q.dIm, p.exponent);
  if (isZero(p)) return q;
  if (isZero(q)) return p;
  const [high, low] = p.exponent > q.exponent ? [p, q] : [q, p];
  const aligned = (x: number): number => timesPowerOfTwo(x, low.exponent - high.exponent);
  return normalised(
    high.re + aligned(low.re),
    high.im + aligned(low.im),
    high.dRe + aligned(low.dRe),
    high.dIm + aligned(low.dIm),
    high.exponent,
  );
}

const isZero = ({ re, im, dRe, dIm }: Dual): boolean => re === 0 && im === 0 && dRe === 0 && dIm === 0;

export const negate = ({ re, im, dRe, dIm, exponent }: Dual): Dual => ({
  re: -re,
  im: -im,
  dRe: -dRe,
  dIm: -dIm,
  exponent,
});

export function multiply(p: Dual, q: Dual): Dual {
  return normalised(
    p.re * q.re - p.im * q.im,
    p.re * q.im + p.im * q.re,
    p.dRe * q.re - p.dIm * q.im + p.re * q.dRe - p.im * q.dIm,
    p.dRe * q.im + p.dIm * q.re + p.re * q.dIm + p.im * q.dRe,
    p.exponent + q.exponent,
  );
}

/** `p / q` by Smith's scheme (Comm. ACM 5, 1962). */
export function divide(p: Dual, q: Dual): Dual {
  const [re, im] = quotient(p.re, p.im, q.re, q.im);
  const dRe = p.dRe - (re * q.dRe - im * q.dIm);
  const dIm = p.dIm - (re * q.dIm + im * q.dRe);
  const [quotientRe, quotientIm] = quotient(dRe, dIm, q.re, q.im);
  return normalised(re, im, quotientRe, quotientIm, p.exponent - q.exponent);
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

export const scale = (p: Dual, factor: number): Dual => multiply(p, dual(factor));

/** Whole powers by repeated squaring. */
export function integerPower(base: Dual, exponent: number): Dual {
  let result = ONE;
  let square = base;
  for (let rest = Math.abs(exponent); rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) result = multiply(result, square);
    square = multiply(square, square);
  }
  return exponent < 0 ? divide(ONE, result) : result;
}

/** Beyond it rounding of the frequency alone would turn the phase by more than about 1e-4°. */
const FARTHEST_ANGLE = 1e10;

/** An angle in radians that a rounded frequency still tells; NaN beyond, so that there is no value and not any value. */
export const toldAngle = (angle: number): number => (Math.abs(angle) <= FARTHEST_ANGLE ? angle : Number.NaN);

/**
 * `e^(re + j·im)` of plain numbers with derivatives by ln ω: an attenuation in nepers and an angle in radians. However
 * far down, it is no null, but for an infinite attenuation.
 */
export function exponential(re: number, im: number, dRe: number, dIm: number): Dual {
  if (re === -Infinity) return ZERO;
  const exponent = Math.round(re / Math.LN2);
  const size = Math.exp(re - exponent * Math.LN2);
  const angle = toldAngle(im);
  const [x, y] = [size * Math.cos(angle), size * Math.sin(angle)];
  return normalised(x, y, x * dRe - y * dIm, x * dIm + y * dRe, exponent);
}

/** The derivative as a number of its own, whose own derivative is not known. */
export const derivativeOf = ({ dRe, dIm, exponent }: Dual): Dual => dual(dRe, dIm, 0, 0, exponent);

export function withDerivative({ re, im, exponent }: Dual, derivative: Dual): Dual {
  const aligned = (x: number): number => timesPowerOfTwo(x, derivative.exponent - exponent);
  return normalised(re, im, aligned(derivative.re), aligned(derivative.im), exponent);
}

export const isNull = ({ re, im }: Dual): boolean => re === 0 && im === 0;

/** Level in dB, `20·log10 |z|`; −Infinity for zero. */
export const levelDb = ({ re, im, exponent }: Dual): number =>
  20 * Math.log10(Math.hypot(re, im)) + (exponent === 0 ? 0 : 20 * Math.log10(2) * exponent);

/** As plain numbers, zero or Infinity where it is beyond a double. */
export function plain({ re, im, exponent }: Dual): { re: number; im: number } {
  return { re: timesPowerOfTwo(re, exponent), im: timesPowerOfTwo(im, exponent) };
}

/** `d(ln z)/d(ln ω)`: nepers and radians per e-fold of frequency. */
export function logDerivative({ re, im, dRe, dIm }: Dual): { re: number; im: number } {
  const [real, imaginary] = quotient(dRe, dIm, re, im);
  return { re: real, im: imaginary };
}
