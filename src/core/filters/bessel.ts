import { scale } from "../complex.ts";
import { besselPoles } from "./bessel-poles.ts";
import type { Prototype } from "./sections.ts";

/**
 * Bessel: maximally flat delay, `H = θn(0) / θn(s·ω½)` with the reverse Bessel polynomial θn; half power at x = 1.
 * Source: W. E. Thomson, Delay networks having maximally flat frequency characteristics (1949).
 */
export function bessel(order: number): Prototype {
  const factor = 1 / besselHalfPower(order);
  return { sections: besselPoles(order).map((pole) => ({ pole: scale(pole, factor) })), dcGain: 1 };
}

/** Half-power frequency in rad/s of the Bessel filter of 1 s delay at DC: Newton on the logarithm of the loss. */
export function besselHalfPower(order: number): number {
  let logOmega = Math.log((2 * order - 1) * Math.LN2) / 2;
  for (let pass = 0; pass < 50; pass += 1) {
    const { loss, slope } = besselLoss(order, Math.exp(logOmega));
    const step = (Math.log(loss) - Math.LN2) / (slope / loss);
    logOmega -= step;
    if (Math.abs(step) < 1e-16) break;
  }
  return Math.exp(logOmega);
}

/** `|θn(jω)/θn(0)|²` as powers of ω², and its derivative to ln ω. */
function besselLoss(order: number, omega: number): { readonly loss: number; readonly slope: number } {
  const coefficients = besselLossCoefficients(order);
  let loss = 0;
  let slope = 0;
  for (let k = order; k >= 0; k -= 1) {
    loss += coefficients[k] * omega ** (2 * k);
    slope += 2 * k * coefficients[k] * omega ** (2 * k);
  }
  return { loss, slope };
}

/**
 * Coefficients of `|θn(jω)/θn(0)|²` in ascending powers of ω², all positive:
 * `c0 = 1`, `ck = c(k−1) · 2(n − k + 1) / (k·(2n − k + 1)·(2n − 2k + 1))`.
 * Source: Abramowitz and Stegun 10.1.27, the squared modulus of spherical Bessel functions.
 */
export function besselLossCoefficients(order: number): readonly number[] {
  const coefficients = [1];
  for (let k = 1; k <= order; k += 1) {
    const ratio = (2 * (order - k + 1)) / (k * (2 * order - k + 1) * (2 * order - 2 * k + 1));
    coefficients.push(coefficients[k - 1] * ratio);
  }
  return coefficients;
}
