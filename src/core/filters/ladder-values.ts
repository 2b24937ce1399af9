import { fail, ok, type Result } from "../result.ts";
import { besselLadder } from "./ladder-bessel.ts";
import { checkPrototype, type FilterProblem, type PrototypeSpec } from "./spec.ts";

/**
 * A low-pass LC ladder for a source of 1 Ω and its corner at 1 rad/s: `g[0] … g[n−1]` in henry and farad by turns.
 * `load` is g(n+1): after a first shunt capacitor a resistance for odd n and a conductance for even n, after a first
 * series inductor the other way round. It differs from 1 only for Chebyshev of even order.
 */
export interface LadderValues {
  readonly g: readonly number[];
  readonly load: number;
}

export interface LadderProblem {
  readonly part: FilterProblem["part"] | "family";
  readonly found: string;
  readonly allowed: string;
}

/** Element values of a ladder between resistances: Butterworth, Chebyshev and Bessel. */
export function ladderValues(spec: PrototypeSpec): Result<LadderValues, LadderProblem> {
  const checked = checkPrototype(spec);
  if (!checked.ok) return checked;
  switch (spec.family) {
    case "butterworth":
      return ok(butterworthLadder(spec.order));
    case "chebyshev":
      return ok(chebyshevLadder(spec.order, spec.rippleDb!));
    case "bessel":
      return ok({ g: besselLadder(spec.order), load: 1 });
    default:
      return fail({
        part: "family",
        found: `"${spec.family}", whose nulls need resonant branches`,
        allowed: "butterworth, chebyshev or bessel",
      });
  }
}

/** `gk = 2·sin((2k − 1)π/2n)`. Source: Matthaei, Young and Jones, Microwave Filters (1964), §4.05. */
function butterworthLadder(order: number): LadderValues {
  const g = Array.from(
    { length: order },
    (_, index) => 2 * Math.sin((Math.PI * (2 * index + 1)) / (2 * order)),
  );
  return { g, load: 1 };
}

/**
 * `g1 = 2·a1/γ`, `gk = 4·a(k−1)·ak / (b(k−1)·g(k−1))`, with `ak = sin((2k − 1)π/2n)`, `bk = γ² + sin²(kπ/n)`,
 * `γ = sinh(β/2n)`, `β = ln coth(ripple·ln 10/40)`; load `coth²(β/4)` for even n.
 * Source: Matthaei, Young and Jones, Microwave Filters (1964), §4.05.
 */
function chebyshevLadder(order: number, rippleDb: number): LadderValues {
  const beta = -Math.log(Math.tanh((rippleDb * Math.LN10) / 40));
  const gamma = Math.sinh(beta / (2 * order));
  const a = (k: number): number => Math.sin((Math.PI * (2 * k - 1)) / (2 * order));
  const b = (k: number): number => gamma * gamma + Math.sin((Math.PI * k) / order) ** 2;
  const g = [(2 * a(1)) / gamma];
  for (let k = 2; k <= order; k += 1) g.push((4 * a(k - 1) * a(k)) / (b(k - 1) * g[k - 2]));
  return { g, load: order % 2 === 0 ? 1 / Math.tanh(beta / 4) ** 2 : 1 };
}
