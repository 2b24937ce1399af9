import type { FilterFamily, FilterShape } from "../filters/spec.ts";
import { checkFilter as checkDesign, designSections, type FilterSpec } from "../filters/transform.ts";
import type { Rational } from "../rational.ts";
import type { Problem } from "../result.ts";

/** Parts of a `filter` stage, by the names they have in a file. */
export interface FilterValues {
  readonly shape: FilterShape;
  readonly family: FilterFamily;
  readonly order: number;
  readonly corner?: number;
  readonly low?: number;
  readonly high?: number;
  readonly ripple?: number;
  readonly stop?: number;
}

function specOf({ shape, family, order, corner, low, high, ripple, stop }: FilterValues): FilterSpec {
  return { shape, family, order, cornerHz: corner, lowHz: low, highHz: high, rippleDb: ripple, stopDb: stop };
}

export function checkFilterValues(values: FilterValues): (Problem & { part: string }) | undefined {
  const checked = checkDesign(specOf(values));
  return checked.ok ? undefined : checked.problem;
}

/** The sections of checked values. Throws a RangeError for values that the check refuses. */
export function filterSections(values: FilterValues): readonly Rational[] {
  const sections = designSections(specOf(values));
  if (!sections.ok) throw new RangeError(`${sections.problem.found}; allowed: ${sections.problem.allowed}`);
  return sections.value;
}
