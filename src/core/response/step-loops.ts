import type { Rational } from "../rational.ts";
import type { ComplexArray } from "./sample-rational.ts";
import type { MatrixSamples } from "./samples.ts";
import { WORKING, type Working } from "./working.ts";

/** Whatever is no branch. Samples are those of the whole grid; the block's start at `at`. */
function stepLoops({ omega, vRe, vIm, iRe, iIm, nRe, nIm }: Working) {
  /** `V += Z·I` */
  function addSampledSeries(at: number, count: number, { re, im }: ComplexArray): void {
    for (let k = 0; k < count; k++) {
      const r = re[at + k];
      const x = im[at + k];
      vRe[k] += r * iRe[k] - x * iIm[k];
      vIm[k] += r * iIm[k] + x * iRe[k];
    }
  }

  /** `I += Y·V` */
  function addSampledShunt(at: number, count: number, { re, im }: ComplexArray): void {
    for (let k = 0; k < count; k++) {
      const g = re[at + k];
      const b = im[at + k];
      iRe[k] += g * vRe[k] - b * vIm[k];
      iIm[k] += g * vIm[k] + b * vRe[k];
    }
  }

  /** `n *= factor` */
  function multiply(at: number, count: number, { re, im }: ComplexArray): void {
    for (let k = 0; k < count; k++) {
      const a = re[at + k];
      const b = im[at + k];
      const c = nRe[k];
      nRe[k] = a * c - b * nIm[k];
      nIm[k] = a * nIm[k] + b * c;
    }
  }

  /** `n *= num`, `V *= den`: a section of at most the second degree where I is zero, without a division. */
  function multiplySection(count: number, { num, den, omega0 }: Rational): void {
    const [n0, n1 = 0, n2 = 0] = num;
    const [d0, d1 = 0, d2 = 0] = den;
    const inverse = 1 / omega0;
    for (let k = 0; k < count; k++) {
      const x = omega[k] * inverse;
      const xx = x * x;
      const nr = n0 - n2 * xx;
      const ni = n1 * x;
      const dr = d0 - d2 * xx;
      const di = d1 * x;
      const n = nRe[k];
      const v = vRe[k];
      nRe[k] = nr * n - ni * nIm[k];
      nIm[k] = nr * nIm[k] + ni * n;
      vRe[k] = dr * v - di * vIm[k];
      vIm[k] = dr * vIm[k] + di * v;
    }
  }

  /** `V, I = a·V + b·I, c·V + d·I` */
  function carryMatrix(at: number, count: number, { a, b, c, d }: MatrixSamples): void {
    const { re: aRe, im: aIm } = a;
    const { re: bRe, im: bIm } = b;
    const { re: cRe, im: cIm } = c;
    const { re: dRe, im: dIm } = d;
    for (let k = 0; k < count; k++) {
      const j = at + k;
      const v = vRe[k];
      const w = vIm[k];
      const i = iRe[k];
      const h = iIm[k];
      vRe[k] = aRe[j] * v - aIm[j] * w + (bRe[j] * i - bIm[j] * h);
      vIm[k] = aRe[j] * w + aIm[j] * v + (bRe[j] * h + bIm[j] * i);
      iRe[k] = cRe[j] * v - cIm[j] * w + (dRe[j] * i - dIm[j] * h);
      iIm[k] = cRe[j] * w + cIm[j] * v + (dRe[j] * h + dIm[j] * i);
    }
  }

  return { addSampledSeries, addSampledShunt, multiply, multiplySection, carryMatrix };
}

export const { addSampledSeries, addSampledShunt, multiply, multiplySection, carryMatrix } =
  stepLoops(WORKING);
