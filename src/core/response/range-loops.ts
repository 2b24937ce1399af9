import { WORKING, type Working } from "./working.ts";

/**
 * Chains of many stages reach far beyond 1e308. Once numbers leave a range that is safe to multiply and to square,
 * powers of two, which cost no digit, are taken out of them and counted apart.
 */
function rangeLoops({ vRe, vIm, iRe, iIm, nRe, nIm, exponent }: Working) {
  // Of the squared size.
  const most = 2 ** 400;
  const least = 2 ** -400;

  /** Takes powers of two out of V and I together. */
  function keepPairInRange(count: number): void {
    for (let k = 0; k < count; k++) {
      const size = vRe[k] * vRe[k] + vIm[k] * vIm[k] + iRe[k] * iRe[k] + iIm[k] * iIm[k];
      if (size < most && size > least) continue;
      const power = powerOf(vRe[k], vIm[k], iRe[k], iIm[k]);
      const factor = 2 ** -power;
      vRe[k] *= factor;
      vIm[k] *= factor;
      iRe[k] *= factor;
      iIm[k] *= factor;
      exponent[k] -= power;
    }
  }

  /** Takes powers of two out of n. */
  function keepProductInRange(count: number): void {
    for (let k = 0; k < count; k++) {
      const size = nRe[k] * nRe[k] + nIm[k] * nIm[k];
      if (size < most && size > least) continue;
      const power = powerOf(nRe[k], nIm[k]);
      const factor = 2 ** -power;
      nRe[k] *= factor;
      nIm[k] *= factor;
      exponent[k] += power;
    }
  }

  return { keepPairInRange, keepProductInRange };
}

export const { keepPairInRange, keepProductInRange } = rangeLoops(WORKING);

/** Exponent of the largest part; zero at a null and where there is no number. */
function powerOf(...parts: readonly number[]): number {
  const size = Math.max(...parts.map(Math.abs));
  return size > 0 && size < Infinity ? Math.max(-1000, Math.min(1000, Math.round(Math.log2(size)))) : 0;
}
