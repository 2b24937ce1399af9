import { plain } from "../dual.ts";
import type { DistributedElement, Element, IsolatingElement, LumpedElement } from "../elements/element.ts";
import type { Polynomial, Rational } from "../rational.ts";
import { divideBy, multiplyBy } from "./kernels.ts";

/** Complex values over a grid of frequencies, real and imaginary parts apart. */
export interface ComplexArray {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * An element over a grid, classed by what it does to the pair (V, I), so that each class has a loop of its own.
 * Branches are so cheap that their three coefficients are kept instead of samples.
 */
export type ElementSamples =
  /** `V += Z·I` with Z known by resistance and reactance, or `V += I/Y` with Y by conductance and susceptance. */
  | { readonly form: "series"; readonly branch: BranchCoefficients }
  /** `I += Y·V`, or `I += V/Z`. */
  | { readonly form: "shunt"; readonly branch: BranchCoefficients }
  /** Starts afresh with one volt. */
  | {
      readonly form: "isolating";
      readonly transfer: ComplexArray;
      readonly inputAdmittance: ComplexArray | undefined;
      readonly outputImpedance: ComplexArray | undefined;
    }
  | {
      readonly form: "matrix";
      readonly n: ComplexArray;
      readonly a: ComplexArray;
      readonly b: ComplexArray;
      readonly c: ComplexArray;
      readonly d: ComplexArray;
    };

/**
 * `real + j(ω·rising − falling/ω)`: an impedance (R, L, 1/C) when `is` says so, else an admittance (G, C, 1/L).
 */
export interface BranchCoefficients {
  readonly is: "impedance" | "admittance";
  readonly real: number;
  readonly rising: number;
  readonly falling: number;
}

/** Samples one element over angular frequencies in rad/s. */
export function sampleElement(element: Element, omega: Float64Array): ElementSamples {
  switch (element.form) {
    case "series":
      return sampleSeries(element.impedance, omega);
    case "shunt":
      return sampleShunt(element.impedance, omega);
    case "lumped":
      return sampleLumped(element, omega);
    case "distributed":
      return sampleLine(element, omega);
    case "isolating":
      return sampleIsolating(element, omega);
  }
}

function sampleSeries(impedance: Rational, omega: Float64Array): ElementSamples {
  const branch = branchCoefficients(impedance);
  if (branch !== undefined && (branch.is === "impedance" || branch.real > 0))
    return { form: "series", branch };
  const { num, den } = sampleBoth(impedance, omega);
  return { form: "matrix", n: den, a: den, b: num, c: constant(0, omega.length), d: den };
}

function sampleShunt(impedance: Rational, omega: Float64Array): ElementSamples {
  const branch = branchCoefficients(impedance);
  if (branch !== undefined && (branch.is === "admittance" || branch.real > 0))
    return { form: "shunt", branch };
  const { num, den } = sampleBoth(impedance, omega);
  return { form: "matrix", n: num, a: num, b: constant(0, omega.length), c: den, d: num };
}

/** Coefficients of a branch of R, L, C; undefined for a short in parallel and for what is no such branch. */
function branchCoefficients({ num, den, omega0 }: Rational): BranchCoefficients | undefined {
  if (omega0 !== 1) return undefined;
  const impedance = overMonomial(num, den);
  if (impedance !== undefined) return { is: "impedance", ...impedance };
  const admittance = overMonomial(den, num);
  return admittance === undefined ? undefined : { is: "admittance", ...admittance };
}

/** `p/q` as constant, rising and falling term, where q is a single power of s and no other power comes out. */
function overMonomial(p: Polynomial, q: Polynomial): Omit<BranchCoefficients, "is"> | undefined {
  const power = q.length - 1;
  if (power > 1 || q[power] === 0 || (power === 1 && q[0] !== 0)) return undefined;
  const term = (k: number) => (p[k + power] ?? 0) / q[power];
  if (p.length > power + 2) return undefined;
  return { real: term(0), rising: term(1), falling: power === 1 ? p[0] / q[1] : 0 };
}

function sampleBoth({ num, den, omega0 }: Rational, omega: Float64Array) {
  return { num: samplePolynomial(num, omega0, omega), den: samplePolynomial(den, omega0, omega) };
}

function sampleLumped({ n, a, b, c, d, omega0 }: LumpedElement, omega: Float64Array): ElementSamples {
  const sample = (p: Polynomial) => samplePolynomial(p, omega0, omega);
  return { form: "matrix", n: sample(n), a: sample(a), b: sample(b), c: sample(c), d: sample(d) };
}

/** See `lineMatrix` in two-port.ts. */
function sampleLine(line: DistributedElement, omega: Float64Array): ElementSamples {
  const count = omega.length;
  const [n, a, b, c] = [empty(count), empty(count), empty(count), empty(count)];
  const neperPerRoot = line.lossNeper / Math.sqrt(2 * Math.PI * line.lossAtHz);
  for (let k = 0; k < count; k++) {
    const loss = Math.exp(-neperPerRoot * Math.sqrt(omega[k]));
    const [cos, sin] = [Math.cos(omega[k] * line.delayS), Math.sin(omega[k] * line.delayS)];
    const twoWay = loss * loss;
    n.re[k] = 2 * loss;
    a.re[k] = cos * (1 + twoWay);
    a.im[k] = sin * (1 - twoWay);
    b.re[k] = cos * (1 - twoWay) * line.z0Ohm;
    b.im[k] = sin * (1 + twoWay) * line.z0Ohm;
    c.re[k] = b.re[k] / line.z0Ohm ** 2;
    c.im[k] = b.im[k] / line.z0Ohm ** 2;
  }
  return { form: "matrix", n, a, b, c, d: a };
}

function sampleIsolating(element: IsolatingElement, omega: Float64Array): ElementSamples {
  const sample = (f: Rational | undefined) => (f === undefined ? undefined : sampleRational(f, omega));
  return {
    form: "isolating",
    transfer: sampleTransfer(element.transfer, omega),
    inputAdmittance: sample(element.inputAdmittance),
    outputImpedance: sample(element.outputImpedance),
  };
}

function sampleTransfer(transfer: IsolatingElement["transfer"], omega: Float64Array): ComplexArray {
  if (transfer.type === "irrational") {
    const out = empty(omega.length);
    for (let k = 0; k < omega.length; k++) ({ re: out.re[k], im: out.im[k] } = plain(transfer.at(omega[k])));
    return out;
  }
  const [first, ...others] = transfer.sections;
  const out = first === undefined ? constant(1, omega.length) : sampleRational(first, omega);
  for (const section of others) multiplyBy(out, sampleRational(section, omega));
  return out;
}

/** `num/den` over the grid; up to the second degree the coefficients are held in locals. */
export function sampleRational({ num, den, omega0 }: Rational, omega: Float64Array): ComplexArray {
  if (den.length === 1) return samplePolynomial(num, omega0, omega, 1 / den[0]);
  if (num.length <= 3 && den.length <= 3) return sampleQuadratics(num, den, omega0, omega);
  const out = samplePolynomial(num, omega0, omega);
  divideBy(out, samplePolynomial(den, omega0, omega));
  return out;
}

function sampleQuadratics(
  num: Polynomial,
  den: Polynomial,
  omega0: number,
  omega: Float64Array,
): ComplexArray {
  const out = empty(omega.length);
  const { re, im } = out;
  const [n0, n1 = 0, n2 = 0] = num;
  const [d0, d1 = 0, d2 = 0] = den;
  const inverse = 1 / omega0;
  for (let k = 0; k < omega.length; k++) {
    const x = omega[k] * inverse;
    const xx = x * x;
    const nr = n0 - n2 * xx;
    const ni = n1 * x;
    const dr = d0 - d2 * xx;
    const di = d1 * x;
    const size = 1 / (dr * dr + di * di);
    re[k] = (nr * dr + ni * di) * size;
    im[k] = (ni * dr - nr * di) * size;
  }
  return out;
}

/** A polynomial of `jω/omega0`, times a factor, over the grid: even powers are real, odd ones imaginary. */
export function samplePolynomial(
  p: Polynomial,
  omega0: number,
  omega: Float64Array,
  factor = 1,
): ComplexArray {
  if (p.length === 1) return constant(p[0] * factor, omega.length);
  const out = empty(omega.length);
  const even = signed(p, 0, factor);
  const odd = signed(p, 1, factor);
  const inverse = 1 / omega0;
  for (let k = 0; k < omega.length; k++) {
    const x = omega[k] * inverse;
    const xx = x * x;
    let real = 0;
    for (let j = even.length - 1; j >= 0; j--) real = real * xx + even[j];
    let imaginary = 0;
    for (let j = odd.length - 1; j >= 0; j--) imaginary = imaginary * xx + odd[j];
    out.re[k] = real;
    out.im[k] = imaginary * x;
  }
  return out;
}

/** Every second coefficient with the sign that `j^k` gives it. */
function signed(p: Polynomial, parity: 0 | 1, factor: number): number[] {
  return p
    .filter((_, power) => power % 2 === parity)
    .map((coefficient, k) => coefficient * factor * (k % 2 === 0 ? 1 : -1));
}

export function empty(length: number): ComplexArray {
  return { re: new Float64Array(length), im: new Float64Array(length) };
}

export function constant(value: number, length: number): ComplexArray {
  return { re: new Float64Array(length).fill(value), im: new Float64Array(length) };
}
