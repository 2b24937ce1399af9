import type { PartValues } from "../../../src/core/stages/kind.ts";
import { loadFormulaParser } from "../../../src/document/formula-text.ts";
import {
  type Complex,
  complex,
  exponential,
  logarithm,
  over,
  plus,
  scaled,
  squareRoot,
  times,
} from "../../helpers/nodal-complex.ts";

/** A stage and its transfer at `s = j·2πf`, written from the definition in the tests' own arithmetic. */
export interface ClosedForm {
  readonly kind: string;
  readonly parts: PartValues;
  readonly transfer: (s: Complex) => Complex;
}

const one = complex(1);
const f0 = 1234;
const rate = 20_000;
/** x = s/(2π·f0) */
const at = (s: Complex, freqHz: number): Complex => scaled(s, 1 / (2 * Math.PI * freqHz));

/** `Σ c_k·x^k` by Horner. */
const polynomial = (coefficients: readonly number[], x: Complex): Complex =>
  coefficients.reduceRight((sum, c) => plus(times(sum, x), complex(c)), complex(0));

const fraction =
  (num: readonly number[], den: readonly number[], freqHz = f0) =>
  (s: Complex): Complex =>
    over(polynomial(num, at(s, freqHz)), polynomial(den, at(s, freqHz)));

/** z⁻¹ = e^(−s/rate) */
const back = (s: Complex): Complex => exponential(scaled(s, -1 / rate));
const section = (num: (Q: number) => readonly number[], Q: number) => fraction(num(Q), [1, 1 / Q, 1]);

/** The mean of `length` samples, term by term. */
const mean = (length: number) => (s: Complex) =>
  scaled(polynomial(Array<number>(length).fill(1), back(s)), 1 / length);

const power = (z: Complex, exponent: number): Complex => Array<Complex>(exponent).fill(z).reduce(times, one);

const parse = await loadFormulaParser();

function formula(text: string) {
  const tree = parse(text);
  if (!tree.ok) throw new Error(tree.problem.found);
  return { type: "formula", text, tree: tree.value } as const;
}

/** Two pieces: 0 to −20 dB and 0° to −90° over the first decade, to −26 dB and −360° over the second. */
const table = {
  type: "table",
  freqHz: Float64Array.of(10, 100, 1000, 1e6),
  gainDb: Float64Array.of(0, -20, -26, -26),
  phaseDeg: Float64Array.of(0, -90, -360, -360),
} as const;

/** Linear in log f by hand; from 1 kHz on constant. */
function tableTransfer(s: Complex): Complex {
  const decades = Math.log10(s.im / (2 * Math.PI) / 10);
  const [gainDb, phaseDeg] =
    decades < 1
      ? [-20 * decades, -90 * decades]
      : decades < 2
        ? [-20 - 6 * (decades - 1), -90 - 270 * (decades - 1)]
        : [-26, -360];
  return exponential(complex((gainDb / 20) * Math.LN10, (phaseDeg * Math.PI) / 180));
}

