import { WORKING, type Working } from "./working.ts";

/** What stands at the beginning and at the end of the way through a chain. */
function endLoops({ omega, inverseOmega, vRe, vIm, iRe, iIm, nRe, nIm, exponent }: Working) {
  const dbPerDoubling = 20 * Math.log10(2);
  const dbPerNeperOfPower = 10 / Math.LN10;
  const degrees = 180 / Math.PI;

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

  /** Gain in dB and phase in (−180, 180] of `n/V·2^exponent`, all within the range that `keepInRange` keeps. */
  function polar(at: number, count: number, gainDb: Float64Array, phaseDeg: Float64Array): void {
    for (let k = 0; k < count; k++) {
      const a = nRe[k];
      const b = nIm[k];
      const c = vRe[k];
      const d = vIm[k];
      const power = (a * a + b * b) / (c * c + d * d);
      gainDb[at + k] = dbPerNeperOfPower * Math.log(power) + dbPerDoubling * exponent[k];
      const angle = Math.atan2(b * c - a * d, a * c + b * d) * degrees;
      phaseDeg[at + k] = angle <= -180 ? 180 : angle;
    }
  }

  return { start, clearCurrent, polar };
}

export const { start, clearCurrent, polar } = endLoops(WORKING);
