import type { Chain } from "../core/chain.ts";
import { foldHz } from "../core/fold.ts";
import { marginOf } from "../core/limits/limit.ts";
import { type Reading, readAt } from "../core/response/exact.ts";
import { unwrappedAt } from "../core/response/phase.ts";
import { wrapDeg } from "../core/units/decibel.ts";
import type { Charset } from "../core/units/format.ts";
import type { ResolvedLimit } from "../document/limits.ts";
import { chainOnCharts, ghostOnCharts } from "../editor/selectors.ts";
import type { EditorState, Size } from "../editor/state.ts";
import { cut, fittedLine, widthOf } from "./cells.ts";
import { fixed, marginText, ratioText, scaled, signed } from "./numbers.ts";
import { type Line, type Piece, piece } from "./paint.ts";

interface Entry {
  readonly label: string;
  readonly value: string;
  /** Cells kept for label and value, so that nothing beside it jumps. */
  readonly columns: number;
}

const entry = (label: string, value: string, columns: number): Entry => ({ label, value, columns });

/** What is read at the cursor. */
export interface CursorReading {
  readonly reading: Reading;
  /** As the chart shows it, turns and all; NaN where that is not known. */
  readonly continuousDeg: number;
}

/** Frequency to slope take so many rows on the narrowest screen. */
const LEAST_ROWS = 3;

/** From here on there is room for the continuous phase too. */
const WIDE = 92;

/** The exact response at the cursor, its differences to the pin, and to the response kept behind. */
export function readingPane(
  state: EditorState,
  { reading, continuousDeg }: CursorReading,
  size: Size,
  charset: Charset,
): readonly Line[] {
  const phase = phaseText(reading, size.columns < WIDE ? Number.NaN : continuousDeg, charset);
  const compared = [pinLine(state, reading, charset), ghostLine(state, reading, charset)].filter(
    (line) => line.length > 0,
  );
  // Where there is no room for all, margin and folding give way to what was asked for with a key.
  const own = packed(entriesOf(state, reading, continuousDeg, phase, charset), size.columns);
  const lines = [...own.slice(0, Math.max(LEAST_ROWS, size.rows - compared.length)), ...compared];
  while (lines.length < size.rows) lines.push([]);
  return lines.slice(0, size.rows).map((line) => fittedLine(line, size.columns, charset));
}

/** The phase within half a turn, and behind it in brackets as the chart shows it, where that is another one. */
function phaseText({ phaseDeg }: Reading, continuousDeg: number, charset: Charset): string {
  const text = `${fixed(phaseDeg, 2, charset)}${degrees(charset)}`;
  const turns = Math.round((continuousDeg - phaseDeg) / 360);
  if (!Number.isFinite(turns) || turns === 0) return text;
  return `${text} (${fixed(phaseDeg + 360 * turns, 2, charset)}${degrees(charset)})`;
}

function entriesOf(
  state: EditorState,
  reading: Reading,
  continuousDeg: number,
  phase: string,
  charset: Charset,
): readonly Entry[] {
  const { converter } = chainOnCharts(state);
  return [
    entry("at", scaled(reading.freqHz, "hertz", 5, charset), 15),
    entry("gain", `${fixed(reading.gainDb, 3, charset)} dB`, 17),
    entry("ratio", ratioText(reading.ratio, charset), 17),
    entry("attenuation", `${fixed(0 - reading.gainDb, 3, charset)} dB`, 24),
    entry("phase", phase, phase.includes("(") ? 27 : 15),
    entry("delay", scaled(reading.groupDelayS, "second", 4, charset), 17),
    entry("slope", `${fixed(reading.slopeDbPerDecade, 2, charset)} dB/dec`, 22),
    ...nearestMargin(state, reading, continuousDeg, charset),
    ...(converter === undefined
      ? []
      : [entry("folds to", scaled(foldHz(reading.freqHz, converter.rateHz), "hertz", 5, charset), 19)]),
  ];
}

