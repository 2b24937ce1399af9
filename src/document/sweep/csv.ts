import { fail, ok, type Problem, type Result } from "../../core/result.ts";
import { DEFAULT_COLUMNS, FREQUENCY_UNITS } from "./column.ts";
import { COMMENT_MARKS, endOfRow } from "./comment.ts";
import { readRows, splitProblem } from "./csv-rows.ts";
import { Fields, splitFields } from "./fields.ts";
import { AT_LEAST_TWO, finished } from "./finish.ts";
import {
  ALLOWED_HEADERS,
  COLUMNS_EXAMPLE,
  columnsByHand,
  columnsOfHeader,
  type NamedColumns,
} from "./header.ts";
import { commentedHeader, headerCells } from "./header-line.ts";
import { type Layout, layoutOf } from "./layout.ts";
import { Lines } from "./lines.ts";
import { looksNumeric } from "./number.ts";
import { type Refuse, type SweepProblem, shown } from "./problem.ts";
import { Rows } from "./rows.ts";
import { detectSeparator, type Separator } from "./separator.ts";
import type { MeasuredSweep } from "./sweep.ts";

/** Separated columns with or without a header; `byHand` names them instead. */
export function readCsv(
  text: string,
  byHand: string | undefined,
  refuse: Refuse,
): Result<MeasuredSweep, SweepProblem> {
  const separator = detectSeparator(text);
  const lines = new Lines(text);
  if (!lines.advanceToContent(COMMENT_MARKS)) return fail(refuse("no rows", AT_LEAST_TWO));
  const opening = openingOf(lines, separator, byHand);
  const atOpening = ({ found, allowed }: Problem) => fail(refuse(found, allowed, lines.line));
  if (!opening.ok)
    return byHand === undefined ? atOpening(opening.problem) : inOption(opening.problem, byHand, refuse);
  const { layout, notes, isHeader, columns } = opening.value;
  const rows = new Rows(layout.hasPhase);
  if (!isHeader || lines.advanceToContent(COMMENT_MARKS)) {
    const problem = readRows(lines, rows, { layout, separator, columns });
    if (problem) return atOpening(problem);
  }
  const unit = unitOf(layout);
  return finished(rows, { separator: separator.name, columns: layout.labels, unit, notes }, refuse);
}

interface Opening {
  readonly layout: Layout;
  readonly notes: readonly string[];
  /** Whether the present line is a header. */
  readonly isHeader: boolean;
  readonly columns: number | undefined;
}

/** The layout from the first line with content, or as named by hand. */
function openingOf(lines: Lines, separator: Separator, byHand: string | undefined): Result<Opening> {
  const { text, start, end } = lines;
  const fields = new Fields();
  const fault = splitFields(fields, text, start, endOfRow(text, start, end, separator), separator);
  if (fault) return fail(splitProblem(fault, ALLOWED_HEADERS));
  const values = Array.from({ length: fields.count }, (_, index) => fields.at(index));
  const isHeader = !values.some(looksNumeric);
  if (byHand !== undefined) return handOpening(byHand, isHeader);
  if (!isHeader) return plainOpening(lines, separator, values);
  const cells = headerCells(lines, separator);
  const named = columnsOfHeader(cells);
  if (!named.ok) return fail(unlessData(named.problem, values));
  const layout = layoutOf(named.value.columns, cells);
  if (!layout.ok) return fail(unlessData(layout.problem, values));
  const notes = [...named.value.notes, ...assumptions(named.value, layout.value, cells)];
  return ok({ layout: layout.value, notes, isHeader, columns: cells.length });
}

function handOpening(byHand: string, isHeader: boolean): Result<Opening> {
  const named = columnsByHand(byHand);
  if (!named.ok) return named;
  const cells = byHand.split(",").map((name) => name.trim());
  const layout = layoutOf(named.value.columns, cells);
  if (!layout.ok) return layout;
  return ok({
    layout: layout.value,
    notes: assumptions(named.value, layout.value, cells),
    isHeader,
    columns: undefined,
  });
}

function plainOpening(lines: Lines, separator: Separator, values: readonly string[]): Result<Opening> {
  const count = values.findLastIndex((value) => value !== "") + 1;
  const columns = DEFAULT_COLUMNS[count];
  if (columns === undefined) return fail(wrongDefault(count, values));
  const layout = layoutOf(columns, values);
  if (!layout.ok) return layout;
  const comment = commentedHeader(lines, separator, columns);
  const notes = [
    `no header: read as ${layout.value.rowsOf.replace("frequency", "frequency in Hz")}`,
    ...(comment ? [comment] : []),
  ];
  return ok({ layout: layout.value, notes, isHeader: false, columns: count });
}

function wrongDefault(count: number, values: readonly string[]): Problem {
  const [first] = values;
  const found = count === 1 ? `${shown(first)} alone` : `${count} columns without a header`;
  return {
    found,
    allowed: `rows of frequency, dB and degrees (degrees may be left out), or columns named as in --columns ${COLUMNS_EXAMPLE}`,
  };
}

/** A first line of one field that is no header is most likely a broken row or another kind of file. */
function unlessData(problem: Problem, values: readonly string[]): Problem {
  return values.length === 1 ? { ...problem, found: `${shown(values[0])} alone` } : problem;
}

function assumptions(named: NamedColumns, layout: Layout, cells: readonly string[]): string[] {
  return named.columns.flatMap(({ role, note }, position) => {
    if (layout.positions.includes(position)) return note === undefined ? [] : [note];
    return role === "skip" ? [] : [`column ${shown(cells[position])} is not read`];
  });
}

function unitOf(layout: Layout): string {
  const scale = layout.scales[0];
  return Object.values(FREQUENCY_UNITS).find((unit) => unit.scale === scale)?.name ?? "Hz";
}

function inOption(
  { found, allowed }: Problem,
  byHand: string,
  refuse: Refuse,
): { readonly ok: false; readonly problem: SweepProblem } {
  return fail(refuse(`--columns ${shown(byHand)}: ${found}`, allowed));
}
