import { add, type Complex, complex, modulus, multiply, squareRoot } from "../complex.ts";

/** A conjugate pair by its modulus, over the band's centre, and 1/Q. */
export interface RootPair {
  readonly radius: number;
  readonly inverseQ: number;
}

/**
 * The two upper roots that the band transform makes of one complex root: `s² − 2u·s + 1 = 0`, s over the centre, with
 * `u = root·width/2` (band-pass) or `width/(2·root)` (band-stop), width = (high − low)/centre, Re u < 0.
 *
 * The larger root is `u + r`, r = √((u − 1)(u + 1)) taken on u's side, where both components add without cancellation; the
 * other is its reciprocal: same Q, mirrored at the centre. Exact for the narrowest and the widest bands alike.
 */
export function splitPair(u: Complex): { readonly above: RootPair; readonly below: RootPair } {
  const root = squareRoot(multiply(add(u, complex(-1)), add(u, complex(1))));
  const sided = complex(Math.sign(u.re) * root.re, Math.sign(u.re) * root.im);
  const large = add(u, sided);
  const radius = modulus(large);
  const inverseQ = (-2 * large.re) / radius;
  return { above: { radius, inverseQ }, below: { radius: 1 / radius, inverseQ } };
}

/** The same for a pair of roots on the axis: `±j·t` becomes `±j·above` and `±j·below`, t = u/j > 0, over the centre. */
export function splitAxisPair(t: number): { readonly above: number; readonly below: number } {
  const above = t + Math.hypot(t, 1);
  return { above, below: 1 / above };
}
