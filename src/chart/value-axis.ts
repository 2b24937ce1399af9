/** Bounds of a chart in dB or degrees. */
export interface ValueRange {
  readonly low: number;
  readonly high: number;
}

/** The vertical axis of a chart: its bounds and the values that carry a label. */
export interface ValueAxis extends ValueRange {
  readonly ticks: readonly number[];
}

/** Round steps in dB and in degrees. */
const GAIN_STEPS = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 40, 60, 100, 200, 500, 1000, 2000, 5000, 10_000];
const PHASE_STEPS = [45, 90, 180, 360, 720, 1440, 3600, 7200, 14_400, 36_000, 144_000, 1_440_000];

/** Closer together, labels crowd. */
const LEAST_ROWS_PER_STEP = 2;
/** A lone dip lengthens the axis by no more than this, so that one null does not flatten all the rest. */
const DIP_DB = 40;
/** Nothing farther below the top is shown unless it is asked for. */
const MOST_SPAN_DB = 120;
const LEAST_SPAN_DB = 1;
/** What reaches this little beyond the outermost row is drawn on it all the same. */
const SLACK_ROWS = 0.25;

/**
 * An axis for gains in dB over `rows` rows, with every label right on a row.
 *
 * The top is the greatest value. The bottom is the least, but no more than 40 dB below the least that is no lone dip
 * (a dip one column wide; a null counts as 40 dB), and no more than 120 dB below the top. At least 1 dB is shown.
 */
export function gainAxis(rows: number, traces: readonly ArrayLike<number>[]): ValueAxis {
  const extents = traces.map(gainExtent).filter((extent) => extent !== undefined);
  if (extents.length === 0) return fitted({ low: -DIP_DB, high: 0 }, rows, GAIN_STEPS);
  const high = Math.max(...extents.map((extent) => extent.high));
  const low = Math.max(Math.min(...extents.map((extent) => extent.low)), high - MOST_SPAN_DB);
  const missing = Math.max(0, LEAST_SPAN_DB - (high - low));
  return fitted({ low: low - missing / 2, high: high + missing / 2 }, rows, GAIN_STEPS);
}

/** An axis for phases in degrees over `rows` rows, labelled at multiples of 45°, 90°, 180°, 360° and so on. */
export function phaseAxis(rows: number, traces: readonly ArrayLike<number>[]): ValueAxis {
  const finite = traces.flatMap((trace) => Array.from(trace).filter(Number.isFinite));
  if (finite.length === 0) return fitted({ low: -180, high: 180 }, rows, PHASE_STEPS);
  return fitted({ low: leastOf(finite), high: -leastOf(finite.map((value) => -value)) }, rows, PHASE_STEPS);
}

/** An axis with the given bounds; labels at the closest round steps that leave room. */
export function fixedAxis(quantity: "gain" | "phase", rows: number, { low, high }: ValueRange): ValueAxis {
  const steps = quantity === "gain" ? GAIN_STEPS : PHASE_STEPS;
  if (rows < 2) return { low, high, ticks: [] };
  const most = Math.max(1, Math.floor((rows - 1) / LEAST_ROWS_PER_STEP));
  const step = steps.find((candidate) => (high - low) / candidate <= most) ?? high - low;
  return { low, high, ticks: ticksFrom(low, high, step) };
}

/**
 * The tightest axis that holds the range and has a whole number of rows to a round step. Its top is a multiple of
 * the step, its bottom follows from the rows.
 */
function fitted({ low, high }: ValueRange, rows: number, steps: readonly number[]): ValueAxis {
  const intervals = rows - 1;
  if (intervals < 1) return { low, high, ticks: [] };
  let best: (ValueRange & { step: number }) | undefined;
  for (const step of steps) {
    for (
      let rowsPerStep = LEAST_ROWS_PER_STEP;
      rowsPerStep <= Math.max(LEAST_ROWS_PER_STEP, intervals);
      rowsPerStep++
    ) {
      const slack = (SLACK_ROWS * step) / rowsPerStep;
      const top = exact(Math.ceil((high - slack) / step) * step);
      const span = (step * intervals) / rowsPerStep;
      if (top - span > low + slack) continue;
      if (best === undefined || span < best.high - best.low) best = { low: top - span, high: top, step };
    }
  }
  const { step, ...range } = best ?? { low, high, step: high - low };
  return { ...range, ticks: ticksFrom(range.low, range.high, step) };
}

/** Multiples of the step from high down to low. */
function ticksFrom(low: number, high: number, step: number): readonly number[] {
  const first = Math.floor(high / step + 1e-6);
  const last = Math.ceil(low / step - 1e-6);
  return Array.from({ length: Math.max(0, first - last + 1) }, (_, k) => exact((first - k) * step));
}

/** Takes the rounding out of a multiple of 0.1 and negative zero out of zero. */
const exact = (value: number): number => Number(value.toPrecision(12)) + 0;

function gainExtent(values: ArrayLike<number>): ValueRange | undefined {
  const finite = Array.from(values).filter(Number.isFinite);
  if (finite.length === 0) return undefined;
  const all = Array.from(values).filter((value) => value < Infinity);
  const high = -leastOf(finite.map((value) => -value));
  const broad = leastOf(
    all.map((value, k) => Math.max(value, Math.min(all[k - 1] ?? value, all[k + 1] ?? value))),
  );
  const broadLow = Number.isFinite(broad) ? broad : leastOf(finite);
  return { high, low: Math.max(leastOf(all), broadLow - DIP_DB) };
}

const leastOf = (values: readonly number[]): number =>
  values.reduce((least, value) => Math.min(least, value), Infinity);
