import { fail, ok, type Result } from "../../core/result.ts";
import { merged } from "./merge.ts";
import type { Refuse, SweepProblem } from "./problem.ts";
import type { Rows } from "./rows.ts";
import type { MeasuredSweep, Understood } from "./sweep.ts";

/** What a reader knows besides the rows. */
export type Read = Pick<Understood, "separator" | "columns" | "unit" | "notes"> & {
  readonly referenceOhm?: number;
};

/** Puts the rows in order and says what was done. */
export function finished(rows: Rows, read: Read, refuse: Refuse): Result<MeasuredSweep, SweepProblem> {
  if (rows.count < 2) return fail(refuse(rows.count === 0 ? "no rows" : "a single row", AT_LEAST_TWO));
  const columns = rows.columns();
  const { curve, averaged } = rows.ascending ? { curve: columns, averaged: 0 } : merged(columns);
  const points = curve.freqHz.length;
  if (points < 2) return fail(refuse(`${rows.count} rows of one frequency`, AT_LEAST_TWO));
  const { referenceOhm, ...said } = read;
  const understood: Understood = {
    ...said,
    rows: rows.count,
    rangeHz: [curve.freqHz[0], curve.freqHz[points - 1]],
    averaged,
    notes: [...read.notes, ...notesOn(rows, columns.freqHz, averaged, columns.phaseDeg !== undefined)],
  };
  return ok({ ...curve, understood, ...(referenceOhm === undefined ? {} : { referenceOhm }) });
}

export const AT_LEAST_TWO = "at least two rows of different frequency";

function notesOn(rows: Rows, asReadHz: Float64Array, averaged: number, hasPhase: boolean): string[] {
  const notes: string[] = [];
  if (!rows.ascending && hasDescent(asReadHz))
    notes.push("rows were not in ascending order, sorted by frequency");
  if (averaged > 0) {
    const which = averaged === 1 ? "1 frequency occurs" : `${averaged} frequencies occur`;
    const how = hasPhase ? "mean of the dB and mean direction of the phase" : "mean of the dB";
    notes.push(`${which} more than once, averaged: ${how}`);
  }
  if (!hasPhase) notes.push("no phase: a table stage made from it has phase 0");
  return notes;
}

const hasDescent = (values: Float64Array): boolean =>
  values.some((value, index) => value < values[index - 1]);
