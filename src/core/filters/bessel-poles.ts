import {
  add,
  type Complex,
  complex,
  divide,
  logarithm,
  modulus,
  multiply,
  scale,
  subtract,
} from "../complex.ts";

/**
 * Zeros of the reverse Bessel polynomial θn, in rad/s for a delay of 1 s: one of each pair (upper half plane, highest Q
 * first), a real one last.
 *
 * Near its zeros θn is a small difference of large terms, however it is summed. But with z = −s in the right half plane,
 * `e^z·θn(−z) / (2·z^(n+1)) = i_n(z) + (−1)^n·k_n(z)/2`, modified spherical Bessel functions that are each computed without
 * cancellation, so the zeros solve `ln(i_n/k_n) = −ln 2 + jπ·m` with m = n − 1, n − 3 …, one zero for each m ≥ 0.
 * The left side is a smooth, nearly straight map with derivative `k_(n+1)/k_n + i_(n+1)/i_n`; Newton's rule settles it.
 * Source: Abramowitz and Stegun 10.2 (recurrences, and the Wronskian `i_n·k_(n+1) + i_(n+1)·k_n = 1/z²`).
 */
export function besselPoles(order: number): readonly Complex[] {
  return Array.from({ length: Math.ceil(order / 2) }, (_, index) => pole(order, order - 1 - 2 * index));
}

function pole(order: number, turn: number): Complex {
  const target = complex(-Math.LN2, Math.PI * turn);
  let z = startingPoint(order, turn / order);
  for (let pass = 0; pass < 50; pass += 1) {
    const { logRatio, slope } = growth(order, z);
    const step = divide(subtract(logRatio, target), slope);
    z = subtract(z, step);
    if (modulus(step) < 1e-15 * modulus(z)) break;
  }
  return complex(-z.re, turn === 0 ? 0 : z.im);
}

/** A bowed row, evenly spaced in imaginary part, near where the mirrored zeros lie at every order. */
const startingPoint = (order: number, height: number): Complex =>
  complex(0.66 * (order + 0.6) * (1 - 0.42 * height * height), 0.876 * order * height);

/** `ln(i_n/k_n)` at z, continuous along the row of zeros, and its derivative. */
function growth(order: number, z: Complex): { readonly logRatio: Complex; readonly slope: Complex } {
  const square = multiply(z, z);
  // θm/θ(m−1), and the sum of ln(z·θ(m−1)/θm): factors of (z^n/θn), each with a small angle.
  let thetaRatio = add(z, complex(1));
  let logSum = complex(0);
  for (let m = 1; m <= order; m += 1) {
    logSum = add(logSum, logarithm(divide(z, thetaRatio)));
    thetaRatio = add(complex(2 * m + 1), divide(square, thetaRatio));
  }
  const slope = add(divide(thetaRatio, z), risingRatio(order, z));
  const logRatio = subtract(add(scale(z, 2), scale(logSum, 2)), logarithm(slope));
  return { logRatio, slope };
}

/** `i_(n+1)/i_n` by its continued fraction from far above, where the start no longer matters. */
function risingRatio(order: number, z: Complex): Complex {
  let ratio = complex(0);
  for (let m = 2 * order + 60; m >= order; m -= 1) {
    ratio = divide(complex(1), add(divide(complex(2 * m + 3), z), ratio));
  }
  return ratio;
}