/** Every ideal and sampled kind; sources are those of the kinds' own definitions in the specification of the parts. */
export const closedForms: readonly ClosedForm[] = [
  { kind: "gain", parts: { gain: -7.5 }, transfer: () => complex(-7.5) },
  { kind: "lowpass-1", parts: { f0 }, transfer: fraction([1], [1, 1]) },
  { kind: "highpass-1", parts: { f0 }, transfer: fraction([0, 1], [1, 1]) },
  { kind: "allpass-1", parts: { f0 }, transfer: fraction([1, -1], [1, 1]) },
  { kind: "lowpass-2", parts: { f0, Q: 3 }, transfer: section(() => [1], 3) },
  { kind: "highpass-2", parts: { f0, Q: 0.4 }, transfer: section(() => [0, 0, 1], 0.4) },
  { kind: "bandpass-2", parts: { f0, Q: 12 }, transfer: section((Q) => [0, 1 / Q], 12) },
  { kind: "notch-2", parts: { f0, Q: 2 }, transfer: section(() => [1, 0, 1], 2) },
  { kind: "allpass-2", parts: { f0, Q: 5 }, transfer: section((Q) => [1, -1 / Q, 1], 5) },
  {
    kind: "zero-pole",
    parts: { zero: 200, pole: 5000 },
    transfer: (s) => over(plus(one, at(s, 200)), plus(one, at(s, 5000))),
  },
  { kind: "integrator", parts: { f0 }, transfer: fraction([1], [0, 1]) },
  { kind: "differentiator", parts: { f0 }, transfer: fraction([0, 1], [1]) },
  // Butterworth of order 3: 1/((1 + x)(1 + x + x²)) = 1/(1 + 2x + 2x² + x³).
  {
    kind: "filter",
    parts: { shape: "lowpass", family: "butterworth", order: 3, corner: f0 },
    transfer: fraction([1], [1, 2, 2, 1]),
  },
  // As a band-pass its x is (p + 1/p)·f0/width, with p over the geometric mean.
  {
    kind: "filter",
    parts: { shape: "bandpass", family: "butterworth", order: 3, low: 800, high: 1250 },
    transfer: (s) => {
      const p = at(s, 1000);
      const x = scaled(plus(p, over(one, p)), 1000 / (1250 - 800));
      return over(one, polynomial([1, 2, 2, 1], x));
    },
  },
  {
    kind: "formula",
    parts: { H: formula("(1 + s*tau)/(2 + s*tau + (s*tau)^2)"), tau: 1e-4 },
    transfer: (s) => over(polynomial([1, 1], scaled(s, 1e-4)), polynomial([2, 1, 1], scaled(s, 1e-4))),
  },
  {
    kind: "formula",
    parts: { H: formula("exp(-20*s*u0) / cosh(sqrt(s*t)) - log(2 + s*t)"), u0: 1e-6, t: 1e-4 },
    transfer: (s) => {
      const root = squareRoot(scaled(s, 1e-4));
      const cosh = scaled(plus(exponential(root), exponential(scaled(root, -1))), 0.5);
      const late = over(exponential(scaled(s, -20e-6)), cosh);
      return plus(late, scaled(logarithm(plus(complex(2), scaled(s, 1e-4))), -1));
    },
  },
  {
    kind: "formula",
    parts: { H: formula("tan(s*t)*sin(s*t)/(cos(s*t)+tanh(1+s*t)*sinh(s*t))"), t: 2e-5 },
    transfer: trigonometric,
  },
  { kind: "table", parts: { file: table }, transfer: tableTransfer },
  { kind: "delay", parts: { time: 37e-6 }, transfer: (s) => exponential(scaled(s, -37e-6)) },
  {
    kind: "hold",
    parts: { rate },
    transfer: (s) => over(plus(one, scaled(back(s), -1)), scaled(s, 1 / rate)),
  },
  { kind: "moving-average", parts: { length: 7, rate }, transfer: mean(7) },
  {
    kind: "sinc-decimator",
    parts: { order: 4, ratio: 12, rate },
    transfer: (s) => power(mean(12)(s), 4),
  },
  {
    kind: "biquad",
    parts: { b0: 0.3, b1: -0.1, b2: 0.25, a1: -1.2, a2: 0.72, rate },
    transfer: (s) => over(polynomial([0.3, -0.1, 0.25], back(s)), polynomial([1, -1.2, 0.72], back(s))),
  },
];

/** Through exponentials alone: cos z = (e^jz + e^−jz)/2, sin z = (e^jz − e^−jz)/2j, and so on. */
function trigonometric(s: Complex): Complex {
  const z = scaled(s, 2e-5);
  const minusOne = complex(-1);
  const half = complex(0.5);
  const sum = (w: Complex, sign: Complex) => plus(exponential(w), times(sign, exponential(scaled(w, -1))));
  const jz = times(complex(0, 1), z);
  const sin = over(sum(jz, minusOne), complex(0, 2));
  const cos = times(half, sum(jz, one));
  const shifted = plus(one, z);
  const tanh = over(sum(shifted, minusOne), sum(shifted, one));
  const sinh = times(half, sum(z, minusOne));
  return over(times(over(sin, cos), sin), plus(cos, times(tanh, sinh)));
}
