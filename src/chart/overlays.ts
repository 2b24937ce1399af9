import type { Glyphs } from "./glyphs.ts";
import { columnOfFrequency, columnsBetween, type FrequencyScale } from "./scale.ts";
import type { Canvas } from "./spans.ts";
import { nearestRow, type RowScale, rowOf } from "./trace-lines.ts";

/** A bound over a span of frequencies, in the chart's unit. */
export interface LimitLine {
  readonly fromHz: number;
  readonly toHz: number;
  readonly atLeast?: number | undefined;
  readonly atMost?: number | undefined;
}

export interface VerticalEdge {
  readonly freqHz: number;
  /** Half the sample rate, or the edge of the wanted band. */
  readonly kind: "fold" | "band";
}

export interface BenchPoint {
  readonly freqHz: number;
  readonly value: number;
}

/** What can be laid over the trace, each when wanted. Arrays hold one value to a column of the drawing. */
export interface Overlays {
  readonly limits?: readonly LimitLine[] | undefined;
  /** The half-power level and the like. */
  readonly levels?: readonly number[] | undefined;
  readonly edges?: readonly VerticalEdge[] | undefined;
  readonly bench?: readonly BenchPoint[] | undefined;
  /** A second response, before an edit or as stored. */
  readonly ghost?: ArrayLike<number> | undefined;
  readonly band?: { readonly least: ArrayLike<number>; readonly greatest: ArrayLike<number> } | undefined;
  /** NaN where there is none. */
  readonly asymptote?: ArrayLike<number> | undefined;
}

export interface Paper {
  readonly canvas: Canvas;
  readonly glyphs: Glyphs;
  readonly rowScale: RowScale;
  readonly frequencyScale: FrequencyScale;
}

/** What lies under the trace, faintest first. */
export function drawUnderlays(paper: Paper, overlays: Overlays): void {
  drawBand(paper, overlays.band);
  for (const edge of overlays.edges ?? []) drawEdge(paper, edge);
  for (const level of overlays.levels ?? []) drawLevel(paper, level);
  drawPoints(paper, overlays.asymptote, "asymptote");
  for (const limit of overlays.limits ?? []) drawLimit(paper, limit);
  drawPoints(paper, overlays.ghost, "ghost");
}

export function drawBench(
  { canvas, glyphs, rowScale, frequencyScale }: Paper,
  points: readonly BenchPoint[] = [],
) {
  for (const { freqHz, value } of points) {
    const [row, column] = [rowOf(rowScale, value), columnOfFrequency(frequencyScale, freqHz)];
    if (row !== undefined && column !== undefined) canvas.put(row, column, glyphs.bench, "bench");
  }
}

function drawBand({ canvas, glyphs, rowScale }: Paper, band: Overlays["band"]): void {
  if (band === undefined) return;
  for (let column = 0; column < canvas.columns; column++) {
    const [least, greatest] = [band.least[column], band.greatest[column]];
    // Wholly above or below the chart, or no value.
    if (!(greatest >= rowScale.low && least <= rowScale.high)) continue;
    const bottom = nearestRow(rowScale, least);
    for (let row = nearestRow(rowScale, greatest); row <= bottom; row++) {
      canvas.put(row, column, glyphs.band, "band");
    }
  }
}

function drawEdge({ canvas, glyphs, frequencyScale }: Paper, { freqHz, kind }: VerticalEdge): void {
  const column = columnOfFrequency(frequencyScale, freqHz);
  if (column === undefined) return;
  const [glyph, role] =
    kind === "fold" ? ([glyphs.fold, "fold"] as const) : ([glyphs.bandEdge, "band"] as const);
  for (let row = 0; row < canvas.rows; row++) canvas.put(row, column, glyph, role);
}

function drawLevel({ canvas, glyphs, rowScale }: Paper, level: number): void {
  const row = rowOf(rowScale, level);
  if (row === undefined) return;
  for (let column = 0; column < canvas.columns; column++) canvas.put(row, column, glyphs.level, "level");
}

function drawPoints(paper: Paper, values: ArrayLike<number> | undefined, role: "asymptote" | "ghost"): void {
  const { canvas, glyphs, rowScale } = paper;
  for (let column = 0; column < (values?.length ?? 0); column++) {
    const row = rowOf(rowScale, values?.[column] ?? Number.NaN);
    if (row !== undefined) canvas.put(row, column, glyphs[role], role);
  }
}

function drawLimit({ canvas, glyphs, rowScale, frequencyScale }: Paper, limit: LimitLine): void {
  const span = columnsBetween(frequencyScale, limit.fromHz, limit.toHz);
  if (span === undefined) return;
  for (const side of ["atMost", "atLeast"] as const) {
    const bound = limit[side];
    const row = bound === undefined ? undefined : rowOf(rowScale, bound);
    if (row === undefined) continue;
    for (let column = span[0]; column <= span[1]; column++) canvas.put(row, column, glyphs[side], "limit");
  }
}
