import { fail, ok, type Problem, type Result } from "../../core/result.ts";
import {
  DECIBEL,
  DEGREES,
  FREQUENCY_UNITS,
  frequencyColumn,
  IMAGINARY,
  RATIO,
  REAL,
  SKIP,
} from "./column.ts";
import { splitProblem } from "./csv-rows.ts";
import { Fields, splitFields } from "./fields.ts";
import { AT_LEAST_TWO, finished } from "./finish.ts";
import { type Layout, layoutOf } from "./layout.ts";
import { Lines } from "./lines.ts";
import { NumberReader } from "./number.ts";
import { type Refuse, type SweepProblem, shown } from "./problem.ts";
import { fillRow, isResponse, rowProblem } from "./row.ts";
import { Rows } from "./rows.ts";
import { readOption, type S2pOption } from "./s2p-option.ts";
import { BLANKS } from "./separator.ts";
import { MAX_ROWS, type MeasuredSweep } from "./sweep.ts";

/** Frequency, then S11, S21, S12 and S22 as pairs. */
const NUMBERS_IN_ROW = 9;
/** Frequency, noise figure, source reflection as a pair, noise resistance. */
const NUMBERS_IN_NOISE_ROW = 5;
const ALLOWED_ROWS = "rows of 9 numbers: frequency, S11, S21, S12 and S22";
const COMMENT = "!";

/**
 * S21 of a two-port file, version 1, as insertion gain between two reference resistances. A row of five numbers whose
 * frequency is not above those before begins the noise data, which end the sweep.
 * Source: IBIS Open Forum, Touchstone File Format Specification Rev 1.1 (2002).
 */
export function readS2p(text: string, refuse: Refuse): Result<MeasuredSweep, SweepProblem> {
  const lines = new Lines(text);
  const refused = ({ found, allowed }: Problem) => fail(refuse(found, allowed, lines.line));
  if (!lines.advanceToContent(COMMENT)) return fail(refuse("no rows", AT_LEAST_TWO));
  const option = optionOn(lines);
  if (!option.ok) return refused(option.problem);
  const layout = layoutFor(option.value);
  const reading = readData(lines, layout);
  if (!reading.ok) return refused(reading.problem);
  const { unit, referenceOhm } = option.value;
  const notes = [
    `S21 is read as the insertion gain between ${referenceOhm} Ω and ${referenceOhm} Ω`,
    ...reading.value.notes,
  ];
  const read = { separator: BLANKS.name, columns: layout.labels, unit: unit.name, notes, referenceOhm };
  return finished(reading.value.rows, read, refuse);
}

function optionOn({ text, start, end }: Lines): Result<S2pOption> {
  const line = contentOf(text, start, end);
  if (line.startsWith("[")) return fail(versionTwo(line));
  if (line.startsWith("#")) return readOption(line);
  return fail({
    found: "no option line before the data",
    allowed: "files that begin with one, such as # GHz S MA R 50",
  });
}

const contentOf = (text: string, start: number, end: number): string =>
  text.slice(start, endBeforeComment(text, start, end)).trim();

function endBeforeComment(text: string, start: number, end: number): number {
  for (let index = start; index < end; index += 1) if (text[index] === COMMENT) return index;
  return end;
}

const versionTwo = (line: string): Problem => ({
  found: `the keyword ${shown(line)} of version 2`,
  allowed: "files of version 1",
});

function layoutFor({ unit, format }: S2pOption): Layout {
  const pair = { RI: [REAL, IMAGINARY], MA: [RATIO, DEGREES], DB: [DECIBEL, DEGREES] }[format];
  const names = Object.keys(FREQUENCY_UNITS);
  const frequency = frequencyColumn(names.find((name) => FREQUENCY_UNITS[name] === unit) ?? "ghz");
  const columns = [frequency, SKIP, SKIP, ...pair, SKIP, SKIP, SKIP, SKIP];
  const layout = layoutOf(columns, []);
  if (!layout.ok) throw new Error("a frequency and a pair are always a layout");
  return layout.value;
}

function readData(lines: Lines, layout: Layout): Result<{ rows: Rows; notes: readonly string[] }> {
  const reader = new DataReader(layout);
  while (lines.advanceToContent(COMMENT)) {
    const { text, start, end, line } = lines;
    const first = text[lines.firstVisible()];
    // The format has further option lines ignored.
    if (first === "#") continue;
    if (first === "[") return fail(versionTwo(contentOf(text, start, end)));
    const outcome = reader.readRow(text, start, endBeforeComment(text, start, end));
    if (outcome === "noise")
      return ok({ rows: reader.rows, notes: [`noise data from line ${line} on are not read`] });
    if (outcome) return fail(outcome);
  }
  return ok({ rows: reader.rows, notes: [] });
}

class DataReader {
  readonly rows: Rows;
  private readonly layout: Layout;
  private readonly fields = new Fields();
  private readonly values = new Float64Array(NUMBERS_IN_ROW);
  private readonly numbers: Float64Array;
  private readonly reader = new NumberReader(false);
  private readonly row = { freqHz: 0, gainDb: 0, phaseDeg: 0 };
  private highestHz = 0;

  constructor(layout: Layout) {
    this.layout = layout;
    this.rows = new Rows(layout.hasPhase);
    this.numbers = new Float64Array(layout.positions.length);
  }

  readRow(text: string, start: number, end: number): Problem | "noise" | undefined {
    const fault = splitFields(this.fields, text, start, end, BLANKS);
    if (fault) return splitProblem(fault, ALLOWED_ROWS);
    const problem = this.readValues();
    if (problem) return problem;
    const { count } = this.fields;
    const { positions, scales, gain } = this.layout;
    if (count === NUMBERS_IN_NOISE_ROW && this.values[0] * scales[0] <= this.highestHz) return "noise";
    if (count !== NUMBERS_IN_ROW) return { found: `a row of ${count} fields`, allowed: ALLOWED_ROWS };
    for (let index = 0; index < positions.length; index += 1)
      this.numbers[index] = this.values[positions[index]] * scales[index];
    fillRow(this.row, this.layout, this.numbers);
    if (!isResponse(this.row)) return rowProblem(this.row, gain, this.numbers);
    if (this.rows.isFull)
      return { found: `more than ${MAX_ROWS} rows`, allowed: `sweeps of 2 to ${MAX_ROWS} rows` };
    this.rows.push(this.row.freqHz, this.row.gainDb, this.row.phaseDeg);
    this.highestHz = Math.max(this.highestHz, this.row.freqHz);
    return undefined;
  }

  private readValues(): Problem | undefined {
    const { text, starts, ends, count } = this.fields;
    for (let index = 0; index < Math.min(count, NUMBERS_IN_ROW); index += 1) {
      this.values[index] = this.reader.read(text, starts[index], ends[index]);
      if (!Number.isFinite(this.values[index]))
        return { found: `${shown(this.fields.at(index))} is no number`, allowed: ALLOWED_ROWS };
    }
    return undefined;
  }
}
