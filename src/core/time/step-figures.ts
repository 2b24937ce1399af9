import { modulus } from "../complex.ts";
import { type StepTerms, stepAt } from "./step-terms.ts";

/** What is read off a step response. Times in s, NaN where there is none. */
export interface StepFigures {
  readonly finalValue: number;
  /** Half of the final value is reached. */
  readonly delayS: number;
  /** From a tenth to nine tenths. */
  readonly riseTimeS: number;
  /** Of the final value, 0 where it is never exceeded. */
  readonly overshootPercent: number;
  /** From here on it stays within the band. */
  readonly settlingTimeS: number;
}

/** So many points to the shortest of the response's own times. */
const POINTS_PER_TIME = 24;
const MOST_POINTS = 60_000;
const BISECTIONS = 60;

/**
 * Figures of a step response given by its exponentials, every time refined by bisection on the exact sum. `within` is
 * the band around the final value as a part of it.
 */
export function stepFigures(step: StepTerms, within = 0.001): StepFigures {
  const endS = endOf(step, within);
  const count = Math.min(MOST_POINTS, Math.max(400, Math.ceil(endS * fastestOf(step) * POINTS_PER_TIME)));
  const value = (timeS: number) => stepAt(step, timeS) / step.final;
  const samples = Float64Array.from({ length: count + 1 }, (_, k) => value((endS * k) / count));
  const timeAt = (k: number) => (endS * k) / count;
  const first = (level: number) => {
    const k = samples.findIndex((sample) => sample >= level);
    return k <= 0 ? (k === 0 ? 0 : Number.NaN) : crossing(value, timeAt(k - 1), timeAt(k), level);
  };
  return {
    finalValue: step.final,
    delayS: first(0.5),
    riseTimeS: first(0.9) - first(0.1),
    overshootPercent: overshoot(value, samples, timeAt),
    settlingTimeS: settling(value, samples, timeAt, within),
  };
}

/** Beyond this time nothing leaves a tenth of the band any more. */
function endOf({ terms, final }: StepTerms, within: number): number {
  const wanted = (within * Math.abs(final)) / (10 * Math.max(1, terms.length));
  return terms.reduce((end, { pole, amplitude }) => {
    const decades = Math.log(Math.max(modulus(amplitude) / wanted, Math.E));
    return Math.max(end, decades / -pole.re);
  }, 0);
}

const fastestOf = ({ terms }: StepTerms): number =>
  terms.reduce((most, { pole }) => Math.max(most, Math.abs(pole.im) / (2 * Math.PI), -pole.re / 10), 0);

type Value = (timeS: number) => number;

function crossing(value: Value, fromS: number, toS: number, level: number): number {
  const rises = value(toS) >= level;
  let [low, high] = [fromS, toS];
  for (let k = 0; k < BISECTIONS; k++) {
    const middle = (low + high) / 2;
    if (value(middle) >= level === rises) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}

/** The greatest value above the final one, refined between the samples beside it by golden sections. */
function overshoot(value: Value, samples: Float64Array, timeAt: (k: number) => number): number {
  let best = 0;
  for (let k = 1; k < samples.length; k++) if (samples[k] > samples[best]) best = k;
  let [low, high] = [timeAt(Math.max(0, best - 1)), timeAt(Math.min(samples.length - 1, best + 1))];
  const golden = (Math.sqrt(5) - 1) / 2;
  for (let k = 0; k < BISECTIONS; k++) {
    const [left, right] = [high - golden * (high - low), low + golden * (high - low)];
    if (value(left) > value(right)) high = right;
    else low = left;
  }
  const excess = Math.max(samples[best], value((low + high) / 2)) - 1;
  return excess > ROUNDING ? 100 * excess : 0;
}

/** What exponentials sum up to is exact to about this. */
const ROUNDING = 1e-9;

function settling(
  value: Value,
  samples: Float64Array,
  timeAt: (k: number) => number,
  within: number,
): number {
  const last = samples.findLastIndex((sample) => Math.abs(sample - 1) > within);
  if (last < 0) return 0;
  if (last === samples.length - 1) return Number.NaN;
  const level = samples[last] > 1 ? 1 + within : 1 - within;
  return crossing(value, timeAt(last), timeAt(last + 1), level);
}
