import { frequencyTicks } from "../../chart/frequency-ticks.ts";
import { glyphsOf } from "../../chart/glyphs.ts";
import { columnOfFrequency, type FrequencyScale, LABEL_COLUMNS, plotColumns } from "../../chart/scale.ts";
import { Canvas } from "../../chart/spans.ts";
import { drawTrace, rowOf } from "../../chart/trace-lines.ts";
import { TraceMaker } from "../../chart/traces.ts";
import { gainAxis, phaseAxis, type ValueAxis } from "../../chart/value-axis.ts";
import type { Charset } from "../../core/units/format.ts";
import type { ResolvedChain } from "../../document/resolve.ts";

const GAIN_ROWS = 13;
const PHASE_ROWS = 9;

/** Gain and phase, one above the other over one logarithmic frequency axis. */
export function chartLines(
  { chain, sweep, converter }: ResolvedChain,
  columns: number,
  charset: Charset,
): readonly string[] {
  const scale = { fromHz: sweep.fromHz, toHz: sweep.toHz, columns: plotColumns(columns) };
  const { gainDb, phaseDeg, phaseIsWrapped } = new TraceMaker().traces(chain, scale);
  const foldHz = converter === undefined ? undefined : converter.rateHz / 2;
  const chart = (values: Float64Array, axis: ValueAxis, rows: number) =>
    drawn({ values, axis, rows, scale, foldHz, charset });
  return [
    foldHz === undefined ? "gain in dB" : `gain in dB (${glyphsOf(charset).fold} half the sample rate)`,
    ...chart(gainDb, gainAxis(GAIN_ROWS, [gainDb]), GAIN_ROWS),
    `phase in degrees${phaseIsWrapped ? ", -180 to 180," : ""} over frequency in Hz`,
    ...chart(phaseDeg, phaseAxis(PHASE_ROWS, [phaseDeg]), PHASE_ROWS),
    frequencyLabels(scale),
  ];
}

interface Chart {
  readonly values: Float64Array;
  readonly axis: ValueAxis;
  readonly rows: number;
  readonly scale: FrequencyScale;
  readonly foldHz: number | undefined;
  readonly charset: Charset;
}

function drawn({ values, axis, rows, scale, foldHz, charset }: Chart): readonly string[] {
  const glyphs = glyphsOf(charset);
  const rowScale = { low: axis.low, high: axis.high, rows };
  const canvas = new Canvas(rows, scale.columns);
  const foldColumn = foldHz === undefined ? undefined : columnOfFrequency(scale, foldHz);
  if (foldColumn !== undefined) {
    for (let row = 0; row < rows; row++) canvas.put(row, foldColumn, glyphs.fold, "fold");
  }
  drawTrace(canvas, rowScale, values, glyphs, "trace");
  const labels = new Map(axis.ticks.map((value) => [rowOf(rowScale, value), String(value)]));
  const lines = canvas.spans().map((spans, row) => {
    const label = labels.get(row);
    const edge = label === undefined ? glyphs.axis : glyphs.axisTick;
    return (label ?? "").padStart(LABEL_COLUMNS) + edge + spans.map(({ text }) => text).join("");
  });
  return [...lines, floor(scale, charset)];
}

/** The frequency axis with its marks. */
function floor(scale: FrequencyScale, charset: Charset): string {
  const glyphs = glyphsOf(charset);
  const marks = new Map(frequencyTicks(scale).map(({ column, kind }) => [column, glyphs[kind]]));
  const cells = Array.from({ length: scale.columns }, (_, column) => marks.get(column) ?? glyphs.floor);
  return " ".repeat(LABEL_COLUMNS) + glyphs.corner + cells.join("");
}

/** Each label under its mark, left out where it would run into the one before. */
function frequencyLabels(scale: FrequencyScale): string {
  const end = LABEL_COLUMNS + 1 + scale.columns;
  let line = "";
  for (const { column, label } of frequencyTicks(scale)) {
    const centred = LABEL_COLUMNS + 1 + column - Math.floor(label.length / 2);
    const from = Math.min(centred, end - label.length);
    if (label !== "" && from > line.length) line = line.padEnd(from) + label;
  }
  return line;
}
