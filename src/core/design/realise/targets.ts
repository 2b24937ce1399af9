import { modulus } from "../../complex.ts";
import { designRoots, type FilterSpec } from "../../filters/transform.ts";
import { fail, ok, type Problem, type Result } from "../../result.ts";
import { qOf } from "../figures.ts";
import type { SectionTarget } from "./types.ts";

/** Families whose nulls neither of the sections here nor a plain ladder has. */
const WITH_NULLS = ["elliptic", "inverse-chebyshev"];

/** The filter's sections by pole, lowest Q first: what is clipped least comes last. Common practice, no source. */
export function sectionTargets(spec: FilterSpec): Result<readonly SectionTarget[]> {
  if (WITH_NULLS.includes(spec.family)) {
    return fail({
      found: `${spec.family} has nulls, which these sections have not`,
      allowed: "butterworth, chebyshev or bessel",
    });
  }
  const roots = designRoots(spec);
  if (!roots.ok) return fail<Problem>(roots.problem);
  const targets = roots.value.poles
    .filter(({ im }) => im >= 0)
    .map((pole): SectionTarget => {
      const f0Hz = modulus(pole) / (2 * Math.PI);
      return pole.im === 0 ? { f0Hz } : { f0Hz, q: qOf(pole) };
    });
  return ok(targets.sort((one, other) => (one.q ?? 0) - (other.q ?? 0)));
}
