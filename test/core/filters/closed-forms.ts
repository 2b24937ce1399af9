import type { PrototypeSpec } from "../../../src/core/filters/spec.ts";

/**
 * Loss 1/|H|² over x by each family's own formula, without any roots; greatest gain one. Elliptic has none that is simple;
 * its tests use the equal ripple and the reciprocal symmetry of the rational function instead.
 */
export function closedFormLoss({ family, order, rippleDb, stopDb }: PrototypeSpec, x: number): number {
  switch (family) {
    case "butterworth":
      return 1 + x ** (2 * order);
    case "chebyshev":
      return 1 + excess(rippleDb!) * chebyshevPolynomial(order, x) ** 2;
    case "inverse-chebyshev": {
      const height = Math.sqrt(excess(stopDb!));
      // Tn(edge) = height; below half power of stop-band loss that lies within Tn's own ripple.
      const edge = height > 1 ? Math.cosh(Math.acosh(height) / order) : Math.cos(Math.acos(height) / order);
      return 1 + (height / chebyshevPolynomial(order, edge / x)) ** 2;
    }
    case "bessel":
      return besselLoss(order, x * besselHalfPowerByBisection(order));
    case "elliptic":
      throw new Error("no simple closed form");
  }
}

/** `10^(dB/10) − 1`. */
export const excess = (lossDb: number): number => Math.expm1((lossDb * Math.LN10) / 10);

/** |Tn(x)|, x ≥ 0. For odd n through the sine, which keeps its digits near the zero at x = 0. */
export function chebyshevPolynomial(order: number, x: number): number {
  if (x > 1) return Math.cosh(order * Math.acosh(x));
  return Math.abs(order % 2 === 1 ? Math.sin(order * Math.asin(x)) : Math.cos(order * Math.acos(x)));
}

/** Coefficients of θn, ascending: `(2n − k)! / (2^(n−k)·k!·(n − k)!)`, whole numbers. Thomson (1949). */
export function reverseBesselCoefficients(order: number): readonly bigint[] {
  return Array.from({ length: order + 1 }, (_, k) => {
    const below = 2n ** BigInt(order - k) * factorial(k) * factorial(order - k);
    return factorial(2 * order - k) / below;
  });
}

function factorial(n: number): bigint {
  return n < 2 ? 1n : BigInt(n) * factorial(n - 1);
}

/** |θn(jω)/θn(0)|²: θn(s)·θn(−s) multiplied out in whole numbers, then summed (every power of ω² counts positive). */
export function besselLoss(order: number, omega: number): number {
  return powersOf(order).reduce((sum, coefficient, power) => sum + coefficient * omega ** (2 * power), 0);
}

const powerTable = new Map<number, readonly number[]>();

function powersOf(order: number): readonly number[] {
  const known = powerTable.get(order);
  if (known) return known;
  const theta = reverseBesselCoefficients(order);
  const powers = Array.from({ length: order + 1 }, (_, half) => {
    let sum = 0n;
    for (let i = 0; i <= order; i += 1) {
      const j = 2 * half - i;
      if (j < 0 || j > order) continue;
      sum += (j % 2 === 0 ? 1n : -1n) * theta[i] * theta[j];
    }
    return Number(half % 2 === 0 ? sum : -sum) / Number(theta[0]) ** 2;
  });
  powerTable.set(order, powers);
  return powers;
}

export function besselHalfPowerByBisection(order: number): number {
  let low = 0;
  let high = 2 * order;
  for (let halving = 0; halving < 80; halving += 1) {
    const middle = (low + high) / 2;
    if (besselLoss(order, middle) < 2) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
