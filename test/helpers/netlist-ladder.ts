/**
 * Element values of doubly terminated LC ladders, worked out apart from the program, in ohm, henry and farad.
 *
 * Butterworth: g_k = 2·sin((2k − 1)π/2n). Chebyshev: the recursion over a_k, b_k with β = ln coth(ripple/17.37),
 * γ = sinh(β/2n); g_(n+1) = coth²(β/4) for even n, else 1.
 * Source: G. L. Matthaei, L. Young, E. M. T. Jones, Microwave Filters, Impedance-Matching Networks, and Coupling
 * Structures, section 4.05 (from memory; test/core/nodal.test.ts holds them against |S21|² = 1/(1 + ε²·T_n²)).
 */
export interface LadderParts {
  readonly shape: "lowpass" | "highpass";
  readonly family: "butterworth" | "chebyshev";
  readonly order: number;
  readonly corner: number;
  readonly Z0: number;
  readonly first: "L" | "C";
  readonly ripple?: number;
  readonly QL?: number;
}

export interface LadderBranch {
  readonly place: "series" | "shunt";
  readonly part: { readonly henry: number; readonly lossOhm: number } | { readonly farad: number };
}

/** Branches from source to load. */
export function ladderBranches(parts: LadderParts): LadderBranch[] {
  return prototype(parts).g.map((g, index) => branchOf(parts, g, index));
}

/** g_1 to g_n, and the load g_(n+1). */
export function prototype(parts: Pick<LadderParts, "family" | "order" | "ripple">): {
  g: number[];
  load: number;
} {
  if (parts.family === "butterworth") return { g: butterworth(parts.order), load: 1 };
  if (parts.ripple === undefined) throw new Error("a Chebyshev ladder needs its ripple");
  return chebyshev(parts.order, parts.ripple);
}

function butterworth(order: number): number[] {
  return Array.from({ length: order }, (_, index) => 2 * Math.sin(((2 * index + 1) * Math.PI) / (2 * order)));
}

function chebyshev(order: number, rippleDb: number): { g: number[]; load: number } {
  const beta = -Math.log(Math.tanh((rippleDb * Math.LN10) / 40));
  const gamma = Math.sinh(beta / (2 * order));
  const a = (k: number) => Math.sin(((2 * k - 1) * Math.PI) / (2 * order));
  const b = (k: number) => gamma ** 2 + Math.sin((k * Math.PI) / order) ** 2;
  const g = [(2 * a(1)) / gamma];
  for (let k = 2; k <= order; k++) g.push((4 * a(k - 1) * a(k)) / (b(k - 1) * g[k - 2]));
  return { g, load: order % 2 === 0 ? Math.tanh(beta / 4) ** -2 : 1 };
}

/** In a low-pass the series branches are inductors, in a high-pass the shunt ones. */
function branchOf(parts: LadderParts, g: number, index: number): LadderBranch {
  const place = (parts.first === "L") === (index % 2 === 0) ? "series" : "shunt";
  const omega = 2 * Math.PI * parts.corner;
  const low = parts.shape === "lowpass";
  const reactance = low ? g : 1 / g;
  if (low !== (place === "series")) return { place, part: { farad: reactance / (omega * parts.Z0) } };
  const henry = (reactance * parts.Z0) / omega;
  return { place, part: { henry, lossOhm: parts.QL === undefined ? 0 : (omega * henry) / parts.QL } };
}
