import { type Dual, divide, dual, toldAngle } from "../../dual.ts";
import { irrational } from "../../elements/make.ts";
import { defineKind, type NumberSpec, plain, sampleRate } from "../kind.ts";

interface BiquadValues {
  readonly b0: number;
  readonly b1: number;
  readonly b2: number;
  readonly a1: number;
  readonly a2: number;
  readonly rate: number;
}

const MOST_MARKS = 2000;

const coefficient = (name: string, what: string, initial: string): NumberSpec =>
  plain(name, what, { range: "any", initial });

/** Second-order digital section. */
export const biquad = defineKind<BiquadValues>({
  kind: "biquad",
  group: "sampled",
  summary: "second-order digital section",
  circuit: "behind the converter",
  formula: "(b0 + b1·z⁻¹ + b2·z⁻²)/(1 + a1·z⁻¹ + a2·z⁻²), z = e^(s/rate)",
  source: "Oppenheim and Schafer, Discrete-Time Signal Processing, ch. 6",
  parts: [
    coefficient("b0", "coefficient of the input", "0.25"),
    coefficient("b1", "coefficient of the input, one sample back", "0.5"),
    coefficient("b2", "coefficient of the input, two samples back", "0.25"),
    coefficient("a1", "coefficient of the output, one sample back", "0"),
    coefficient("a2", "coefficient of the output, two samples back", "0"),
    sampleRate("rate", "sample rate", { initial: "20k" }),
  ],
  elements: ({ b0, b1, b2, a1, a2, rate }) => [
    irrational({
      at: (omega) => divide(delayLine([b0, b1, b2], omega / rate), delayLine([1, a1, a2], omega / rate)),
      delayS: 0,
      marks: (fromHz, toHz) => {
        const base = [...rootTurns(b0, b1, b2), ...rootTurns(1, a1, a2), 0.5].map((turns) => turns * rate);
        return images(base, rate, fromHz, toHz);
      },
    }),
  ],
});

/** `Σ c_k·e^(−jk·angle)` with its derivative; a sum that is nothing but rounding is zero. */
function delayLine(coefficients: readonly number[], angle: number): Dual {
  const size = coefficients.reduce((sum, c) => sum + Math.abs(c), 0);
  const settle = (value: number) => (Math.abs(value) <= 4 * Number.EPSILON * size ? 0 : value);
  let [re, im, dRe, dIm] = [0, 0, 0, 0];
  coefficients.forEach((c, k) => {
    const turned = toldAngle(k * angle);
    const [cos, sin] = [c * Math.cos(turned), c * Math.sin(turned)];
    re += cos;
    im -= sin;
    dRe -= k * angle * sin;
    dIm -= k * angle * cos;
  });
  return dual(settle(re), settle(im), dRe, dIm);
}

/** Angle in turns of the complex roots of `c0·z² + c1·z + c2`. */
function rootTurns(c0: number, c1: number, c2: number): readonly number[] {
  const discriminant = c1 * c1 - 4 * c0 * c2;
  if (c0 === 0 || discriminant >= 0) return [];
  return [Math.atan2(Math.sqrt(-discriminant), -c1 * Math.sign(c0)) / (2 * Math.PI)];
}

/** The frequencies `k·rate ± base` within the range. */
function images(baseHz: readonly number[], rate: number, fromHz: number, toHz: number): readonly number[] {
  const marks: number[] = [];
  for (let k = Math.floor(fromHz / rate); k * rate <= toHz + rate && marks.length < MOST_MARKS; k++) {
    for (const base of baseHz) marks.push(k * rate + base, k * rate - base);
  }
  return marks.filter((freq) => freq >= fromHz && freq <= toHz);
}
