import asciichart from "asciichart";
import type { Glyphs } from "./glyphs.ts";
import type { Canvas, Role } from "./spans.ts";
import type { ValueRange } from "./value-axis.ts";

/** Where values come to stand on the rows of a chart. */
export interface RowScale extends ValueRange {
  readonly rows: number;
}

/** Rows above the bottom one, not rounded; asciichart rounds the same product. */
function heightOf({ low, high, rows }: RowScale, value: number): number {
  return high > low ? (value - low) * ((rows - 1) / (high - low)) : 0;
}

/** The row of a value, 0 at the top; undefined where it is beyond the chart or no value. */
export function rowOf(scale: RowScale, value: number): number | undefined {
  return Number.isNaN(value) || sideOf(scale, value) !== 0
    ? undefined
    : scale.rows - 1 - Math.round(heightOf(scale, value));
}

/** The row of a value, or the edge row nearest to it. */
export function nearestRow(scale: RowScale, value: number): number {
  const clipped = Math.min(scale.high, Math.max(scale.low, value));
  return scale.rows - 1 - Math.round(heightOf(scale, clipped));
}

/** 1 above the chart, −1 below, 0 on it: half a row more is still drawn on the edge row. */
function sideOf(scale: RowScale, value: number): -1 | 0 | 1 {
  const height = heightOf(scale, value);
  return height < -0.5 ? -1 : height > scale.rows - 0.5 ? 1 : 0;
}

/**
 * Draws a trace, one value to a column, as a line. Where it leaves the chart an arrow on the edge row says so; a null
 * (−Infinity) reaches the bottom; NaN is a gap.
 */
export function drawTrace(
  canvas: Canvas,
  scale: RowScale,
  values: ArrayLike<number>,
  glyphs: Glyphs,
  role: Role,
): void {
  let from = 0;
  for (let column = 0; column <= values.length; column++) {
    if (column < values.length && !Number.isNaN(values[column])) continue;
    if (column > from) drawRun(canvas, scale, Array.from(values).slice(from, column), from, glyphs, role);
    from = column + 1;
  }
}

function drawRun(
  canvas: Canvas,
  scale: RowScale,
  values: readonly number[],
  fromColumn: number,
  glyphs: Glyphs,
  role: Role,
): void {
  for (const [row, line] of plotted(scale, values, glyphs).entries()) {
    for (let k = 0; k < values.length; k++) {
      if (line[k] !== " ") canvas.put(row, fromColumn + k, line[k], role);
    }
  }
  for (const [k, value] of values.entries()) {
    const side = sideOf(scale, value);
    if (side === 0) continue;
    const arrow = side > 0 ? glyphs.above : glyphs.below;
    canvas.put(nearestRow(scale, value), fromColumn + k, arrow, role);
  }
}

/** The line's cells by row and column, as asciichart draws them. */
function plotted(scale: RowScale, values: readonly number[], { trace }: Glyphs): string[][] {
  const { low, high, rows } = scale;
  // Counted from the bottom: asciichart rounds the values and the bound apart, and only so do rows stay in step.
  const clipped = values.map((value) => Math.min(high, Math.max(low, value)) - low);
  // N values make N − 1 columns.
  const series = [...clipped, clipped[clipped.length - 1]];
  const text = asciichart.plot(series, {
    height: rows - 1,
    min: 0,
    max: high - low,
    offset: 1,
    format: () => " ",
    symbols: trace,
  });
  // The first cell is asciichart's own axis, which the chart draws itself.
  return text.split("\n").map((line) => [...line].slice(1));
}
