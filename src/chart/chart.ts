import type { Charset } from "../core/units/format.ts";
import { frequencyTicks } from "./frequency-ticks.ts";
import { glyphsOf } from "./glyphs.ts";
import { drawBench, drawUnderlays, type Overlays } from "./overlays.ts";
import { type FrequencyScale, LABEL_COLUMNS, MARGIN_COLUMNS } from "./scale.ts";
import { Canvas, type Span } from "./spans.ts";
import { drawTrace, nearestRow } from "./trace-lines.ts";
import { fixedAxis, gainAxis, phaseAxis, type ValueAxis, type ValueRange } from "./value-axis.ts";

export interface ChartOptions {
  readonly quantity: "gain" | "phase";
  /** Cells in all, labels and axis included. */
  readonly columns: number;
  readonly rows: number;
  readonly scale: FrequencyScale;
  /** dB or degrees, one to a column of the drawing. */
  readonly values: ArrayLike<number>;
  readonly overlays?: Overlays | undefined;
  /** Fixed bounds; without them the axis follows what is drawn. */
  readonly axis?: ValueRange | undefined;
  readonly cursorColumn?: number | undefined;
  readonly pinColumn?: number | undefined;
  readonly charset: Charset;
}

/** A chart with its value axis on the left: `rows` rows, each exactly `columns` cells wide. */
export function drawChart(options: ChartOptions): readonly (readonly Span[])[] {
  const { quantity, columns, rows, scale, values, overlays = {}, charset } = options;
  if (rows < 1 || columns < 1) return [];
  const axis = axisOf(options);
  const glyphs = glyphsOf(charset);
  const paper = {
    canvas: new Canvas(rows, Math.max(0, columns - MARGIN_COLUMNS)),
    glyphs,
    rowScale: { low: axis.low, high: axis.high, rows },
    frequencyScale: scale,
  };
  drawGrid(paper.canvas, scale, glyphs.grid);
  drawUnderlays(paper, overlays);
  drawTrace(paper.canvas, paper.rowScale, values, glyphs, "trace");
  drawBench(paper, overlays.bench);
  mark(paper, values, options.pinColumn, glyphs.pin, "pin");
  mark(paper, values, options.cursorColumn, glyphs.cursor, "cursor");
  const margin = marginOf(axis, rows, quantity, charset);
  const drawing = paper.canvas.spans();
  return margin.map((spans, row) => cutTo([...spans, ...(drawing[row] ?? [])], columns));
}

function axisOf({ quantity, rows, values, overlays, axis }: ChartOptions): ValueAxis {
  if (axis !== undefined) return fixedAxis(quantity, rows, axis);
  const traces = overlays?.ghost === undefined ? [values] : [values, overlays.ghost];
  return quantity === "gain" ? gainAxis(rows, traces) : phaseAxis(rows, traces);
}

function drawGrid(canvas: Canvas, scale: FrequencyScale, glyph: string): void {
  for (const { column, kind } of frequencyTicks(scale)) {
    if (kind !== "decade") continue;
    for (let row = 0; row < canvas.rows; row++) canvas.put(row, column, glyph, "grid");
  }
}

type Paper = Parameters<typeof drawUnderlays>[0];

/** A mark on the trace; at a null or beyond the chart on the row nearest to it. */
function mark(
  { canvas, rowScale }: Paper,
  values: ArrayLike<number>,
  column: number | undefined,
  glyph: string,
  role: "cursor" | "pin",
): void {
  const value = column === undefined ? Number.NaN : (values[column] ?? Number.NaN);
  if (column === undefined || Number.isNaN(value)) return;
  canvas.put(nearestRow(rowScale, value), column, glyph, role);
}

/** Labels set to the right, the unit once above them or below the topmost, and the axis. */
function marginOf(axis: ValueAxis, rows: number, quantity: "gain" | "phase", charset: Charset): Span[][] {
  const glyphs = glyphsOf(charset);
  const labels = new Map(
    axis.ticks.map((value) => [nearestRow({ low: axis.low, high: axis.high, rows }, value), tickText(value)]),
  );
  const unit = quantity === "gain" ? "dB" : "deg";
  const unitRow = labels.has(0) ? 1 : 0;
  labels.delete(unitRow);
  return Array.from({ length: rows }, (_, row) => {
    const label = labels.get(row);
    const text = row === unitRow ? unit : (label ?? "");
    return [
      { text: text.padStart(LABEL_COLUMNS), role: "label" },
      { text: label === undefined ? glyphs.axis : glyphs.axisTick, role: "axis" },
    ];
  });
}

/** At most six figures: steps are round. A label that is wider than its place would be another value, cut. */
function tickText(value: number): string {
  const text = String(Number(value.toPrecision(6)));
  return text.length <= LABEL_COLUMNS ? text : "";
}

function cutTo(spans: readonly Span[], columns: number): Span[] {
  const shown: Span[] = [];
  let left = columns;
  for (const { text, role } of spans) {
    if (left <= 0) break;
    shown.push({ text: text.slice(0, left), role });
    left -= text.length;
  }
  return left > 0 ? [...shown, { text: " ".repeat(left), role: "grid" }] : shown;
}

export interface AxisOptions {
  readonly columns: number;
  readonly scale: FrequencyScale;
  readonly cursorColumn?: number | undefined;
  readonly pinColumn?: number | undefined;
  readonly charset: Charset;
}

/** The frequency axis below the charts: a row of marks and a row of labels. Cursor and pin stand on it too. */
export function drawFrequencyAxis(options: AxisOptions): readonly (readonly Span[])[] {
  const { columns, scale, charset, cursorColumn, pinColumn } = options;
  if (columns < 1) return [];
  const glyphs = glyphsOf(charset);
  const canvas = new Canvas(2, columns);
  const last = MARGIN_COLUMNS - 1;
  canvas.put(0, last, glyphs.corner, "axis");
  for (let k = 0; k < scale.columns; k++) canvas.put(0, MARGIN_COLUMNS + k, glyphs.floor, "axis");
  for (const { column, kind } of frequencyTicks(scale)) {
    canvas.put(0, MARGIN_COLUMNS + column, kind === "decade" ? glyphs.decade : glyphs.minor, "axis");
  }
  if (pinColumn !== undefined) canvas.put(0, MARGIN_COLUMNS + pinColumn, glyphs.pin, "pin");
  if (cursorColumn !== undefined) canvas.put(0, MARGIN_COLUMNS + cursorColumn, glyphs.cursor, "cursor");
  canvas.write(1, Math.max(0, last - 2), "Hz", "label");
  writeLabels(canvas, scale);
  return canvas.spans();
}

/** Centred below their marks, those at the ends moved inwards; each left out where it would touch the one before. */
function writeLabels(canvas: Canvas, scale: FrequencyScale): void {
  let free = MARGIN_COLUMNS;
  for (const { column, label } of frequencyTicks(scale)) {
    if (label === "") continue;
    const centred = MARGIN_COLUMNS + column - Math.floor(label.length / 2);
    const start = Math.min(Math.max(centred, MARGIN_COLUMNS), canvas.columns - label.length);
    if (start < free) continue;
    canvas.write(1, start, label, "label");
    free = start + label.length + 1;
  }
}
