import { WORKING, type Working } from "./working.ts";

/** Where the pair begins, and where it begins anew. */
function startLoops({ omega, inverseOmega, vRe, vIm, iRe, iIm, nRe, nIm, exponent }: Working) {
  /** One volt at an open output, at the `count` frequencies from `at` on. */
  function start(at: number, count: number, gridOmega: Float64Array): void {
    for (let k = 0; k < count; k++) {
      omega[k] = gridOmega[at + k];
      inverseOmega[k] = 1 / omega[k];
    }
    vRe.fill(1);
    vIm.fill(0);
    iRe.fill(0);
    iIm.fill(0);
    nRe.fill(1);
    nIm.fill(0);
    exponent.fill(0);
  }

  /** No current flows from behind a stage to before it. */
  function clearCurrent(): void {
    iRe.fill(0);
    iIm.fill(0);
  }

  return { start, clearCurrent };
}

export const { start, clearCurrent } = startLoops(WORKING);
