import { add, type Complex, complex, divide, modulus, multiply, scale, subtract } from "../complex.ts";
import type { Polynomial } from "../rational.ts";

const MOST_PASSES = 200;

/**
 * All roots of a real polynomial (ascending coefficients), zeros at the origin first; none for a constant.
 *
 * Ehrlich–Aberth iteration from starting points on the circles of the Newton polygon, so that roots many decades
 * apart are found alike. Source: D. A. Bini, Numerical computation of polynomial zeros by means of Aberth's method,
 * Numerical Algorithms 13 (1996).
 */
export function polynomialRoots(p: Polynomial): readonly Complex[] {
  const first = p.findIndex((c) => c !== 0);
  const last = p.findLastIndex((c) => c !== 0);
  if (last <= 0) return [];
  const atOrigin = Array.from({ length: first }, () => complex(0));
  return [...atOrigin, ...aberth(p.slice(first, last + 1))];
}

function aberth(p: Polynomial): readonly Complex[] {
  const roots = startingPoints(p);
  const settled = roots.map(() => false);
  for (let pass = 0; pass < MOST_PASSES && settled.includes(false); pass++) {
    for (let k = 0; k < roots.length; k++) {
      if (settled[k]) continue;
      const newton = newtonStep(p, roots[k]);
      const step = repelled(newton.step, roots, k);
      roots[k] = subtract(roots[k], step);
      settled[k] = newton.isRounding || modulus(step) <= 2 * Number.EPSILON * modulus(roots[k]);
    }
  }
  return roots.map(onAxis);
}

/** A root whose imaginary part is only rounding is real. */
function onAxis(root: Complex): Complex {
  return Math.abs(root.im) <= 1e-13 * Math.abs(root.re) ? complex(root.re) : root;
}

/** Newton's step, kept from running into the other roots. */
function repelled(newton: Complex, roots: readonly Complex[], k: number): Complex {
  if (newton.re === 0 && newton.im === 0) return newton;
  let repulsion = complex(0);
  for (let j = 0; j < roots.length; j++) {
    const apart = subtract(roots[k], roots[j]);
    if (j !== k && (apart.re !== 0 || apart.im !== 0)) repulsion = add(repulsion, divide(complex(1), apart));
  }
  return divide(newton, subtract(complex(1), multiply(newton, repulsion)));
}

interface NewtonStep {
  readonly step: Complex;
  /** The polynomial's value there is its own rounding: further steps only wander about the root. */
  readonly isRounding: boolean;
}

/** `p/p'` at z; outside the unit circle by the reversed polynomial, so that no power overflows. */
function newtonStep(p: Polynomial, z: Complex): NewtonStep {
  const degree = p.length - 1;
  if (modulus(z) <= 1) {
    const { value, slope, isRounding } = horner(p, z);
    return { step: isZero(value) ? value : divide(value, slope), isRounding };
  }
  // p(z) = zⁿ·r(1/z), so p/p' = z·r / (n·r − r'/z).
  const w = divide(complex(1), z);
  const { value, slope, isRounding } = horner([...p].reverse(), w);
  if (isZero(value)) return { step: value, isRounding };
  const step = divide(multiply(z, value), subtract(scale(value, degree), multiply(w, slope)));
  return { step, isRounding };
}

const isZero = ({ re, im }: Complex): boolean => re === 0 && im === 0;

/** Rounding of Horner's rule is below `(4n + 1)·u·Σ|p_k|·|z|^k`, u half of epsilon; same source. */
function horner(p: Polynomial, z: Complex): { value: Complex; slope: Complex; isRounding: boolean } {
  const degree = p.length - 1;
  const size = modulus(z);
  let value = complex(p[degree]);
  let slope = complex(0);
  let sum = Math.abs(p[degree]);
  for (let k = degree - 1; k >= 0; k--) {
    slope = add(multiply(slope, z), value);
    value = add(multiply(value, z), complex(p[k]));
    sum = sum * size + Math.abs(p[k]);
  }
  const isRounding = modulus(value) <= (4 * degree + 1) * (Number.EPSILON / 2) * sum;
  return { value, slope, isRounding };
}

/** As many points on each circle as the upper hull of `log |p_k|` has steps on that edge. */
function startingPoints(p: Polynomial): Complex[] {
  const points: Complex[] = [];
  const corners = upperHull(p);
  for (let edge = 0; edge + 1 < corners.length; edge++) {
    const [from, to] = [corners[edge], corners[edge + 1]];
    const count = to - from;
    const radius = Math.abs(p[from] / p[to]) ** (1 / count);
    for (let k = 0; k < count; k++) {
      const angle = (2 * Math.PI * k) / count + (2 * Math.PI * edge) / p.length + 0.7;
      points.push(complex(radius * Math.cos(angle), radius * Math.sin(angle)));
    }
  }
  return points;
}

function upperHull(p: Polynomial): number[] {
  const height = p.map((c) => Math.log(Math.abs(c)));
  const hull: number[] = [];
  for (let k = 0; k < p.length; k++) {
    if (p[k] === 0) continue;
    while (hull.length >= 2 && below(height, hull[hull.length - 2], hull[hull.length - 1], k)) hull.pop();
    hull.push(k);
  }
  return hull;
}

/** Whether the middle one of three points lies on or under the line between the outer two. */
function below(height: readonly number[], a: number, b: number, c: number): boolean {
  return (height[b] - height[a]) * (c - a) <= (height[c] - height[a]) * (b - a);
}
