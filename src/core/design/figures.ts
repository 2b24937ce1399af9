import { makeChain } from "../chain.ts";
import { type Complex, modulus } from "../complex.ts";
import { isolating } from "../elements/make.ts";
import { FILTER_FAMILIES, type FilterFamily } from "../filters/spec.ts";
import { designRoots, designSections, type FilterSpec } from "../filters/transform.ts";
import { rational } from "../rational.ts";
import { readAt } from "../response/exact.ts";
import { logSpaced } from "../response/grid.ts";
import { fail, ok, type Problem, type Result } from "../result.ts";
import { stepFigures } from "../time/step-figures.ts";
import { stepTerms } from "../time/step-terms.ts";
import { leastDesign } from "./least-order.ts";
import type { Requirement } from "./requirement.ts";

/** One family's answer to a requirement, to be set beside the others. */
export interface FamilyFigures {
  readonly spec: FilterSpec;
  readonly highestQ: number;
  /** Greatest less least gain up to the pass edge. */
  readonly rippleDb: number;
  /** Greatest less least group delay up to the pass edge. */
  readonly delayVariationS: number;
  readonly overshootPercent: number;
  /** To 0.1 % of the final value. */
  readonly settlingTimeS: number;
  readonly lossAtStopDb: number;
}

export interface FamilyAnswer {
  readonly family: FilterFamily;
  readonly figures: Result<FamilyFigures>;
}

/** Every family's filter of least order for the requirement, or why there is none. */
export const compareFamilies = (requirement: Requirement): readonly FamilyAnswer[] =>
  FILTER_FAMILIES.map((family) => familyFigures(family, requirement));

/** One family's filter of least order, or why there is none. */
export const familyFigures = (family: FilterFamily, requirement: Requirement): FamilyAnswer => ({
  family,
  figures: figuresOf(family, requirement),
});

function figuresOf(family: FilterFamily, requirement: Requirement): Result<FamilyFigures> {
  const designed = leastDesign(family, requirement);
  if (!designed.ok) return designed;
  return filterFigures(designed.value, requirement);
}

const BAND_POINTS = 240;
/** How far below the pass edge the band is looked at: below, nothing changes any more. */
const BAND_DECADES = 2;

export function filterFigures(spec: FilterSpec, requirement: Requirement): Result<FamilyFigures> {
  const sections = designSections(spec);
  const roots = designRoots(spec);
  if (!sections.ok) return fail<Problem>(sections.problem);
  if (!roots.ok) return fail<Problem>(roots.problem);
  const chain = makeChain({
    source: rational([0]),
    stages: [{ name: "filter", kind: "filter", elements: [isolating(sections.value, {})] }],
  });
  const { passHz, stopHz } = requirement;
  const band = Array.from(logSpaced(passHz / 10 ** BAND_DECADES, passHz, BAND_POINTS), (freqHz) =>
    readAt(chain, freqHz),
  );
  const { zeros, poles } = roots.value;
  const dcGain = 10 ** (readAt(chain, passHz * 1e-6).gainDb / 20);
  const { overshootPercent, settlingTimeS } = stepFigures(stepTerms(zeros, poles, dcGain));
  return ok({
    spec,
    highestQ: Math.max(...poles.map(qOf)),
    rippleDb: spanOf(band.map(({ gainDb }) => gainDb)),
    delayVariationS: spanOf(band.map(({ groupDelayS }) => groupDelayS)),
    overshootPercent,
    settlingTimeS,
    lossAtStopDb: 0 - readAt(chain, stopHz).gainDb,
  });
}

/** `|p| / (−2·Re p)`; a real pole counts as 0.5. */
export const qOf = (pole: Complex): number => modulus(pole) / (-2 * pole.re);

const spanOf = (values: readonly number[]): number => Math.max(...values) - Math.min(...values);
