import type { FilterSpec } from "../../filters/transform.ts";
import { logSpaced } from "../../response/grid.ts";
import { fail, ok } from "../../result.ts";
import { formatQuantity } from "../../units/format.ts";
import type { Requirement } from "../requirement.ts";
import { aimedAt } from "./gbw.ts";
import { levelOf, levelStages } from "./level.ts";
import { GainOf, idealGainDb } from "./response.ts";
import type { PairTarget, SectionKind } from "./section-kinds.ts";
import { sectionTargets } from "./targets.ts";
import type { PartsBin, RealisedStage, SectionTarget, Steps } from "./types.ts";

/** Frequencies at which a choice is weighed, from a decade below the pass edge to the stop edge. */
const WEIGHED_AT = 40;

/**
 * The filter as active sections with series values, lowest Q first. Values of a section are chosen jointly, out of every
 * set of capacitors and the resistors beside the exact ones, so that with the sections before it the departure from
 * the ideal response is least up to the stop edge. One section a step, so that a program can do something in between.
 */
export function* activeSteps(
  spec: FilterSpec,
  requirement: Requirement,
  kind: SectionKind,
  bin: PartsBin,
): Steps {
  const targets = sectionTargets(spec);
  if (!targets.ok) return targets;
  const freqsHz = logSpaced(requirement.passHz / 10, requirement.stopHz, WEIGHED_AT);
  const gain = new GainOf(freqsHz);
  const level = levelStages(levelOf(spec), bin);
  const error = new Float64Array(WEIGHED_AT).fill(level.errorDb);
  const stages: RealisedStage[] = [...level.stages];
  const warnings: string[] = [];
  for (const [k, target] of targets.value.entries()) {
    yield;
    const chosen = choose(target, kind, bin, gain, freqsHz, error);
    if (chosen === undefined) return fail(outOfReach(target));
    stages.push(...chosen.stages.map((stage) => named(stage, k + 1)));
    error.set(chosen.error);
    warnings.push(...warningsOf(target, chosen.stages, bin, k + 1));
  }
  const worst = (upToHz: number) =>
    Math.max(...Array.from(error, (each, k) => (freqsHz[k] <= upToHz * (1 + 1e-9) ? Math.abs(each) : 0)));
  return ok({
    stages,
    passErrorDb: worst(requirement.passHz),
    stopErrorDb: worst(requirement.stopHz),
    warnings,
  });
}

const named = (stage: RealisedStage, number: number): RealisedStage => ({
  ...stage,
  name: stage.name === "" ? `section ${number}` : `${stage.name} ${number}`,
});

interface Choice {
  readonly stages: readonly RealisedStage[];
  /** Departure in dB with the sections before. */
  readonly error: Float64Array;
}

function choose(
  target: SectionTarget,
  kind: SectionKind,
  bin: PartsBin,
  gain: GainOf,
  freqsHz: Float64Array,
  before: Float64Array,
): Choice | undefined {
  const ideal = Float64Array.from(freqsHz, (freqHz) => idealGainDb(target, freqHz));
  let best: Choice | undefined;
  let least = Infinity;
  for (const stages of candidatesFor(target, kind, bin)) {
    const found = gain.stages(stages);
    const error = Float64Array.from(found, (value, k) => before[k] + value - ideal[k]);
    const worst = error.reduce((most, each) => Math.max(most, Math.abs(each)), 0);
    if (worst < least) [best, least] = [{ stages, error }, worst];
  }
  return best;
}

function* candidatesFor(
  target: SectionTarget,
  kind: SectionKind,
  bin: PartsBin,
): Iterable<readonly RealisedStage[]> {
  if (target.q === undefined) {
    yield* kind.single(target, bin);
    return;
  }
  const pair: PairTarget = { ...target, q: target.q };
  const aim = bin.gbwHz === undefined ? pair : aimedAt(pair, (tried) => exact(tried, kind, bin));
  for (const stage of kind.pair(aim, bin)) yield [stage];
}

/** The first set of values for an aim: near enough for finding out what the op amp does to it. */
function exact(aim: PairTarget, kind: SectionKind, bin: PartsBin): RealisedStage | undefined {
  for (const stage of kind.pair(aim, { ...bin, resistors: "E192" })) return stage;
  return undefined;
}

const outOfReach = ({ f0Hz, q }: SectionTarget) => ({
  found: `no series values make a section of ${formatQuantity(f0Hz, "hertz")} with a Q of ${(q ?? 0.5).toPrecision(3)}`,
  allowed: "another impedance level or series",
});

/** An op amp is quick enough from here on, in Q times the section's frequency: common practice, no source. */
const GBW_FACTOR = 100;
/** Values further apart are hard to buy with the same tolerance: common practice, no source. */
const MOST_SPREAD = 100;

function warningsOf(
  { f0Hz, q = 0.5 }: SectionTarget,
  stages: readonly RealisedStage[],
  { gbwHz }: PartsBin,
  number: number,
): readonly string[] {
  const wantedHz = GBW_FACTOR * q * f0Hz;
  const warnings: string[] = [];
  if (gbwHz !== undefined && gbwHz < wantedHz) {
    warnings.push(
      `section ${number}: a gain-bandwidth product of ${formatQuantity(gbwHz, "hertz")} is low for ` +
        `${formatQuantity(f0Hz, "hertz")} with a Q of ${q.toPrecision(3)}; ${formatQuantity(wantedHz, "hertz", 2)} is comfortable`,
    );
  }
  for (const letter of ["R", "C"]) {
    const values = stages.flatMap((stage) =>
      Object.entries(stage.values).flatMap(([name, value]) => (name.startsWith(letter) ? [value] : [])),
    );
    const spread = Math.max(...values) / Math.min(...values);
    if (spread > MOST_SPREAD) {
      warnings.push(`section ${number}: ${letter} values are ${spread.toPrecision(3)} to 1 apart`);
    }
  }
  return warnings;
}
