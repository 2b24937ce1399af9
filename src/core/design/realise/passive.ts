import { makeChain } from "../../chain.ts";
import { isolating } from "../../elements/make.ts";
import { ladderValues } from "../../filters/ladder-values.ts";
import { designSections, type FilterSpec } from "../../filters/transform.ts";
import { rational } from "../../rational.ts";
import { logSpaced } from "../../response/grid.ts";
import { Sampler } from "../../response/sampled.ts";
import { fail, ok, type Problem, type Result } from "../../result.ts";
import { buildStage } from "../../stages/build.ts";
import { nearestInSeries, type SeriesName, stepInSeries } from "../../units/e-series.ts";
import type { Requirement } from "../requirement.ts";
import type { PartsBin, RealisedStage, Steps } from "./types.ts";

const WEIGHED_AT = 60;
const MOST_ROUNDS = 12;

/** A capacitor to common comes first: it takes fewest inductors. Element by element in turns. */
const isCapacitor = (k: number): boolean => k % 2 === 0;

/**
 * The filter as an LC ladder between the given source resistance and its load, of series values: each starts at the
 * member next to the published element value, then one after the other is moved to a neighbour as long as the departure
 * from the ideal response, level apart, gets less. One round a step.
 */
export function* ladderSteps(spec: FilterSpec, requirement: Requirement, bin: PartsBin): Steps {
  const published = ladderValues(spec);
  if (!published.ok) return fail<Problem>(published.problem);
  const ideal = idealGain(spec, requirement);
  if (!ideal.ok) return ideal;
  const { g, load } = published.value;
  const omega = 2 * Math.PI * (spec.cornerHz as number);
  const sourceOhm = bin.resistanceOhm;
  // After a first shunt capacitor g(n+1) is a resistance for odd n and a conductance for even n.
  const exactLoad = g.length % 2 === 1 ? load * sourceOhm : sourceOhm / load;
  const loadOhm = load === 1 ? sourceOhm : (nearestInSeries(exactLoad, bin.resistors) ?? exactLoad);
  const exactValues = g.map((value, k) =>
    isCapacitor(k) ? value / (omega * sourceOhm) : (value * sourceOhm) / omega,
  );
  const series: SeriesName = bin.resistors;
  const weigh = weigher(ideal.value, sourceOhm, loadOhm);
  const values = yield* refined(
    exactValues.map((value) => nearestInSeries(value, series) ?? value),
    series,
    weigh,
  );
  const { error } = weigh(values);
  const { freqsHz } = ideal.value;
  const worst = (upToHz: number) =>
    Math.max(...Array.from(error, (each, k) => (freqsHz[k] <= upToHz * (1 + 1e-9) ? Math.abs(each) : 0)));
  return ok({
    stages: stagesOf(values),
    sourceOhm,
    loadOhm,
    passErrorDb: worst(requirement.passHz),
    stopErrorDb: worst(requirement.stopHz),
    warnings: [inductorWarning(spec)],
  });
}

/** How much the Q of the inductors has to be, so that it rounds the corner by no more than some tenths of a decibel. */
const inductorWarning = ({ order }: FilterSpec): string =>
  `inductors are taken without loss; at the corner their Q should be well above ${20 * order}, or the corner is rounded`;

interface IdealGain {
  readonly freqsHz: Float64Array;
  readonly gainDb: Float64Array;
}

function idealGain(spec: FilterSpec, { passHz, stopHz }: Requirement): Result<IdealGain> {
  const sections = designSections(spec);
  if (!sections.ok) return fail<Problem>(sections.problem);
  const freqsHz = logSpaced(passHz / 10, stopHz, WEIGHED_AT);
  const stage = { name: "", kind: "filter", elements: [isolating(sections.value, {})] };
  return ok({ freqsHz, gainDb: new Sampler(freqsHz).response(makeChain({ stages: [stage] })).gainDb });
}

interface Weighed {
  readonly error: Float64Array;
  readonly worst: number;
}

type Weigh = (values: readonly number[]) => Weighed;

/** Departure from the ideal gain; resistances divide the voltage, and so the level at the lowest frequency is the zero. */
function weigher({ freqsHz, gainDb }: IdealGain, sourceOhm: number, loadOhm: number): Weigh {
  const sampler = new Sampler(freqsHz);
  return (values) => {
    const chain = makeChain({
      source: rational([sourceOhm]),
      stages: stagesOf(values).map(({ kind, name, values: parts }) => buildStage(kind, parts, name)),
      load: rational([loadOhm]),
    });
    const found = sampler.response(chain).gainDb;
    const level = found[0] - gainDb[0];
    const error = Float64Array.from(found, (value, k) => value - gainDb[k] - level);
    return { error, worst: error.reduce((most, each) => Math.max(most, Math.abs(each)), 0) };
  };
}

function* refined(
  start: readonly number[],
  series: SeriesName,
  weigh: Weigh,
): Generator<void, readonly number[]> {
  let [best, least] = [start, weigh(start).worst];
  for (let round = 0; round < MOST_ROUNDS; round++) {
    yield;
    const before = least;
    for (let k = 0; k < best.length; k++) {
      for (const direction of ["up", "down"] as const) {
        const moved = stepInSeries(best[k], series, direction);
        if (moved === undefined) continue;
        const tried = best.with(k, moved);
        const { worst } = weigh(tried);
        if (worst < least) [best, least] = [tried, worst];
      }
    }
    if (least === before) return best;
  }
  return best;
}

const stagesOf = (values: readonly number[]): readonly RealisedStage[] =>
  values.map((value, k) =>
    isCapacitor(k)
      ? { kind: "shunt", name: `C${Math.floor(k / 2) + 1}`, values: { C: value } }
      : { kind: "series", name: `L${Math.floor(k / 2) + 1}`, values: { L: value } },
  );
