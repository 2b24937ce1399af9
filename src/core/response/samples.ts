import { plain, toldAngle } from "../dual.ts";
import type {
  DistributedElement,
  Element,
  IrrationalTransfer,
  IsolatingElement,
  LumpedElement,
} from "../elements/element.ts";
import type { Polynomial, Rational } from "../rational.ts";
import { type ComplexArray, constant, empty, samplePolynomial, sampleRational } from "./sample-rational.ts";

/**
 * What an element does to the pair (V, I) and to the product n, classed so that each class has a loop of its own.
 * Branches and short sections are so cheap that their coefficients are kept instead of samples over the grid.
 */
export type Step =
  /** `V += Z·I` */
  | { readonly form: "series"; readonly branch: BranchCoefficients }
  | { readonly form: "sampled series"; readonly impedance: ComplexArray }
  /** `I += Y·V` */
  | { readonly form: "shunt"; readonly branch: BranchCoefficients }
  | { readonly form: "sampled shunt"; readonly admittance: ComplexArray }
  /** `I = 0`: no current flows back from output to input. */
  | { readonly form: "isolation" }
  /** `n *= num`, `V *= den`, each of at most the second degree; only before an isolation. */
  | { readonly form: "section"; readonly section: Rational }
  /** `n *= by` */
  | { readonly form: "factor"; readonly by: ComplexArray }
  | MatrixSamples;

/** `V, I = a·V + b·I, c·V + d·I` and `n *= n` */
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

/** The steps of one element over angular frequencies in rad/s, from its input to its output. */
export function sampleElement(element: Element, omega: Float64Array): readonly Step[] {
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

function sampleSeries({ num, den, omega0 }: Rational, omega: Float64Array): Step {
  const branch = branchCoefficients(num, den, omega0);
  if (branch !== undefined) return { form: "series", branch };
  const [b, d] = [samplePolynomial(num, omega0, omega), samplePolynomial(den, omega0, omega)];
  return { form: "matrix", n: d, a: d, b, c: constant(0, omega.length), d };
}

function sampleShunt({ num, den, omega0 }: Rational, omega: Float64Array): Step {
  const branch = branchCoefficients(den, num, omega0);
  if (branch !== undefined) return { form: "shunt", branch };
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

function sampleLumped({ n, a, b, c, d, omega0 }: LumpedElement, omega: Float64Array): Step {
  const sample = (p: Polynomial) => samplePolynomial(p, omega0, omega);
  return { form: "matrix", n: sample(n), a: sample(a), b: sample(b), c: sample(c), d: sample(d) };
}

/** See `lineMatrix` in two-port.ts. */
function sampleLine(line: DistributedElement, omega: Float64Array): Step {
  const count = omega.length;
  const [n, a, b, c] = [empty(count), empty(count), empty(count), empty(count)];
  const neperPerRoot = line.lossNeper / Math.sqrt(2 * Math.PI * line.lossAtHz);
  for (let k = 0; k < count; k++) {
    const loss = Math.exp(-neperPerRoot * Math.sqrt(omega[k]));
    const angle = toldAngle(omega[k] * line.delayS);
    const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
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

/** What it draws, its transfer, what it stands behind. */
function sampleIsolating(element: IsolatingElement, omega: Float64Array): readonly Step[] {
  const { inputAdmittance, transfer, outputImpedance } = element;
  return [
    ...(inputAdmittance ? [sampleInput(inputAdmittance, omega)] : []),
    ...sampleTransfer(transfer, omega),
    { form: "isolation" },
    ...(outputImpedance ? [sampleOutput(outputImpedance, omega)] : []),
  ];
}

function sampleInput(admittance: Rational, omega: Float64Array): Step {
  const branch = branchCoefficients(admittance.num, admittance.den, admittance.omega0);
  if (branch !== undefined) return { form: "shunt", branch };
  return { form: "sampled shunt", admittance: sampleRational(admittance, omega) };
}

function sampleOutput(impedance: Rational, omega: Float64Array): Step {
  const branch = branchCoefficients(impedance.num, impedance.den, impedance.omega0);
  if (branch !== undefined) return { form: "series", branch };
  return { form: "sampled series", impedance: sampleRational(impedance, omega) };
}

function sampleTransfer(transfer: IsolatingElement["transfer"], omega: Float64Array): readonly Step[] {
  if (transfer.type === "irrational") return [{ form: "factor", by: sampleIrrational(transfer, omega) }];
  return transfer.sections.map((section) =>
    section.num.length <= 3 && section.den.length <= 3
      ? { form: "section", section }
      : { form: "factor", by: sampleRational(section, omega) },
  );
}

function sampleIrrational({ at }: IrrationalTransfer, omega: Float64Array): ComplexArray {
  const { re, im } = empty(omega.length);
  for (let k = 0; k < omega.length; k++) ({ re: re[k], im: im[k] } = plain(at(omega[k])));
  return { re, im };
}
