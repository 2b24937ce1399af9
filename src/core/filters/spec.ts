import { fail, ok, type Problem, type Result } from "../result.ts";
import { largestEllipticOrder } from "./elliptic.ts";

export const FILTER_FAMILIES = [
  "butterworth",
  "chebyshev",
  "inverse-chebyshev",
  "bessel",
  "elliptic",
] as const;
export const FILTER_SHAPES = ["lowpass", "highpass", "bandpass", "bandstop"] as const;
export const HIGHEST_ORDER = 30;

export type FilterFamily = (typeof FILTER_FAMILIES)[number];
export type FilterShape = (typeof FILTER_SHAPES)[number];

/** A low-pass prototype. `rippleDb` belongs to chebyshev and elliptic, `stopDb` to inverse-chebyshev and elliptic. */
export interface PrototypeSpec {
  readonly family: FilterFamily;
  /** Whole number from 1 to 30. */
  readonly order: number;
  /** Greatest pass-band loss in dB. */
  readonly rippleDb?: number | undefined;
  /** Least stop-band loss in dB. */
  readonly stopDb?: number | undefined;
}

/** A problem with the part of the `filter` stage it is about; its text does not name the part again. */
export interface FilterProblem extends Problem {
  readonly part: "order" | "ripple" | "stop" | "corner" | "low" | "high";
}

export const hasRipple = (family: FilterFamily): boolean => family === "chebyshev" || family === "elliptic";
export const hasStop = (family: FilterFamily): boolean =>
  family === "inverse-chebyshev" || family === "elliptic";

/** Losses outside this range only lead out of the range of double precision. */
const LEAST_LOSS_DB = 1e-9;
const GREATEST_LOSS_DB = 1000;

/** The spec itself, or what is wrong with it. */
export function checkPrototype<S extends PrototypeSpec>(spec: S): Result<S, FilterProblem> {
  const problem =
    orderProblem(spec.order) ??
    (hasRipple(spec.family) ? lossProblem("ripple", spec.rippleDb, spec.family) : undefined) ??
    (hasStop(spec.family) ? lossProblem("stop", spec.stopDb, spec.family) : undefined) ??
    (spec.family === "elliptic" ? ellipticProblem(spec) : undefined);
  return problem ? fail(problem) : ok(spec);
}

function orderProblem(order: number): FilterProblem | undefined {
  if (Number.isInteger(order) && order >= 1 && order <= HIGHEST_ORDER) return undefined;
  return { part: "order", found: `${order}`, allowed: `a whole number from 1 to ${HIGHEST_ORDER}` };
}

function lossProblem(
  part: "ripple" | "stop",
  lossDb: number | undefined,
  family: FilterFamily,
): FilterProblem | undefined {
  const allowed = `from ${LEAST_LOSS_DB} to ${GREATEST_LOSS_DB} dB`;
  if (lossDb === undefined) return { part, found: `it is missing, and ${family} needs it`, allowed };
  if (lossDb >= LEAST_LOSS_DB && lossDb <= GREATEST_LOSS_DB) return undefined;
  return { part, found: `${lossDb} dB`, allowed };
}

function ellipticProblem(spec: PrototypeSpec): FilterProblem | undefined {
  const rippleDb = spec.rippleDb!;
  const stopDb = spec.stopDb!;
  if (stopDb <= rippleDb) {
    return {
      part: "stop",
      found: `${stopDb} dB is not above the ripple`,
      allowed: `more than ${rippleDb} dB`,
    };
  }
  const largest = largestEllipticOrder(rippleDb, stopDb, HIGHEST_ORDER);
  if (spec.order <= largest) return undefined;
  const reason = "the stop band would start closer to the corner than frequencies can be told apart";
  if (largest === 0)
    return {
      part: "stop",
      found: `${stopDb} dB with a ripple of ${rippleDb} dB: ${reason}`,
      allowed: "a stop further above the ripple",
    };
  return {
    part: "order",
    found: `${spec.order}: ${reason}`,
    allowed: `up to ${largest} with this ripple and stop`,
  };
}
