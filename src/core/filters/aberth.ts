import { add, type Complex, complex, conjugate, divide, modulus, multiply, subtract } from "../complex.ts";

/**
 * All zeros of a real polynomial at once, by Aberth's iteration: one of each conjugate pair, and the real ones. A starting
 * point on the real axis stays there, one off it stands for a pair.
 *
 * `newtonStep(z)` is the polynomial over its derivative. Stops when no zero moves by more than a few roundings.
 * Source: O. Aberth, Iteration methods for finding all zeros of a polynomial simultaneously (1973).
 */
export function conjugateZeros(
  start: readonly Complex[],
  newtonStep: (z: Complex) => Complex,
): readonly Complex[] {
  let zeros = start;
  for (let pass = 0; pass < 100; pass += 1) {
    const moved = zeros.map((_, index) => step(zeros, index, newtonStep));
    const largest = Math.max(
      ...moved.map((zero, index) => modulus(subtract(zero, zeros[index])) / modulus(zero)),
    );
    zeros = moved;
    if (largest < 1e-15) break;
  }
  return zeros;
}

function step(zeros: readonly Complex[], index: number, newtonStep: (z: Complex) => Complex): Complex {
  const here = zeros[index];
  const newton = newtonStep(here);
  const moved = subtract(
    here,
    divide(newton, subtract(complex(1), multiply(newton, repulsion(zeros, index)))),
  );
  return here.im === 0 ? complex(moved.re) : moved;
}

/** Sum of `1 / (here − other)` over all other zeros, the conjugates included. */
function repulsion(zeros: readonly Complex[], index: number): Complex {
  const here = zeros[index];
  let sum = complex(0);
  zeros.forEach((zero, other) => {
    if (other !== index) sum = add(sum, divide(complex(1), subtract(here, zero)));
    if (zero.im !== 0) sum = add(sum, divide(complex(1), subtract(here, conjugate(zero))));
  });
  return sum;
}
