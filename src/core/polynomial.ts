import type { Polynomial } from "./rational.ts";

/** Arithmetic of real polynomials, coefficients in ascending powers. */

export function multiply(p: Polynomial, q: Polynomial): number[] {
  const product = new Array<number>(p.length + q.length - 1).fill(0);
  p.forEach((pi, i) => {
    q.forEach((qj, j) => {
      product[i + j] += pi * qj;
    });
  });
  return product;
}

export function add(...terms: readonly Polynomial[]): number[] {
  const sum = new Array<number>(Math.max(1, ...terms.map((term) => term.length))).fill(0);
  for (const term of terms) {
    term.forEach((coefficient, power) => {
      sum[power] += coefficient;
    });
  }
  return sum;
}

export function scale(p: Polynomial, factor: number): number[] {
  return p.map((coefficient) => coefficient * factor);
}

/** The same function of another variable: `p(factor · x)`. */
export function stretch(p: Polynomial, factor: number): number[] {
  let power = 1;
  return p.map((coefficient) => {
    const stretched = coefficient * power;
    power *= factor;
    return stretched;
  });
}
