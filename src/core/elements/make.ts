import { type Rational, rational } from "../rational.ts";
import { type Branch, branchImpedance } from "./branch.ts";
import type {
  IrrationalTransfer,
  IsolatingElement,
  LumpedElement,
  SeriesElement,
  ShuntElement,
} from "./element.ts";

type Parts = Omit<Branch, "joined"> & { readonly joined?: Branch["joined"] };

/** A branch in the line; its parts are in series unless said otherwise. */
export function series(parts: Parts): SeriesElement {
  return { form: "series", impedance: branchImpedance({ joined: "series", ...parts }) };
}

/** A branch from line to common; its parts are in series unless said otherwise. */
export function shunt(parts: Parts): ShuntElement {
  return { form: "shunt", impedance: branchImpedance({ joined: "series", ...parts }) };
}

/** Ports of an isolating stage: what it draws at its input and stands behind at its output. */
export interface Ports {
  readonly Rin?: number | undefined;
  readonly Cin?: number | undefined;
  readonly Rout?: number | undefined;
}

/** An isolating stage of ideal transfer with resistive ports. */
export function isolating(transfer: Rational | readonly Rational[], ports: Ports = {}): IsolatingElement {
  const sections = Array.isArray(transfer) ? (transfer as readonly Rational[]) : [transfer as Rational];
  return { form: "isolating", transfer: { type: "rational", sections }, ...portElements(ports) };
}

export function irrational(transfer: Omit<IrrationalTransfer, "type">, ports: Ports = {}): IsolatingElement {
  return { form: "isolating", transfer: { type: "irrational", ...transfer }, ...portElements(ports) };
}

function portElements({
  Rin,
  Cin = 0,
  Rout = 0,
}: Ports): Pick<IsolatingElement, "inputAdmittance" | "outputImpedance"> {
  const draws = Rin !== undefined || Cin > 0;
  const admittance = Rin === undefined ? rational([0, Cin]) : rational([1, Rin * Cin], [Rin]);
  return {
    ...(draws ? { inputAdmittance: admittance } : {}),
    ...(Rout > 0 ? { outputImpedance: rational([Rout]) } : {}),
  };
}

/** Ideal transformer, `V2 = ratio·V1`, `I2 = I1/ratio`. */
export function idealTransformer(ratio: number): LumpedElement {
  return { form: "lumped", omega0: 1, n: [ratio], a: [1], b: [0], c: [0], d: [ratio * ratio] };
}
