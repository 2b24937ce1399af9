import type { Chain } from "../chain.ts";
import { wrapDeg } from "../units/decibel.ts";
import { readAt } from "./exact.ts";
import { decadesBetween, logSpaced, middleHz, type Sweep } from "./grid.ts";
import { marksOf } from "./marks.ts";
import { type SampledResponse, Sampler } from "./sampled.ts";

/** A larger step between two frequencies is halved until it is smaller. */
const LARGEST_STEP_DEG = 60;
/** Where halving ends the step is a real one, at a null or at a pole on the axis. */
const CLOSEST_RATIO = 1 + 1e-11;

/**
 * Continuous phase in degrees over the response's own grid, starting at the wrapped phase of its first frequency.
 * NaN where there is none. `marks` are frequencies that must be looked at between the grid's (see marks.ts).
 *
 * Pure delay is taken out first, so that a long line or delay costs no extra points.
 */
export function unwrapAlong(chain: Chain, response: SampledResponse, marks: readonly number[]): Float64Array {
  const { freqHz, phaseDeg } = response;
  const track = new PhaseTrack(chain);
  const unwrapped = new Float64Array(freqHz.length);
  let next = 0;
  for (let k = 0; k < freqHz.length; k++) {
    for (; next < marks.length && marks[next] < freqHz[k]; next++) track.visit(marks[next]);
    unwrapped[k] = track.visit(freqHz[k], phaseDeg[k]);
  }
  return unwrapped;
}

/** Points per decade of the walk to single frequencies. */
const WALK_PER_DECADE = 30;

/**
 * Continuous phase at single frequencies (ascending, Hz), counted from the wrapped phase at the start of the sweep,
 * whether they lie within it or not. NaN at a null and where there is no value.
 */
export function unwrappedAt(chain: Chain, sweep: Sweep, freqHz: readonly number[]): readonly number[] {
  if (freqHz.length === 0) return [];
  const fromHz = Math.min(sweep.fromHz, freqHz[0]);
  const toHz = Math.max(sweep.fromHz, freqHz[freqHz.length - 1]);
  const steps = Math.max(2, Math.ceil(decadesBetween(fromHz, toHz) * WALK_PER_DECADE) + 1);
  const walk =
    toHz > fromHz ? [...logSpaced(fromHz, toHz, steps), ...marksOf(chain, fromHz, toHz)] : [fromHz];
  const exactly = new Set([...freqHz, sweep.fromHz]);
  const stops = [...new Set([...walk, ...exactly])].sort((a, b) => a - b);
  // On the way the array loops will do; they are quicker by far, above all where the program has just started.
  const { phaseDeg } = new Sampler(Float64Array.from(stops)).response(chain);
  const track = new PhaseTrack(chain);
  const phases = new Map(
    stops.map((stop, k) => [stop, exactly.has(stop) ? track.visit(stop) : track.visit(stop, phaseDeg[k])]),
  );
  const start = phases.get(sweep.fromHz) as number;
  const turns = Number.isNaN(start) ? 0 : wrapDeg(start) - start;
  return freqHz.map((freq) => (phases.get(freq) as number) + turns);
}

/** Follows the phase from frequency to frequency, upwards. */
class PhaseTrack {
  readonly #chain: Chain;
  readonly #delayS: number;
  #last: { freqHz: number; wrappedDeg: number; phaseDeg: number } | undefined;

  constructor(chain: Chain) {
    this.#chain = chain;
    this.#delayS = pureDelayS(chain);
  }

  /** Continuous phase at the next frequency up; its wrapped phase need not be read again where it is known. */
  visit(freqHz: number, wrappedDeg: number = readAt(this.#chain, freqHz).phaseDeg): number {
    if (Number.isNaN(wrappedDeg)) return Number.NaN;
    const last = this.#last;
    const phaseDeg =
      last === undefined
        ? wrappedDeg
        : last.phaseDeg + this.#step(last.freqHz, last.wrappedDeg, freqHz, wrappedDeg);
    this.#last = { freqHz, wrappedDeg, phaseDeg };
    return phaseDeg;
  }

  #step(fromHz: number, fromDeg: number, toHz: number, toDeg: number): number {
    const delayDeg = -360 * this.#delayS * (toHz - fromHz);
    const stepDeg = wrapDeg(toDeg - fromDeg - delayDeg);
    if (Math.abs(stepDeg) <= LARGEST_STEP_DEG) return stepDeg + delayDeg;
    if (toHz / fromHz < CLOSEST_RATIO) return this.#jump(fromHz, toHz, stepDeg) + delayDeg;
    const betweenHz = middleHz(fromHz, toHz);
    const betweenDeg = readAt(this.#chain, betweenHz).phaseDeg;
    if (Number.isNaN(betweenDeg)) return this.#jump(fromHz, toHz, stepDeg) + delayDeg;
    return (
      this.#step(fromHz, fromDeg, betweenHz, betweenDeg) + this.#step(betweenHz, betweenDeg, toHz, toDeg)
    );
  }

  /** A null on the axis turns the phase up by 180°, a pole there down: the limit of roots just left of the axis. */
  #jump(fromHz: number, toHz: number, stepDeg: number): number {
    const rises = this.#gainDb(middleHz(fromHz, toHz)) < this.#gainDb(fromHz * (1 - 1e-6));
    if (rises) return stepDeg < 0 ? stepDeg + 360 : stepDeg;
    return stepDeg > 0 ? stepDeg - 360 : stepDeg;
  }

  #gainDb(freqHz: number): number {
    return readAt(this.#chain, freqHz).gainDb;
  }
}

function pureDelayS(chain: Chain): number {
  let delayS = 0;
  for (const { elements } of chain.stages) {
    for (const element of elements) {
      if (element.form === "distributed") delayS += element.delayS;
      else if (element.form === "isolating" && element.transfer.type === "irrational")
        delayS += element.transfer.delayS;
    }
  }
  return delayS;
}
