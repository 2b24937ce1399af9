import type { Chain } from "../core/chain.ts";
import { logSpaced } from "../core/response/grid.ts";
import { marksOf } from "../core/response/marks.ts";
import { unwrapAlong } from "../core/response/phase.ts";
import { Sampler } from "../core/response/sampled.ts";
import { finiteSpan, shownSamples } from "./narrow.ts";
import { withMarks } from "./samples.ts";
import type { FrequencyScale } from "./scale.ts";

/** What the charts draw, one value to a column. */
export interface Traces {
  /** Middles of the columns, both ends of the axis included. */
  readonly freqHz: Float64Array;
  /** −Infinity at a null; NaN where a measured response has no value. */
  readonly gainDb: Float64Array;
  /** Continuous, unless `phaseIsWrapped`: then in (−180, 180]. NaN where there is none. */
  readonly phaseDeg: Float64Array;
  /** The continuous phase spans too many turns to be read. */
  readonly phaseIsWrapped: boolean;
  /** Frequencies in Hz, ascending, whose gain stands in a column in place of that at its middle. */
  readonly marksUsed: readonly number[];
}

const SAMPLES_PER_COLUMN = 4;
/** A departure is shown from this part of the trace's span on, and never later than from the fixed ones below. */
const SHOWN_PART = 0.01;
const SHOWN_DB = 0.5;
const SHOWN_DEG = 5;
/** Far above rounding, so that a level trace stays level. */
const LEAST_TOLERANCE = 1e-6;
/** Three turns. */
const MOST_CONTINUOUS_DEG = 1080;
/** A session zooms a lot; the axes looked at last are enough. */
const MOST_SAMPLERS = 4;

/** Makes traces, keeping every stage's samples on the axes used last: after an edit one stage is evaluated anew. */
export class TraceMaker {
  readonly #samplers = new Map<string, Sampler>();

  /**
   * The chain's traces over an axis of at least two columns. A column shows the response at its middle, or the
   * farthest point of a peak or dip that lies between columns (see narrow.ts).
   */
  traces(chain: Chain, scale: FrequencyScale): Traces {
    const marks = marksOf(chain, scale.fromHz, scale.toHz);
    const all = withMarks(chain, this.#sampler(scale).response(chain), marks);
    const { middle, start } = bins(all.freqHz, scale);
    const gainShown = shownSamples({ values: all.gainDb, middle, start }, toleranceOf(all.gainDb, SHOWN_DB));
    const { phaseDeg, isWrapped } = readablePhase(unwrapAlong(chain, all, []), all.phaseDeg);
    const filled = { values: phaseDeg, middle: withPhase(phaseDeg, middle, start), start };
    const phaseShown = shownSamples(filled, toleranceOf(phaseDeg, SHOWN_DEG));
    return {
      freqHz: Float64Array.from(middle, (k) => all.freqHz[k]),
      gainDb: Float64Array.from(gainShown, (k) => all.gainDb[k]),
      phaseDeg: Float64Array.from(phaseShown, (k) => phaseDeg[k]),
      phaseIsWrapped: isWrapped,
      marksUsed: [...gainShown].filter((k, column) => k !== middle[column]).map((k) => all.freqHz[k]),
    };
  }

  #sampler({ fromHz, toHz, columns }: FrequencyScale): Sampler {
    const key = `${fromHz} ${toHz} ${columns}`;
    const sampler =
      this.#samplers.get(key) ?? new Sampler(logSpaced(fromHz, toHz, (columns - 1) * SAMPLES_PER_COLUMN + 1));
    // Taken out and put back, so that the first of the map is the one not used for longest.
    this.#samplers.delete(key);
    this.#samplers.set(key, sampler);
    if (this.#samplers.size > MOST_SAMPLERS)
      this.#samplers.delete(this.#samplers.keys().next().value as string);
    return sampler;
  }
}

const toleranceOf = (values: Float64Array, most: number): number =>
  Math.max(LEAST_TOLERANCE, Math.min(most, SHOWN_PART * finiteSpan(values)));

/** Which of the samples belong to which column, halfway between the columns' middles on the logarithmic axis. */
function bins(freqHz: Float64Array, { fromHz, toHz, columns }: FrequencyScale) {
  const ratio = (toHz / fromHz) ** (1 / (columns - 1));
  const centresHz = logSpaced(fromHz, toHz, (columns - 1) * SAMPLES_PER_COLUMN + 1);
  const middle = new Int32Array(columns);
  const start = new Int32Array(columns + 1);
  let k = 0;
  for (let column = 0; column < columns; column++) {
    const centreHz = centresHz[column * SAMPLES_PER_COLUMN];
    while (k < freqHz.length && freqHz[k] < centreHz / Math.sqrt(ratio)) k++;
    start[column] = k;
    while (freqHz[k] < centreHz) k++;
    middle[column] = k;
  }
  start[columns] = freqHz.length;
  return { middle, start };
}

function readablePhase(continuousDeg: Float64Array, wrappedDeg: Float64Array) {
  const isWrapped = finiteSpan(continuousDeg) > MOST_CONTINUOUS_DEG;
  return { phaseDeg: isWrapped ? wrappedDeg : continuousDeg, isWrapped };
}

/** Where a column's middle is right on a null, the nearest sample of the column that has a phase. */
function withPhase(phaseDeg: Float64Array, middle: Int32Array, start: Int32Array): Int32Array {
  return middle.map((k, column) => {
    for (let away = 0; k - away >= start[column] || k + away < start[column + 1]; away++) {
      if (k - away >= start[column] && !Number.isNaN(phaseDeg[k - away])) return k - away;
      if (k + away < start[column + 1] && !Number.isNaN(phaseDeg[k + away])) return k + away;
    }
    return k;
  });
}