/** The limit that the cursor's frequency is nearest to or furthest beyond, of those that bound anything there. */
function nearestMargin(
  state: EditorState,
  reading: Reading,
  continuousDeg: number,
  charset: Charset,
): readonly Entry[] {
  const { chain, limits } = chainOnCharts(state);
  const { freqHz } = reading;
  const margins = limits
    .filter(({ fromHz, toHz }) => freqHz >= fromHz && freqHz <= toHz)
    .map((limit) => ({ limit, margin: marginOf(limit, valueAt(chain, limit, reading, continuousDeg)) }))
    .filter(({ margin }) => !Number.isNaN(margin));
  const [first, ...others] = margins;
  if (first === undefined) return [];
  const nearest = others.reduce((least, each) => (each.margin < least.margin ? each : least), first);
  const text = `${marginText(nearest.margin, nearest.limit.quantity, charset)} (${cut(nearest.limit.name, 16, charset)})`;
  return [entry("margin", text, 34)];
}

function valueAt(chain: Chain, limit: ResolvedLimit, reading: Reading, continuousDeg: number): number {
  if (limit.quantity === "delay") return reading.groupDelayS;
  if (limit.quantity === "phase") {
    return continuousDeg + wrapDeg(reading.phaseDeg - continuousDeg);
  }
  return reading.gainDb - (limit.reHz === undefined ? 0 : readAt(chain, limit.reHz).gainDb);
}

/** Entries one after the other in as few lines as they need, each at a place of its own. */
function packed(entries: readonly Entry[], columns: number): readonly Line[] {
  const lines: Piece[][] = [[]];
  let used = 0;
  for (const { label, value, columns: wanted } of entries) {
    const text = [piece(` ${label} `, "faint"), piece(value, "value")];
    const width = Math.max(wanted, widthOf(label) + widthOf(value) + 2);
    if (used + width > columns && used > 0) {
      lines.push([]);
      used = 0;
    }
    const blank = width - widthOf(label) - widthOf(value) - 2;
    lines.at(-1)?.push(...text, piece(" ".repeat(blank)));
    used += width;
  }
  return lines;
}

/** Differences from the pin to the cursor; the phase goes continuously from one to the other. */
function pinLine(state: EditorState, reading: Reading, charset: Charset): Line {
  const { pinHz } = state;
  if (pinHz === undefined) return [];
  const { chain } = chainOnCharts(state);
  const pinned = readAt(chain, pinHz);
  const decades = Math.log10(reading.freqHz / pinHz);
  const delayS = reading.groupDelayS - pinned.groupDelayS;
  const slope = reading.slopeDbPerDecade - pinned.slopeDbPerDecade;
  return [
    piece(` pin ${scaled(pinHz, "hertz", 5, charset)}`, "pin"),
    piece("  from it", "faint"),
    piece(` ${signed(reading.gainDb - pinned.gainDb, 3, charset)} dB`, "value"),
    piece(`  ${signed(phaseBetween(chain, pinHz, reading.freqHz), 2, charset)}${degrees(charset)}`, "value"),
    piece(`  ${delayS > 0 ? "+" : ""}${scaled(delayS, "second", 4, charset)}`, "value"),
    piece(`  ${signed(decades, 3, charset)} dec ${signed(decades / Math.log10(2), 2, charset)} oct`, "value"),
    piece(`  ${signed(slope, 2, charset)} dB/dec`, "value"),
  ];
}

/** Continuous phase at the second frequency less that at the first, in degrees. */
function phaseBetween(chain: Chain, fromHz: number, toHz: number): number {
  if (fromHz === toHz) return 0;
  const [lowHz, highHz] = [Math.min(fromHz, toHz), Math.max(fromHz, toHz)];
  const [low, high] = unwrappedAt(chain, { fromHz: lowHz, toHz: highHz, perDecade: 1 }, [lowHz, highHz]);
  return (high - low) * (toHz > fromHz ? 1 : -1);
}

const degrees = (charset: Charset): string => (charset === "ascii" ? " deg" : "°");

function ghostLine(state: EditorState, reading: Reading, charset: Charset): Line {
  const ghost = ghostOnCharts(state);
  if (ghost === undefined || state.ghost === undefined) return [];
  const behind = readAt(ghost.chain, reading.freqHz);
  const deg = degrees(charset);
  const [name, words] = state.ghost.inFront ? ["now", "before is"] : ["before", "now is"];
  return [
    piece(` ${name} `, "ghost"),
    piece(
      `${fixed(behind.gainDb, 3, charset)} dB ${fixed(behind.phaseDeg, 2, charset)}${deg}  ${words} `,
      "faint",
    ),
    piece(`${signed(reading.gainDb - behind.gainDb, 3, charset)} dB`, "value"),
    piece(`  ${signed(wrapDeg(reading.phaseDeg - behind.phaseDeg), 2, charset)}${deg}`, "value"),
  ];
}
