import { type Polynomial, type Rational, rational } from "../rational.ts";

/** A branch of any of R (ohm), L (henry), C (farad); an absent part is not there at all. */
export interface Branch {
  readonly R?: number | undefined;
  readonly L?: number | undefined;
  readonly C?: number | undefined;
  readonly joined: "series" | "parallel";
}

/**
 * Impedance of a branch as a rational function of s, written without a single division by a part, so that R = 0 is
 * a short in parallel and nothing in series.
 *
 *   series    R + sL + 1/(sC)            parallel  1 / (1/R + 1/(sL) + sC)
 *
 * Source: Kirchhoff's laws. A branch with no part is a short when joined in series, open when joined in parallel;
 * callers rule the second out.
 */
export function branchImpedance(branch: Branch): Rational {
  const { R, L, C } = branch;
  return branch.joined === "series" ? seriesImpedance(R ?? 0, L ?? 0, C) : parallelImpedance(R, L, C ?? 0);
}

function seriesImpedance(R: number, L: number, C: number | undefined): Rational {
  if (C === undefined) return rational(trim([R, L]), [1]);
  return rational(trim([1, R * C, L * C]), [0, C]);
}

function parallelImpedance(R: number | undefined, L: number | undefined, C: number): Rational {
  if (R !== undefined && L !== undefined) return rational([0, L * R], trim([R, L, L * C * R]));
  if (R !== undefined) return rational([R], trim([1, R * C]));
  if (L !== undefined) return rational([0, L], trim([1, 0, L * C]));
  return rational([1], trim([0, C]));
}

/** Drops vanishing highest coefficients; a polynomial keeps at least one. */
export function trim(coefficients: readonly number[]): Polynomial {
  let length = coefficients.length;
  while (length > 1 && coefficients[length - 1] === 0) length--;
  return coefficients.slice(0, length);
}
