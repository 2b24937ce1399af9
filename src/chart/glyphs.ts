import type { Charset } from "../core/units/format.ts";

/** asciichart's ten: axis crossing, axis, two line ends, level, then the corners └ ┌ ┐ ┘ of a step, and its riser. */
type TraceSymbols = [string, string, string, string, string, string, string, string, string, string];

/** The signs of a chart. Every meaning has a shape of its own, so that none needs a colour. */
export interface Glyphs {
  readonly trace: TraceSymbols;
  /** Stands on the edge row where the trace is beyond it. */
  readonly above: string;
  readonly below: string;
  readonly ghost: string;
  readonly bench: string;
  readonly asymptote: string;
  readonly level: string;
  /** The strokes point to the forbidden side. */
  readonly atMost: string;
  readonly atLeast: string;
  /** Half the sample rate: the crease along which the spectrum is folded. */
  readonly fold: string;
  readonly bandEdge: string;
  readonly band: string;
  readonly grid: string;
  readonly cursor: string;
  readonly pin: string;
  readonly axis: string;
  readonly axisTick: string;
  readonly corner: string;
  readonly floor: string;
  readonly decade: string;
  readonly minor: string;
}

const UNICODE: Glyphs = {
  trace: ["┼", "┤", "╶", "╴", "─", "╰", "╭", "╮", "╯", "│"],
  above: "▴",
  below: "▾",
  ghost: "◦",
  bench: "×",
  asymptote: "~",
  level: "┄",
  atMost: "┴",
  atLeast: "┬",
  fold: "╱",
  bandEdge: "┊",
  band: "░",
  grid: "·",
  cursor: "◆",
  pin: "◇",
  axis: "│",
  axisTick: "┤",
  corner: "└",
  floor: "─",
  decade: "┬",
  minor: "┴",
};

const ASCII: Glyphs = {
  trace: ["+", "|", "-", "-", "-", "+", "+", "+", "+", "|"],
  above: "^",
  below: "v",
  ghost: "o",
  bench: "x",
  asymptote: "~",
  level: "_",
  atMost: '"',
  atLeast: ",",
  fold: "/",
  bandEdge: ":",
  band: "#",
  grid: ".",
  cursor: "*",
  pin: "@",
  axis: "|",
  axisTick: "+",
  corner: "+",
  floor: "-",
  decade: "+",
  minor: "'",
};

export const glyphsOf = (charset: Charset): Glyphs => (charset === "ascii" ? ASCII : UNICODE);
