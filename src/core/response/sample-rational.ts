import type { Polynomial, Rational } from "../rational.ts";

/** Complex values over a grid of frequencies, real and imaginary parts apart. */
export interface ComplexArray {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export function empty(length: number): ComplexArray {
  return { re: new Float64Array(length), im: new Float64Array(length) };
}

export function constant(value: number, length: number): ComplexArray {
  return { re: new Float64Array(length).fill(value), im: new Float64Array(length) };
}

/** `num/den` over the grid. */
export function sampleRational({ num, den, omega0 }: Rational, omega: Float64Array): ComplexArray {
  if (den.length === 1) return samplePolynomial(num, omega0, omega, 1 / den[0]);
  const out = samplePolynomial(num, omega0, omega);
  divideBy(out, samplePolynomial(den, omega0, omega));
  return out;
}

/** `quotient /= divisor` */
function divideBy(quotient: ComplexArray, divisor: ComplexArray): void {
  const { re, im } = quotient;
  const { re: dr, im: di } = divisor;
  for (let k = 0; k < re.length; k++) {
    const a = re[k];
    const b = im[k];
    const c = dr[k];
    const d = di[k];
    const size = 1 / (c * c + d * d);
    re[k] = (a * c + b * d) * size;
    im[k] = (b * c - a * d) * size;
  }
}

/** A polynomial of `jω/omega0`, times a factor, over the grid: even powers are real, odd ones imaginary. */
export function samplePolynomial(
  p: Polynomial,
  omega0: number,
  omega: Float64Array,
  factor = 1,
): ComplexArray {
  if (p.length === 1) return constant(p[0] * factor, omega.length);
  const { re, im } = empty(omega.length);
  const even = signed(p, 0, factor);
  const odd = signed(p, 1, factor);
  const inverse = 1 / omega0;
  const count = omega.length;
  for (let k = 0; k < count; k++) {
    const x = omega[k] * inverse;
    const xx = x * x;
    let real = 0;
    for (let j = even.length - 1; j >= 0; j--) real = real * xx + even[j];
    let imaginary = 0;
    for (let j = odd.length - 1; j >= 0; j--) imaginary = imaginary * xx + odd[j];
    re[k] = real;
    im[k] = imaginary * x;
  }
  return { re, im };
}

/** Every second coefficient with the sign that `j^k` gives it. */
function signed(p: Polynomial, parity: 0 | 1, factor: number): number[] {
  return p
    .filter((_, power) => power % 2 === parity)
    .map((coefficient, k) => coefficient * factor * (k % 2 === 0 ? 1 : -1));
}
