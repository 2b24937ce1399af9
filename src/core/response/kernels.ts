import type { ComplexArray } from "./sample-rational.ts";
import type { BranchCoefficients, MatrixSamples } from "./samples.ts";

/**
 * The inner loops over a grid of frequencies. Real and imaginary parts lie in arrays of their own and coefficients in
 * locals: branching by frequency, or reading coefficients out of arrays, would cost half the speed.
 */

/** `sum += (real + jω·rising)·by` */
export function addRising(
  sum: ComplexArray,
  by: ComplexArray,
  omega: Float64Array,
  { real, rising }: BranchCoefficients,
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

/** `v, i = a·v + b·i, c·v + d·i` */
export function carryMatrix(v: ComplexArray, i: ComplexArray, { a, b, c, d }: MatrixSamples): void {
  const { re: vr, im: vi } = v;
  const { re: ir, im: ii } = i;
  const { re: ar, im: ai } = a;
  const { re: br, im: bi } = b;
  const { re: cr, im: ci } = c;
  const { re: dr, im: di } = d;
  const count = vr.length;
  for (let k = 0; k < count; k++) {
    const p = vr[k];
    const q = vi[k];
    const s = ir[k];
    const t = ii[k];
    vr[k] = ar[k] * p - ai[k] * q + br[k] * s - bi[k] * t;
    vi[k] = ar[k] * q + ai[k] * p + br[k] * t + bi[k] * s;
    ir[k] = cr[k] * p - ci[k] * q + dr[k] * s - di[k] * t;
    ii[k] = cr[k] * q + ci[k] * p + dr[k] * t + di[k] * s;
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

const DB_PER_DOUBLING = 20 * Math.log10(2);
const DB_PER_NEPER_OF_POWER = 10 / Math.LN10;
const DEGREES = 180 / Math.PI;

/** Gain in dB and phase in (−180, 180] of `n/v·2^exponent`, both within the range that `keepInRange` keeps. */
export function polar(
  n: ComplexArray,
  v: ComplexArray,
  exponent: Int32Array,
  gainDb: Float64Array,
  phaseDeg: Float64Array,
): void {
  const { re: nr, im: ni } = n;
  const { re: vr, im: vi } = v;
  const count = nr.length;
  for (let k = 0; k < count; k++) {
    const a = nr[k];
    const b = ni[k];
    const c = vr[k];
    const d = vi[k];
    const power = (a * a + b * b) / (c * c + d * d);
    gainDb[k] = DB_PER_NEPER_OF_POWER * Math.log(power) + DB_PER_DOUBLING * exponent[k];
    const angle = Math.atan2(b * c - a * d, a * c + b * d) * DEGREES;
    phaseDeg[k] = angle <= -180 ? 180 : angle;
  }
}
