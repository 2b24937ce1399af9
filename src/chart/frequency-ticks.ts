import { plainDecimal, significantDigits } from "../core/units/decimal.ts";
import { prefixFor } from "../core/units/prefix.ts";
import { columnOfFrequency, columnsPerDecade, type FrequencyScale } from "./scale.ts";

export interface FrequencyTick {
  readonly freqHz: number;
  readonly column: number;
  readonly kind: "decade" | "minor";
  /** `100`, `2k`; empty where there is no room. Without unit. */
  readonly label: string;
}

/** So many columns to a decade make room for marks at 2 and 5, and for their labels. */
const COLUMNS_FOR_MINOR = 10;
const COLUMNS_FOR_MINOR_LABELS = 24;
/** A label of up to four characters with a blank. */
const LABEL_PITCH = 6;
/** A zoomed axis gets about one label to so many columns. */
const ZOOMED_PITCH = 12;

/**
 * Marks of a frequency axis, ascending: the decades, and 2 and 5 times them where there is room. An axis that holds
 * fewer than two of all these gets equal round steps instead.
 */
export function frequencyTicks(scale: FrequencyScale): readonly FrequencyTick[] {
  if (scale.columns < 2) return [];
  const marks = decadeMarks(scale);
  return marks.length >= 2 ? marks : zoomedMarks(scale);
}

function decadeMarks(scale: FrequencyScale): readonly FrequencyTick[] {
  const perDecade = columnsPerDecade(scale);
  const stride = Math.ceil(LABEL_PITCH / perDecade);
  const ticks: FrequencyTick[] = [];
  const first = Math.floor(Math.log10(scale.fromHz)) - 1;
  for (let exponent = first; exponent <= Math.log10(scale.toHz) + 1; exponent++) {
    for (const factor of perDecade >= COLUMNS_FOR_MINOR ? [1, 2, 5] : [1]) {
      const freqHz = Number(`${factor}e${exponent}`);
      const column = columnOfFrequency(scale, freqHz);
      if (column === undefined) continue;
      const labelled = factor === 1 ? exponent % stride === 0 : perDecade >= COLUMNS_FOR_MINOR_LABELS;
      const label = labelled ? shortFrequency(freqHz) : "";
      ticks.push({ freqHz, column, kind: factor === 1 ? "decade" : "minor", label });
    }
  }
  return ticks;
}

function zoomedMarks(scale: FrequencyScale): readonly FrequencyTick[] {
  const { fromHz, toHz, columns } = scale;
  const stepHz = roundStep((toHz - fromHz) / Math.max(2, columns / ZOOMED_PITCH));
  const ticks: FrequencyTick[] = [];
  for (let k = Math.ceil(fromHz / stepHz); k * stepHz <= toHz; k++) {
    const freqHz = Number((k * stepHz).toPrecision(12));
    const column = columnOfFrequency(scale, freqHz);
    if (column !== undefined) ticks.push({ freqHz, column, kind: "minor", label: shortFrequency(freqHz) });
  }
  return ticks;
}

/** The next of 1, 2, 5 times a power of ten. */
function roundStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  return power * ([1, 2, 5, 10].find((factor) => factor * power >= least) ?? 10);
}

/** A frequency without its unit, `4.7k`; beyond the prefixes as a power of ten. */
export function shortFrequency(freqHz: number): string {
  const { digits, exponent } = significantDigits(freqHz);
  const step = 3 * Math.floor(exponent / 3);
  const prefix = prefixFor(step);
  return prefix === undefined ? freqHz.toExponential() : plainDecimal(digits, exponent - step) + prefix;
}
