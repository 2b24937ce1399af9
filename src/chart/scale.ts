import { decadesBetween, middleHz } from "../core/response/grid.ts";

/** A logarithmic frequency axis over whole columns: the first column is `fromHz`, the last is `toHz`. */
export interface FrequencyScale {
  readonly fromHz: number;
  readonly toHz: number;
  /** Columns of the drawing itself, axis and labels not counted. */
  readonly columns: number;
}

/** Cells of the labels on the left; one more holds the axis. */
export const LABEL_COLUMNS = 7;

/** Cells left of the drawing: labels and axis. */
export const MARGIN_COLUMNS = LABEL_COLUMNS + 1;

/** Columns of the drawing in a chart that is `columns` cells wide in all; 0 where nothing fits. */
export const plotColumns = (columns: number): number => Math.max(0, columns - MARGIN_COLUMNS);

/** Frequency in Hz at the middle of a column (whole or not): `fromHz·(toHz/fromHz)^(column/(columns−1))`. */
export function frequencyOfColumn({ fromHz, toHz, columns }: FrequencyScale, column: number): number {
  if (columns < 2) return middleHz(fromHz, toHz);
  if (column === columns - 1) return toHz;
  const part = column / (columns - 1);
  const ratio = toHz / fromHz;
  // Their ratio may be beyond a double.
  return ratio < Infinity ? fromHz * ratio ** part : fromHz ** (1 - part) * toHz ** part;
}

/** The column nearest to a frequency in Hz; undefined outside the axis. */
export function columnOfFrequency(scale: FrequencyScale, freqHz: number): number | undefined {
  const { fromHz, toHz, columns } = scale;
  if (columns < 1 || !(freqHz >= fromHz && freqHz <= toHz)) return undefined;
  if (columns === 1 || fromHz === toHz) return 0;
  return Math.round((columns - 1) * (decadesBetween(fromHz, freqHz) / decadesBetween(fromHz, toHz)));
}

/** First and last column that a span of frequencies touches; undefined where it lies outside the axis. */
export function columnsBetween(
  scale: FrequencyScale,
  fromHz: number,
  toHz: number,
): readonly [first: number, last: number] | undefined {
  const first = columnOfFrequency(scale, Math.max(fromHz, scale.fromHz));
  const last = columnOfFrequency(scale, Math.min(toHz, scale.toHz));
  return first === undefined || last === undefined || first > last ? undefined : [first, last];
}

export function columnsPerDecade({ fromHz, toHz, columns }: FrequencyScale): number {
  return (columns - 1) / decadesBetween(fromHz, toHz);
}
