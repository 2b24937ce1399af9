import type { Problem } from "../../core/result.ts";
import { COMMENT_MARKS, endOfRow } from "./comment.ts";
import { Fields, MAX_FIELDS, type SplitFault, splitFields } from "./fields.ts";
import type { Layout } from "./layout.ts";
import type { Lines } from "./lines.ts";
import { looksNumeric, MAX_NUMBER_LENGTH, NumberReader } from "./number.ts";
import { shown } from "./problem.ts";
import { fillRow, isResponse, type Row, rowProblem } from "./row.ts";
import type { Rows } from "./rows.ts";
import type { Separator } from "./separator.ts";
import { MAX_ROWS } from "./sweep.ts";

export interface RowRules {
  readonly layout: Layout;
  readonly separator: Separator;
  /** Fields behind the columns are an error unless they are empty; without it they are not looked at. */
  readonly columns: number | undefined;
}

/** Reads the present line and all that follow into `rows`; the first fault ends it, with `lines` on the bad line. */
export function readRows(lines: Lines, rows: Rows, rules: RowRules): Problem | undefined {
  const reader = new RowReader(lines, rows, rules);
  do {
    const problem = reader.readRow();
    if (problem) return problem;
  } while (lines.advanceToContent(COMMENT_MARKS));
  return undefined;
}

class RowReader {
  private readonly fields = new Fields();
  private readonly numbers: Float64Array;
  private readonly reader: NumberReader;
  private readonly row: Row = { freqHz: 0, gainDb: 0, phaseDeg: 0 };
  private readonly lines: Lines;
  private readonly rows: Rows;
  private readonly rules: RowRules;

  constructor(lines: Lines, rows: Rows, rules: RowRules) {
    this.lines = lines;
    this.rows = rows;
    this.rules = rules;
    this.numbers = new Float64Array(rules.layout.positions.length);
    this.reader = new NumberReader(rules.separator.decimalComma);
  }

  readRow(): Problem | undefined {
    const { layout, separator } = this.rules;
    const { text, start, end } = this.lines;
    const fault = splitFields(this.fields, text, start, endOfRow(text, start, end, separator), separator);
    if (fault) return splitProblem(fault, this.rowsOf);
    // Spreadsheets export blank rows as separators alone.
    if (this.fields.areEmptyFrom(0)) return undefined;
    const problem = this.wrongCount() ?? this.readNumbers();
    if (problem) return problem;
    fillRow(this.row, layout, this.numbers);
    if (!isResponse(this.row)) return rowProblem(this.row, layout.gain, this.numbers);
    if (this.rows.isFull) return TOO_MANY_ROWS;
    this.rows.push(this.row.freqHz, this.row.gainDb, this.row.phaseDeg);
    return undefined;
  }

  private get rowsOf(): string {
    return `rows of ${this.rules.layout.rowsOf}`;
  }

  private wrongCount(): Problem | undefined {
    const { count } = this.fields;
    const { columns = MAX_FIELDS, layout } = this.rules;
    if (count >= layout.needed && (count <= columns || this.fields.areEmptyFrom(columns))) return undefined;
    const first = this.fields.at(0);
    if (count === 1 && !looksNumeric(first))
      return { found: `${shown(first)} is no number`, allowed: this.rowsOf };
    return { found: count === 1 ? "1 column" : `${count} columns`, allowed: this.rowsOf };
  }

  private readNumbers(): Problem | undefined {
    const { positions, scales } = this.rules.layout;
    const { text, starts, ends } = this.fields;
    for (let index = 0; index < positions.length; index += 1) {
      const position = positions[index];
      const value = this.reader.read(text, starts[position], ends[position]);
      if (!(Math.abs(value) < Infinity)) return this.numberProblem(this.fields.at(position), value);
      this.numbers[index] = value * scales[index];
    }
    return undefined;
  }

  private numberProblem(field: string, value: number): Problem {
    const allowed = this.rowsOf;
    if (field === "") return { found: "an empty field", allowed };
    if (Math.abs(value) === Infinity) return { found: `${shown(field)} is not finite`, allowed };
    if (field.length > MAX_NUMBER_LENGTH)
      return { found: `${shown(field)} is ${field.length} characters long`, allowed };
    if (this.reader.hasOtherMark(field))
      return {
        found: `${shown(field)} has another decimal mark than the rows before`,
        allowed: "points throughout, or commas throughout, and nothing between thousands",
      };
    const isCommaCut = this.rules.separator.name === "comma" && /^[-+]?\d+\s+[-+]?\d+$/.test(field);
    if (looksNumeric(field) || isCommaCut)
      return { found: `${shown(field)} beside a comma`, allowed: DECIMAL_COMMAS };
    return { found: `${shown(field)} is no number`, allowed };
  }
}

const DECIMAL_COMMAS = "decimal points, or decimal commas where a semicolon or tab separates";

const TOO_MANY_ROWS: Problem = {
  found: `more than ${MAX_ROWS} rows`,
  allowed: `sweeps of 2 to ${MAX_ROWS} rows`,
};

export function splitProblem(fault: SplitFault, allowed: string): Problem {
  if (fault === "too many") return { found: `more than ${MAX_FIELDS} columns`, allowed };
  return {
    found: fault === "open quote" ? "a quotation mark that is not closed" : "text behind a quoted field",
    allowed: "fields quoted as a whole on one line",
  };
}
