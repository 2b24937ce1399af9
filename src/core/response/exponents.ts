import type { ComplexArray } from "./sample-rational.ts";

/**
 * Chains of many stages reach far beyond 1e308. Once numbers leave a range that is safe to multiply and to square,
 * powers of two, which cost no digit, are taken out of them and counted apart.
 */
const LARGE = 2 ** 200;
const SMALL = 2 ** -200;

/**
 * Takes powers of two out of both arrays where they have left the range, `direction` times the power into `exponent`.
 */
export function keepInRange(p: ComplexArray, q: ComplexArray, exponent: Int32Array, direction: 1 | -1): void {
  if (inRange(p, q)) return;
  const parts = p === q ? [p.re, p.im] : [p.re, p.im, q.re, q.im];
  for (let k = 0; k < exponent.length; k++) {
    const shift = powerOfTwo(Math.max(...parts.map((part) => Math.abs(part[k]))));
    if (shift === 0) continue;
    for (const part of parts) part[k] *= 2 ** -shift;
    exponent[k] += direction * shift;
  }
}

function inRange(p: ComplexArray, q: ComplexArray): boolean {
  const { re: pr, im: pi } = p;
  const { re: qr, im: qi } = q;
  const count = pr.length;
  for (let k = 0; k < count; k++) {
    const size = pr[k] * pr[k] + pi[k] * pi[k] + qr[k] * qr[k] + qi[k] * qi[k];
    if (size > LARGE * LARGE || size < SMALL * SMALL) return false;
  }
  return true;
}

/** Zero where nothing is to be taken out: within the range, at a null and where there is no number. */
const powerOfTwo = (size: number): number =>
  (size > LARGE || size < SMALL) && size > 0 && size < Infinity
    ? Math.max(-1000, Math.min(1000, Math.round(Math.log2(size))))
    : 0;
