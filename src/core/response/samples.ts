import { plain } from "../dual.ts";
import type { DistributedElement, Element, IsolatingElement, LumpedElement } from "../elements/element.ts";
import type { Polynomial, Rational } from "../rational.ts";
import { multiplyBy } from "./kernels.ts";
import { type ComplexArray, constant, empty, samplePolynomial, sampleRational } from "./sample-rational.ts";

/**
 * An element over a grid, classed by what it does to the pair (V, I), so that each class has a loop of its own.
 * Branches are so cheap that their three coefficients are kept instead of samples.
 */
export type ElementSamples =
  /** `V += Z·I` */
  | { readonly form: "series"; readonly by: BranchCoefficients | ComplexArray }
  /** `I += Y·V` */
  | { readonly form: "shunt"; readonly by: BranchCoefficients | ComplexArray }
  /** No current flows from its output back to its input: `I = 0`. */
  | { readonly form: "isolating"; readonly transfer: ComplexArray }
  | MatrixSamples;

export interface MatrixSamples {
  readonly form: "matrix";
  readonly n: ComplexArray;
  readonly a: ComplexArray;
  readonly b: ComplexArray;
  readonly c: ComplexArray;
  readonly d: ComplexArray;
}

/**
 * `real + j(ω·rising − falling/ω)`: an impedance (R, L, 1/C) in series or an admittance (G, C, 1/L) in shunt, or where
 * `inverted` says so the one over it.
 */
export interface BranchCoefficients {
  readonly inverted: boolean;
  readonly real: number;
  readonly rising: number;
  readonly falling: number;
}

/** Samples one element over angular frequencies in rad/s; an isolating stage is parted from its ports. */
export function sampleElement(element: Element, omega: Float64Array): readonly ElementSamples[] {
  switch (element.form) {
    case "series":
      return [sampleSeries(element.impedance, omega)];
    case "shunt":
      return [sampleShunt(element.impedance, omega)];
    case "lumped":
      return [sampleLumped(element, omega)];
    case "distributed":
      return [sampleLine(element, omega)];
    case "isolating":
      return sampleIsolating(element, omega);
  }
}

function sampleSeries({ num, den, omega0 }: Rational, omega: Float64Array): ElementSamples {
  const by = branchCoefficients(num, den, omega0);
  if (by !== undefined) return { form: "series", by };
  const [b, d] = [samplePolynomial(num, omega0, omega), samplePolynomial(den, omega0, omega)];
  return { form: "matrix", n: d, a: d, b, c: constant(0, omega.length), d };
}

function sampleShunt({ num, den, omega0 }: Rational, omega: Float64Array): ElementSamples {
  const by = branchCoefficients(den, num, omega0);
  if (by !== undefined) return { form: "shunt", by };
  const [a, c] = [samplePolynomial(num, omega0, omega), samplePolynomial(den, omega0, omega)];
  return { form: "matrix", n: a, a, b: constant(0, omega.length), c, d: a };
}

/**
 * Coefficients of `p/q` where it is a branch of R, L, C, as it stands or else inverted; undefined for what is no such
 * branch, and where it is infinite at a resonance without loss.
 */
function branchCoefficients(p: Polynomial, q: Polynomial, omega0: number): BranchCoefficients | undefined {
  if (omega0 !== 1) return undefined;
  const direct = overMonomial(p, q);
  if (direct !== undefined) return { inverted: false, ...direct };
  const inverse = overMonomial(q, p);
  return inverse !== undefined && inverse.real > 0 ? { inverted: true, ...inverse } : undefined;
}

/** `p/q` as constant, rising and falling term, where q is a single power of s and no other power comes out. */
function overMonomial(p: Polynomial, q: Polynomial): Omit<BranchCoefficients, "inverted"> | undefined {
  const power = q.length - 1;
  if (power > 1 || q[power] === 0 || (power === 1 && q[0] !== 0)) return undefined;
  const term = (k: number) => (p[k + power] ?? 0) / q[power];
  if (p.length > power + 2) return undefined;
  return { real: term(0), rising: term(1), falling: power === 1 ? p[0] / q[1] : 0 };
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

/** From its input to its output: what it draws, its transfer, what it stands behind. */
function sampleIsolating(element: IsolatingElement, omega: Float64Array): readonly ElementSamples[] {
  const { inputAdmittance, outputImpedance } = element;
  return [
    ...(inputAdmittance ? [{ form: "shunt" as const, by: samplePort(inputAdmittance, omega) }] : []),
    { form: "isolating", transfer: sampleTransfer(element.transfer, omega) },
    ...(outputImpedance ? [{ form: "series" as const, by: samplePort(outputImpedance, omega) }] : []),
  ];
}

const samplePort = (port: Rational, omega: Float64Array): BranchCoefficients | ComplexArray =>
  branchCoefficients(port.num, port.den, port.omega0) ?? sampleRational(port, omega);

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
