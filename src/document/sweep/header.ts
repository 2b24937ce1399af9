import { fail, ok, type Problem, type Result } from "../../core/result.ts";
import { isDoubtfulUnit, meaningOf } from "./cell.ts";
import { type Column, SKIP } from "./column.ts";
import { listed, shown } from "./problem.ts";

/**
 * Syntax of `--columns`: one header word after the other with commas between, in the order of the file's columns;
 * `skip`, `-` or nothing leaves a column out, and columns behind the last one named are left out too.
 */
export const COLUMNS_EXAMPLE = "freq_kHz,skip,gain_dB,phase_deg";

export const ALLOWED_HEADERS =
  "a frequency (Hz, kHz, MHz, GHz) with a gain (gain_dB, ratio, Vin and Vout, or re and im) and maybe a phase " +
  `(phase_deg, phase_rad), named by the header or by hand as in --columns ${COLUMNS_EXAMPLE}`;

/** Columns by position, and what was assumed. */
export interface NamedColumns {
  readonly columns: readonly Column[];
  readonly notes: readonly string[];
}

/** Columns of a header line. Cells that are not understood are left out and noted, unless they have a unit of ours. */
export function columnsOfHeader(cells: readonly string[]): Result<NamedColumns> {
  const columns: Column[] = [];
  const notes: string[] = [];
  for (const cell of cells) {
    const meaning = cell === "" ? undefined : meaningOf(cell);
    const refusal = isDoubtfulUnit(cell) ? doubtful(cell) : undefined;
    if (refusal) return fail(refusal);
    if (meaning?.type === "unknown" && meaning.hasUnit) return fail(unknown(cell));
    const column = meaning?.type === "column" ? meaning.column : SKIP;
    if (column === SKIP && cell !== "") notes.push(`column ${shown(cell)} is not read`);
    columns.push(column);
  }
  return ok({ columns, notes });
}

/** Columns as named by hand; see `COLUMNS_EXAMPLE`. */
export function columnsByHand(names: string): Result<NamedColumns> {
  const columns: Column[] = [];
  for (const name of names
    .slice(0, MAX_NAMES_LENGTH)
    .split(",")
    .map((part) => part.trim())) {
    const meaning = /^(|-|skip)$/i.test(name) ? undefined : meaningOf(name);
    if (isDoubtfulUnit(name)) return fail(doubtful(name));
    if (meaning !== undefined && meaning.type !== "column") return fail(unknown(name));
    columns.push(meaning?.column ?? SKIP);
  }
  return ok({ columns, notes: [] });
}

const MAX_NAMES_LENGTH = 4000;
const MAX_CELLS_SHOWN = 8;

/** `the columns "a", "b" and "c"`. */
export function columnsShown(cells: readonly string[]): string {
  if (cells.length === 0) return "an empty header";
  const first = cells.slice(0, MAX_CELLS_SHOWN).map(shown);
  const rest = cells.length - first.length;
  return `the columns ${listed(rest > 0 ? [...first, `${rest} more`] : first)}`;
}

const unknown = (cell: string): Problem => ({
  found: `the unknown column ${shown(cell)}`,
  allowed: ALLOWED_HEADERS,
});

const doubtful = (cell: string): Problem => ({
  found: `the column ${shown(cell)}, in millihertz or megahertz`,
  allowed: "Hz, kHz, MHz and GHz",
});
