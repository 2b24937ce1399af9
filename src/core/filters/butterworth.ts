import { complex } from "../complex.ts";
import { type Prototype, type PrototypeSection, pairAngles } from "./sections.ts";

/**
 * Butterworth: `|H|² = 1 / (1 + x^2n)`, half power at x = 1, poles on the unit circle.
 * Source: S. Butterworth, On the theory of filter amplifiers (1930).
 */
export function butterworth(order: number): Prototype {
  const pairs: PrototypeSection[] = pairAngles(order).map(({ sin, cos }) => ({ pole: complex(-sin, cos) }));
  const single: PrototypeSection[] = order % 2 === 1 ? [{ pole: complex(-1) }] : [];
  return { sections: [...pairs, ...single], dcGain: 1 };
}
