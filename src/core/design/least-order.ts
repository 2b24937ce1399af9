import { quarterPeriodRatio } from "../filters/elliptic-functions.ts";
import { excessPower } from "../filters/sections.ts";
import { type FilterFamily, HIGHEST_ORDER } from "../filters/spec.ts";
import type { FilterSpec } from "../filters/transform.ts";
import { fail, ok, type Problem, type Result } from "../result.ts";
import { besselDesign } from "./bessel-edges.ts";
import type { Requirement } from "./requirement.ts";

/** An order this little above a whole number is that number. */
const ROUNDING = 1e-9;

/** `√((10^(stop/10) − 1) / (10^(pass/10) − 1))`, through expm1 so that small losses keep their digits. */
export const discriminationOf = ({ passLossDb, stopLossDb }: Requirement): number =>
  Math.sqrt(excessPower(stopLossDb) / excessPower(passLossDb));

/**
 * The low-pass filter of least order that meets both edges; what is left over is given to the stop band, but for the
 * elliptic filter, which reaches its stop loss before the edge.
 *
 * With d² = (10^(As/10) − 1)/(10^(Ap/10) − 1) and k = stop/pass: Butterworth ln d / ln k, Chebyshev and its inverse
 * acosh d / acosh k, elliptic by the degree equation n = K(1/k)·K'(1/d) / (K'(1/k)·K(1/d)); Bessel by search.
 * Source: Daniels, Approximation Methods for Electronic Filter Design (1974); Orfanidis (2006) for the elliptic one.
 */
export function leastDesign(family: FilterFamily, requirement: Requirement): Result<FilterSpec> {
  if (family === "bessel") return besselDesign(requirement);
  const exact = exactOrder(family, requirement);
  const order = Math.max(1, Math.ceil(exact - ROUNDING));
  if (order > HIGHEST_ORDER) {
    return fail(tooHigh(family, `order ${order} would be needed`));
  }
  return ok(specOf(family, order, requirement));
}

export const tooHigh = (family: FilterFamily, found: string): Problem => ({
  found: `${family}: ${found}`,
  allowed: `up to order ${HIGHEST_ORDER}: edges further apart, less loss, or another family`,
});

function exactOrder(family: Exclude<FilterFamily, "bessel">, requirement: Requirement): number {
  const d = discriminationOf(requirement);
  const k = requirement.stopHz / requirement.passHz;
  switch (family) {
    case "butterworth":
      return Math.log(d) / Math.log(k);
    case "chebyshev":
    case "inverse-chebyshev":
      return Math.acosh(d) / Math.acosh(k);
    case "elliptic":
      return quarterPeriodRatio(modulus(1 / d)) / quarterPeriodRatio(modulus(1 / k));
  }
}

const modulus = (k: number) => ({ k, kc: Math.sqrt((1 - k) * (1 + k)) });

function specOf(
  family: Exclude<FilterFamily, "bessel">,
  order: number,
  requirement: Requirement,
): FilterSpec {
  const { passHz, passLossDb, stopLossDb } = requirement;
  const shared = { shape: "lowpass", family, order } as const;
  switch (family) {
    case "butterworth":
      return { ...shared, cornerHz: passHz / excessPower(passLossDb) ** (1 / (2 * order)) };
    case "chebyshev":
      return { ...shared, cornerHz: passHz, rippleDb: passLossDb };
    case "elliptic":
      return { ...shared, cornerHz: passHz, rippleDb: passLossDb, stopDb: stopLossDb };
    case "inverse-chebyshev": {
      // T_n(stop/pass) = d gives where the loss is reached, T_n(stop/corner) = √(10^(As/10) − 1) the half-power point.
      const reachedHz = passHz * Math.cosh(Math.acosh(discriminationOf(requirement)) / order);
      const atHalfPower = Math.sqrt(excessPower(stopLossDb));
      return {
        ...shared,
        cornerHz: reachedHz / Math.cosh(Math.acosh(atHalfPower) / order),
        stopDb: stopLossDb,
      };
    }
  }
}
