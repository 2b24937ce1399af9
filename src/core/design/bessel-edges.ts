import { findZero } from "../brent.ts";
import { modulus } from "../complex.ts";
import { lowpassPrototype } from "../filters/prototype.ts";
import { HIGHEST_ORDER } from "../filters/spec.ts";
import type { FilterSpec } from "../filters/transform.ts";
import { fail, ok, type Result } from "../result.ts";
import type { Requirement } from "./requirement.ts";

/**
 * The Bessel filter of least order that meets both edges, by search: its loss grows all the way, and with the order its
 * shape tends to a Gaussian, so that edges close together are met by none.
 */
export function besselDesign({ passHz, passLossDb, stopHz, stopLossDb }: Requirement): Result<FilterSpec> {
  let closest = Infinity;
  for (let order = 1; order <= HIGHEST_ORDER; order++) {
    const lossDb = lossOf(order);
    const [passAt, stopAt] = [edgeOf(lossDb, passLossDb), edgeOf(lossDb, stopLossDb)];
    closest = Math.min(closest, stopAt / passAt);
    if (stopAt / passAt <= (stopHz / passHz) * (1 + 1e-12)) {
      return ok({ shape: "lowpass", family: "bessel", order, cornerHz: passHz / passAt });
    }
  }
  return fail({
    found: `bessel: no order gets from ${passLossDb} dB to ${stopLossDb} dB within ${(stopHz / passHz).toFixed(3)} times the pass edge`,
    allowed: `a stop edge from ${closest.toFixed(3)} times the pass edge on, or another family`,
  });
}

/** Loss in dB over frequency in corners. */
function lossOf(order: number): (x: number) => number {
  const prototype = lowpassPrototype({ family: "bessel", order });
  if (!prototype.ok) throw new RangeError(prototype.problem.found);
  const { poles } = prototype.value;
  return (x) =>
    poles.reduce((sum, pole) => {
      const size = modulus(pole);
      return sum + 20 * Math.log10(Math.hypot(pole.re, x - pole.im) / size);
    }, 0);
}

/** Where the loss is reached. Far out it grows by at least 6 dB an octave. */
function edgeOf(lossDb: (x: number) => number, level: number): number {
  let high = 1;
  while (lossDb(high) < level) high *= 2;
  let low = high / 2;
  while (lossDb(low) > level) low /= 2;
  return Math.exp(findZero((x) => lossDb(Math.exp(x)) - level, Math.log(low), Math.log(high)));
}
