import { type Complex, complex } from "../complex.ts";
import { excessPower, type Prototype, type PrototypeSection, pairAngles } from "./sections.ts";

/**
 * Chebyshev: `|H|² = 1 / (1 + ε²·Tn²(x))`, ε² = 10^(ripple/10) − 1; ripple edge at x = 1, gain at DC −ripple for even n.
 * Source: Matthaei, Young and Jones, Microwave Filters (1964), ch. 4.
 */
export function chebyshev(order: number, rippleDb: number): Prototype {
  const sections: PrototypeSection[] = chebyshevPoles(order, 1 / Math.sqrt(excessPower(rippleDb))).map(
    (pole) => ({ pole }),
  );
  return { sections, dcGain: order % 2 === 0 ? 10 ** (-rippleDb / 20) : 1 };
}

/**
 * Left-half-plane solutions of `Tn(−j·s) = ±j·height`, one of each pair, highest Q first, a real one last:
 * `−sinh(a)·sin θ + j·cosh(a)·cos θ` with `a = asinh(height) / n`.
 */
export function chebyshevPoles(order: number, height: number): readonly Complex[] {
  const a = Math.asinh(height) / order;
  const pairs = pairAngles(order).map(({ sin, cos }) => complex(-Math.sinh(a) * sin, Math.cosh(a) * cos));
  return order % 2 === 1 ? [...pairs, complex(-Math.sinh(a))] : pairs;
}

/** The greatest x with `Tn(x) = value`, for value ≥ 0. */
export function inverseChebyshevPolynomial(order: number, value: number): number {
  return value >= 1 ? Math.cosh(Math.acosh(value) / order) : Math.cos(Math.acos(value) / order);
}
