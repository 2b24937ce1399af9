import { type Complex, complex, conjugate, modulus } from "../complex.ts";
import { ok, type Result } from "../result.ts";
import { bessel } from "./bessel.ts";
import { butterworth } from "./butterworth.ts";
import { chebyshev } from "./chebyshev.ts";
import { elliptic, ellipticStopEdge } from "./elliptic.ts";
import { inverseChebyshev, inverseChebyshevStopEdge } from "./inverse-chebyshev.ts";
import type { Prototype, PrototypeSection } from "./sections.ts";
import { checkPrototype, type FilterProblem, type PrototypeSpec } from "./spec.ts";

/** `H(s) = gain · Π(s − zero) / Π(s − pole)`; conjugates are listed, real roots once. */
export interface ZerosPolesGain {
  readonly zeros: readonly Complex[];
  readonly poles: readonly Complex[];
  readonly gain: number;
}

/**
 * Low-pass prototype with its corner at x = 1: the half-power point for Butterworth, Bessel and inverse Chebyshev, the
 * ripple edge for Chebyshev and elliptic. Its greatest gain is one.
 */
export function lowpassPrototype(spec: PrototypeSpec): Result<ZerosPolesGain, FilterProblem> {
  const checked = checkPrototype(spec);
  return checked.ok ? ok(expand(buildPrototype(spec))) : checked;
}

/** The prototype as sections, highest Q first. Expects a checked spec. */
export function buildPrototype({ family, order, rippleDb, stopDb }: PrototypeSpec): Prototype {
  switch (family) {
    case "butterworth":
      return butterworth(order);
    case "chebyshev":
      return chebyshev(order, rippleDb!);
    case "inverse-chebyshev":
      return inverseChebyshev(order, stopDb!);
    case "bessel":
      return bessel(order);
    case "elliptic":
      return elliptic(order, rippleDb!, stopDb!);
  }
}

/** Where the loss has reached `stopDb`, over the corner; undefined for families without a stop-band loss of their own. */
export function stopEdge(spec: PrototypeSpec): Result<number | undefined, FilterProblem> {
  const checked = checkPrototype(spec);
  if (!checked.ok) return checked;
  const { family, order, rippleDb, stopDb } = spec;
  if (family === "inverse-chebyshev") return ok(inverseChebyshevStopEdge(order, stopDb!));
  if (family === "elliptic") return ok(ellipticStopEdge(order, rippleDb!, stopDb!));
  return ok(undefined);
}

function expand({ sections, dcGain }: Prototype): ZerosPolesGain {
  return {
    zeros: sections.flatMap(zerosOf),
    poles: sections.flatMap(polesOf),
    gain: sections.reduce((product, section) => product * leadingGain(section), dcGain),
  };
}

const zerosOf = ({ zero }: PrototypeSection): Complex[] =>
  zero === undefined ? [] : [complex(0, zero), complex(0, -zero)];

const polesOf = ({ pole }: PrototypeSection): Complex[] => (pole.im === 0 ? [pole] : [pole, conjugate(pole)]);

/** Factor that brings the gain of one section at DC to one. */
function leadingGain({ pole, zero }: PrototypeSection): number {
  if (pole.im === 0) return -pole.re;
  return (modulus(pole) / (zero ?? 1)) ** 2;
}
