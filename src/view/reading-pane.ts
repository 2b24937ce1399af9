import { foldHz } from "../core/fold.ts";
import { type Reading, readAt } from "../core/response/exact.ts";
import { wrapDeg } from "../core/units/decibel.ts";
import type { Charset } from "../core/units/format.ts";
import { chainOnCharts, ghostOnCharts } from "../editor/selectors.ts";
import type { EditorState, Size } from "../editor/state.ts";
import { fittedLine, widthOf } from "./cells.ts";
import { fixed, ratioText, scaled, signed } from "./numbers.ts";
import { type Line, type Piece, piece } from "./paint.ts";
import { signsOf } from "./signs.ts";

interface Entry {
  readonly label: string;
  readonly value: string;
  /** Cells kept for label and value, so that nothing beside it jumps. */
  readonly columns: number;
}

const entry = (label: string, value: string, columns: number): Entry => ({ label, value, columns });

/** The exact response at the cursor, its differences to the pin, and to the response kept behind. */
export function readingPane(
  state: EditorState,
  reading: Reading,
  size: Size,
  charset: Charset,
): readonly Line[] {
  const lines = [
    ...packed(entriesOf(state, reading, charset), size.columns),
    pinLine(state, reading, charset),
    ghostLine(state, reading, charset),
  ].filter((line) => line.length > 0);
  while (lines.length < size.rows) lines.push([]);
  return lines.slice(0, size.rows).map((line) => fittedLine(line, size.columns, charset));
}

function entriesOf(state: EditorState, reading: Reading, charset: Charset): readonly Entry[] {
  const { converter } = chainOnCharts(state);
  const deg = charset === "ascii" ? " deg" : "°";
  return [
    entry("at", scaled(reading.freqHz, "hertz", 5, charset), 15),
    entry("gain", `${fixed(reading.gainDb, 3, charset)} dB`, 17),
    entry("ratio", ratioText(reading.ratio, charset), 17),
    entry("attenuation", `${fixed(0 - reading.gainDb, 3, charset)} dB`, 24),
    entry("phase", `${fixed(reading.phaseDeg, 2, charset)}${deg}`, 15),
    entry("delay", scaled(reading.groupDelayS, "second", 4, charset), 17),
    entry("slope", `${fixed(reading.slopeDbPerDecade, 2, charset)} dB/dec`, 22),
    ...(converter === undefined
      ? []
      : [entry("folds to", scaled(foldHz(reading.freqHz, converter.rateHz), "hertz", 5, charset), 19)]),
  ];
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

function pinLine({ pinHz, ...state }: EditorState, reading: Reading, charset: Charset): Line {
  if (pinHz === undefined) return [];
  const { difference } = signsOf(charset);
  const pinned = readAt(chainOnCharts(state as EditorState).chain, pinHz);
  const decades = Math.log10(reading.freqHz / pinHz);
  return [
    piece(` pin ${scaled(pinHz, "hertz", 5, charset)}`, "pin"),
    piece(` ${fixed(pinned.gainDb, 3, charset)} dB  from it: `, "faint"),
    ...differences(pinned, reading, charset),
    piece(`  ${signed(decades, 3, charset)} dec ${signed(decades / Math.log10(2), 2, charset)} oct`, "value"),
    piece(` ${difference}slope`, "faint"),
    piece(` ${signed(reading.slopeDbPerDecade - pinned.slopeDbPerDecade, 2, charset)}`, "value"),
  ];
}

function differences(from: Reading, to: Reading, charset: Charset): Line {
  const deg = charset === "ascii" ? " deg" : "°";
  const delay = to.groupDelayS - from.groupDelayS;
  return [
    piece(`${signed(to.gainDb - from.gainDb, 3, charset)} dB`, "value"),
    piece(`  ${signed(to.phaseDeg - from.phaseDeg, 2, charset)}${deg}`, "value"),
    piece(`  ${delay > 0 ? "+" : ""}${scaled(delay, "second", 4, charset)}`, "value"),
  ];
}

function ghostLine(state: EditorState, reading: Reading, charset: Charset): Line {
  const ghost = ghostOnCharts(state);
  if (ghost === undefined || state.ghost === undefined) return [];
  const behind = readAt(ghost.chain, reading.freqHz);
  const deg = charset === "ascii" ? " deg" : "°";
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
