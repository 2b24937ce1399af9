import type { Chain } from "../chain.ts";
import type { Complex } from "../complex.ts";
import { scale } from "../complex.ts";
import type { Element } from "../elements/element.ts";
import { add, multiply, stretch } from "../polynomial.ts";
import type { Polynomial, Rational } from "../rational.ts";
import { polynomialRoots } from "./polynomial-roots.ts";

/** Roots in rad/s that shape the response; some may cancel one another. */
export interface ChainRoots {
  readonly zeros: readonly Complex[];
  readonly poles: readonly Complex[];
}

/**
 * Poles and zeros of the chain, group by group: an isolating stage cuts the chain, and the pair (V, I) is carried as
 * two polynomials no further than from one cut to the next. Frequency is scaled to `omega0`.
 * Lines and other irrational parts are passed over.
 */
export function chainRoots(chain: Chain, omega0: number): ChainRoots {
  const roots = { zeros: [] as Complex[], poles: [] as Complex[] };
  let pair: PolynomialPair = { v: [1], i: [0] };
  const carry = (element: Element) => {
    pair = carryPolynomials(element, pair, omega0, roots);
  };
  if (chain.loadImpedance) carry({ form: "shunt", impedance: chain.loadImpedance });
  for (const { elements } of [...chain.stages].reverse())
    for (const element of [...elements].reverse()) carry(element);
  if (chain.against !== "input") carry({ form: "series", impedance: chain.sourceImpedance });
  roots.poles.push(...rootsOf(pair.v, omega0));
  return roots;
}

interface PolynomialPair {
  readonly v: Polynomial;
  readonly i: Polynomial;
}

function carryPolynomials(
  element: Element,
  { v, i }: PolynomialPair,
  omega0: number,
  roots: { zeros: Complex[]; poles: Complex[] },
): PolynomialPair {
  switch (element.form) {
    case "series": {
      const { num, den } = inScale(element.impedance, omega0);
      roots.zeros.push(...rootsOf(den, omega0));
      return balanced({ v: add(multiply(den, v), multiply(num, i)), i: multiply(den, i) });
    }
    case "shunt": {
      const { num, den } = inScale(element.impedance, omega0);
      roots.zeros.push(...rootsOf(num, omega0));
      return balanced({ v: multiply(num, v), i: add(multiply(den, v), multiply(num, i)) });
    }
    case "lumped": {
      const [n, a, b, c, d] = [element.n, element.a, element.b, element.c, element.d].map((p) =>
        stretch(p, omega0 / element.omega0),
      );
      roots.zeros.push(...rootsOf(n, omega0));
      return balanced({
        v: add(multiply(a, v), multiply(b, i)),
        i: add(multiply(c, v), multiply(d, i)),
      });
    }
    case "distributed":
      return { v, i };
    case "isolating": {
      const { num, den } = inScale(element.outputImpedance ?? ZERO_OHM, omega0);
      roots.poles.push(...rootsOf(add(multiply(den, v), multiply(num, i)), omega0));
      if (element.transfer.type === "rational") {
        for (const section of element.transfer.sections) {
          roots.zeros.push(...rootsOf(section.num, section.omega0));
          roots.poles.push(...rootsOf(section.den, section.omega0));
        }
      }
      const input = element.inputAdmittance && inScale(element.inputAdmittance, omega0);
      // One volt at the input is `den` of the pair: the same factor stands above, and cancels behind an ideal source.
      if (input !== undefined) roots.zeros.push(...rootsOf(input.den, omega0));
      return input === undefined ? { v: [1], i: [0] } : { v: input.den, i: input.num };
    }
  }
}

const ZERO_OHM: Rational = { num: [0], den: [1], omega0: 1 };

const inScale = ({ num, den, omega0 }: Rational, target: number) => ({
  num: stretch(num, target / omega0),
  den: stretch(den, target / omega0),
});

/** Only the ratio of the two matters: both are brought near one before they overflow. */
function balanced({ v, i }: PolynomialPair): PolynomialPair {
  const largest = Math.max(...v.map(Math.abs), ...i.map(Math.abs));
  if (!(largest > 0 && largest < Infinity)) return { v, i };
  return { v: v.map((c) => c / largest), i: i.map((c) => c / largest) };
}

/** Roots in rad/s, those at the origin left out. */
function rootsOf(p: Polynomial, omega0: number): Complex[] {
  return polynomialRoots(p)
    .filter(({ re, im }) => re !== 0 || im !== 0)
    .map((root) => scale(root, omega0));
}
