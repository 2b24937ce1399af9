import { add, type Complex, complex, divide, multiply, subtract } from "../complex.ts";

/** A response that starts at t = 0, by sums of exponentials. */
export interface StepTerms {
  /** Where it ends. */
  readonly final: number;
  readonly terms: readonly { readonly pole: Complex; readonly amplitude: Complex }[];
}

/**
 * Unit step response of a low-pass with these zeros and simple poles (rad/s), gain one at 0 Hz times `dcGain`:
 * `y(t) = H(0) + Σ r_k/p_k·e^(p_k·t)`, r_k the residue of H at p_k. Source: Heaviside's expansion theorem.
 */
export function stepTerms(zeros: readonly Complex[], poles: readonly Complex[], dcGain: number): StepTerms {
  const terms = poles.map((pole, k) => {
    // H(s) = dcGain·Π(1 − s/z)/Π(1 − s/p): with the factor (1 − s/p_k) taken out, r_k/p_k is minus the rest at p_k.
    const above = zeros.reduce((product, zero) => multiply(product, oneLess(pole, zero)), complex(-dcGain));
    const amplitude = poles.reduce(
      (quotient, other, j) => (j === k ? quotient : divide(quotient, oneLess(pole, other))),
      above,
    );
    return { pole, amplitude };
  });
  return { final: dcGain, terms };
}

const oneLess = (s: Complex, root: Complex): Complex => subtract(complex(1), divide(s, root));

export function stepAt({ final, terms }: StepTerms, timeS: number): number {
  let sum = complex(final);
  for (const { pole, amplitude } of terms) {
    const size = Math.exp(pole.re * timeS);
    const angle = pole.im * timeS;
    sum = add(sum, multiply(amplitude, complex(size * Math.cos(angle), size * Math.sin(angle))));
  }
  return sum.re;
}
