import { add, type Dual, divide, dual, exponential, multiply, negate, ONE, scale, ZERO } from "../dual.ts";
import { evaluatePolynomial, evaluateRational } from "../dual-polynomial.ts";
import type { DistributedElement, Element, IsolatingElement, Transfer } from "../elements/element.ts";

/** Voltage and current at one point of the chain, up to a common factor. */
export interface Pair {
  readonly v: Dual;
  readonly i: Dual;
}

export interface Carried extends Pair {
  /** The factor `n` by which the pair's voltage must be multiplied to stand for the voltage behind the element. */
  readonly n: Dual;
}

/**
 * Carries the pair from the output of one element to its input: `v' = a·v + b·i`, `i' = c·v + d·i`, and the
 * element's `n`. All with derivatives by ln ω.
 */
export function carry(element: Element, pair: Pair, omega: number): Carried {
  switch (element.form) {
    case "series": {
      const { num, den } = evaluateRational(element.impedance, omega);
      return { n: den, v: add(multiply(den, pair.v), multiply(num, pair.i)), i: multiply(den, pair.i) };
    }
    case "shunt": {
      const { num, den } = evaluateRational(element.impedance, omega);
      return { n: num, v: multiply(num, pair.v), i: add(multiply(den, pair.v), multiply(num, pair.i)) };
    }
    case "lumped": {
      const [n, a, b, c, d] = [element.n, element.a, element.b, element.c, element.d].map((p) =>
        evaluatePolynomial(p, omega, element.omega0),
      );
      return through(n, a, b, c, d, pair);
    }
    case "distributed": {
      const { n, a, b, c } = lineMatrix(element, omega);
      return through(n, a, b, c, a, pair);
    }
    case "isolating":
      return isolate(element, pair, omega);
  }
}

function through(n: Dual, a: Dual, b: Dual, c: Dual, d: Dual, { v, i }: Pair): Carried {
  return { n, v: add(multiply(a, v), multiply(b, i)), i: add(multiply(c, v), multiply(d, i)) };
}

/**
 * `A = D = cosh γl, B = Z0·sinh γl, C = sinh γl / Z0`, all times `n = 2e^(−αl)` so that nothing overflows.
 * α rises with √f. Source: Pozar, Microwave Engineering, table 4.1 and section 2.1.
 */
function lineMatrix(line: DistributedElement, omega: number): { n: Dual; a: Dual; b: Dual; c: Dual } {
  const alphaL = line.lossNeper * Math.sqrt(omega / (2 * Math.PI * line.lossAtHz));
  const angle = omega * line.delayS;
  const forward = exponential(0, angle, 0, angle);
  const backward = exponential(-2 * alphaL, -angle, -alphaL, -angle);
  const difference = add(forward, negate(backward));
  return {
    n: multiply(dual(2), exponential(-alphaL, 0, -alphaL / 2, 0)),
    a: add(forward, backward),
    b: scale(difference, line.z0Ohm),
    c: scale(difference, 1 / line.z0Ohm),
  };
}

/**
 * An isolating stage starts afresh with one volt at its input: `n = G / (v + Zo·i)`, `v' = 1`, `i' = Yi`.
 */
function isolate(stage: IsolatingElement, pair: Pair, omega: number): Carried {
  const zOut = stage.outputImpedance;
  const drop = zOut === undefined ? ZERO : multiply(value(zOut, omega), pair.i);
  const yIn = stage.inputAdmittance;
  return {
    n: divide(transferAt(stage.transfer, omega), add(pair.v, drop)),
    v: ONE,
    i: yIn === undefined ? ZERO : value(yIn, omega),
  };
}

function value(f: Parameters<typeof evaluateRational>[0], omega: number): Dual {
  const { num, den } = evaluateRational(f, omega);
  return divide(num, den);
}

/** Open-circuit voltage transfer at one frequency; NaN where a measured response has no value. */
export function transferAt(transfer: Transfer, omega: number): Dual {
  if (transfer.type === "irrational") return transfer.at(omega);
  return transfer.sections.reduce((product, section) => multiply(product, value(section, omega)), ONE);
}
