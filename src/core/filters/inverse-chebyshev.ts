import { complex, divide } from "../complex.ts";
import { chebyshevPoles, inverseChebyshevPolynomial } from "./chebyshev.ts";
import { excessPower, type Prototype, type PrototypeSection, pairAngles } from "./sections.ts";

/**
 * Inverse Chebyshev: `|H|² = 1 / (1 + h²/Tn²(X/x))`, h² = 10^(stop/10) − 1, with the stop edge X chosen so that half power
 * is at x = 1. Poles are X over the poles of a Chebyshev filter with ε = 1/h, zeros X over those of Tn.
 * Source: Zverev, Handbook of Filter Synthesis (1967); the scale follows from `Tn(X) = h`.
 */
export function inverseChebyshev(order: number, stopDb: number): Prototype {
  const edge = inverseChebyshevStopEdge(order, stopDb);
  const poles = chebyshevPoles(order, Math.sqrt(excessPower(stopDb)));
  const angles = pairAngles(order);
  const sections = poles.map((mirrored, index): PrototypeSection => {
    if (mirrored.im === 0) return { pole: complex(edge / mirrored.re) };
    const lower = divide(complex(edge), mirrored);
    return { pole: complex(lower.re, -lower.im), zero: edge / angles[index].cos };
  });
  return { sections, dcGain: 1 };
}

/**
 * Where the loss first reaches `stopDb`, over the half-power corner: `cosh(acosh(h)/n)`, h = √(10^(stop/10) − 1).
 * Below 1 when the stop-band loss is less than half power.
 */
export function inverseChebyshevStopEdge(order: number, stopDb: number): number {
  return inverseChebyshevPolynomial(order, Math.sqrt(excessPower(stopDb)));
}
