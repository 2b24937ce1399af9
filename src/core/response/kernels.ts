import type { BranchCoefficients, ComplexArray } from "./samples.ts";

/**
 * The inner loops over a grid of frequencies. Real and imaginary parts lie in arrays of their own and coefficients in
 * locals: branching by frequency, or reading coefficients out of arrays, would cost half the speed.
 */

/** `sum += (real + jω·rising)·by` */
export function addRising(
  sum: ComplexArray,
  by: ComplexArray,
  omega: Float64Array,
  real: number,
  rising: number,
): void {
  const { re: sr, im: si } = sum;
  const { re: br, im: bi } = by;
  const count = omega.length;
  for (let k = 0; k < count; k++) {
    const x = omega[k] * rising;
    const c = br[k];
    const d = bi[k];
    sr[k] += real * c - x * d;
    si[k] += real * d + x * c;
  }
}

/** `sum += (real + j(ω·rising − falling/ω))·by` */
export function addResonant(
  sum: ComplexArray,
  by: ComplexArray,
  omega: Float64Array,
  inverseOmega: Float64Array,
  { real, rising, falling }: BranchCoefficients,
): void {
  const { re: sr, im: si } = sum;
  const { re: br, im: bi } = by;
  const count = omega.length;
  for (let k = 0; k < count; k++) {
    const x = omega[k] * rising - inverseOmega[k] * falling;
    const c = br[k];
    const d = bi[k];
    sr[k] += real * c - x * d;
    si[k] += real * d + x * c;
  }
}

/** `sum += by / (real + j(ω·rising − falling/ω))` */
export function addInverse(
  sum: ComplexArray,
  by: ComplexArray,
  omega: Float64Array,
  inverseOmega: Float64Array,
  { real, rising, falling }: BranchCoefficients,
): void {
  const { re: sr, im: si } = sum;
  const { re: br, im: bi } = by;
  const count = omega.length;
  const square = real * real;
  for (let k = 0; k < count; k++) {
    const x = omega[k] * rising - inverseOmega[k] * falling;
    const size = 1 / (square + x * x);
    const g = real * size;
    const b = x * size;
    const c = br[k];
    const d = bi[k];
    sr[k] += g * c + b * d;
    si[k] += g * d - b * c;
  }
}

/** `sum += p·q` */
export function addProduct(sum: ComplexArray, p: ComplexArray, q: ComplexArray): void {
  const { re: sr, im: si } = sum;
  const { re: pr, im: pi } = p;
  const { re: qr, im: qi } = q;
  const count = sr.length;
  for (let k = 0; k < count; k++) {
    const a = pr[k];
    const b = pi[k];
    const c = qr[k];
    const d = qi[k];
    sr[k] += a * c - b * d;
    si[k] += a * d + b * c;
  }
}

/** `product *= factor` */
export function multiplyBy(product: ComplexArray, factor: ComplexArray): void {
  const { re, im } = product;
  const { re: fr, im: fi } = factor;
  const count = re.length;
  for (let k = 0; k < count; k++) {
    const a = re[k];
    const b = im[k];
    const c = fr[k];
    const d = fi[k];
    re[k] = a * c - b * d;
    im[k] = a * d + b * c;
  }
}

/** `quotient /= divisor` */
export function divideBy(quotient: ComplexArray, divisor: ComplexArray): void {
  const { re, im } = quotient;
  const { re: dr, im: di } = divisor;
  const count = re.length;
  for (let k = 0; k < count; k++) {
    const a = re[k];
    const b = im[k];
    const c = dr[k];
    const d = di[k];
    const size = 1 / (c * c + d * d);
    re[k] = (a * c + b * d) * size;
    im[k] = (b * c - a * d) * size;
  }
}

/** Whether every value lies between the bounds in size (squared sum), zero excepted. */
export function inRange(p: ComplexArray, q: ComplexArray, low: number, high: number): boolean {
  const { re: pr, im: pi } = p;
  const { re: qr, im: qi } = q;
  const count = pr.length;
  let least = Infinity;
  let most = 0;
  for (let k = 0; k < count; k++) {
    const size = pr[k] * pr[k] + pi[k] * pi[k] + qr[k] * qr[k] + qi[k] * qi[k];
    least = Math.min(least, size);
    most = Math.max(most, size);
  }
  return least >= low && most <= high;
}

const DB_PER_DOUBLING = 20 * Math.log10(2);
const DB_PER_NEPER_OF_POWER = 10 / Math.LN10;
const DEGREES = 180 / Math.PI;

/** Gain in dB and phase in (−180, 180] of `(re + j·im)·2^exponent`. */
export function polar(
  { re, im }: ComplexArray,
  exponent: Int32Array,
  gainDb: Float64Array,
  phaseDeg: Float64Array,
): void {
  const count = re.length;
  for (let k = 0; k < count; k++) {
    const a = re[k];
    const b = im[k];
    gainDb[k] = DB_PER_NEPER_OF_POWER * Math.log(a * a + b * b) + DB_PER_DOUBLING * exponent[k];
    const angle = Math.atan2(b, a) * DEGREES;
    phaseDeg[k] = angle <= -180 ? 180 : angle;
  }
}
