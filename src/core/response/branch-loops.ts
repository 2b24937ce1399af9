import type { BranchCoefficients } from "./samples.ts";
import { WORKING, type Working } from "./working.ts";

/**
 * Branches of R, L and C, the innermost loops of all: what is asked is asked outside them, coefficients lie in
 * locals, and the division is under way while the products are made.
 * The two functions are alike but for V and I changing places; see `working.ts` for why they are not one.
 */
function branchLoops({ omega, inverseOmega, vRe, vIm, iRe, iIm }: Working) {
  /** `V += Z·I` over the first `count` frequencies. */
  function addSeries(count: number, { inverted, real, rising, falling }: BranchCoefficients): void {
    if (inverted) {
      const square = real * real;
      for (let k = 0; k < count; k++) {
        const x = omega[k] * rising - inverseOmega[k] * falling;
        const over = 1 / (square + x * x);
        vRe[k] += (real * iRe[k] + x * iIm[k]) * over;
        vIm[k] += (real * iIm[k] - x * iRe[k]) * over;
      }
    } else if (falling === 0) {
      for (let k = 0; k < count; k++) {
        const x = omega[k] * rising;
        vRe[k] += real * iRe[k] - x * iIm[k];
        vIm[k] += real * iIm[k] + x * iRe[k];
      }
    } else {
      for (let k = 0; k < count; k++) {
        const x = omega[k] * rising - inverseOmega[k] * falling;
        vRe[k] += real * iRe[k] - x * iIm[k];
        vIm[k] += real * iIm[k] + x * iRe[k];
      }
    }
  }

  /** `I += Y·V` over the first `count` frequencies. */
  function addShunt(count: number, { inverted, real, rising, falling }: BranchCoefficients): void {
    if (inverted) {
      const square = real * real;
      for (let k = 0; k < count; k++) {
        const x = omega[k] * rising - inverseOmega[k] * falling;
        const over = 1 / (square + x * x);
        iRe[k] += (real * vRe[k] + x * vIm[k]) * over;
        iIm[k] += (real * vIm[k] - x * vRe[k]) * over;
      }
    } else if (falling === 0) {
      for (let k = 0; k < count; k++) {
        const b = omega[k] * rising;
        iRe[k] += real * vRe[k] - b * vIm[k];
        iIm[k] += real * vIm[k] + b * vRe[k];
      }
    } else {
      for (let k = 0; k < count; k++) {
        const b = omega[k] * rising - inverseOmega[k] * falling;
        iRe[k] += real * vRe[k] - b * vIm[k];
        iIm[k] += real * vIm[k] + b * vRe[k];
      }
    }
  }

  return { addSeries, addShunt };
}

export const { addSeries, addShunt } = branchLoops(WORKING);
