import { fail, type Result } from "../../core/result.ts";
import { readCsv } from "./csv.ts";
import { refuseIn, type SweepProblem } from "./problem.ts";
import { readS2p } from "./s2p.ts";
import type { MeasuredSweep } from "./sweep.ts";

export interface ReadSweepOptions {
  /** Columns of a CSV named by hand, as in `freq_kHz,skip,gain_dB,phase_deg`; see `COLUMNS_EXAMPLE`. */
  readonly columns?: string | undefined;
}

/**
 * A measured sweep from the text of a CSV file or, where the name ends in `.s2p`, of a two-port S-parameter file.
 *
 * The problem is the first one found, with its line.
 */
export function readSweep(
  text: string,
  fileName: string,
  { columns }: ReadSweepOptions = {},
): Result<MeasuredSweep, SweepProblem> {
  const refuse = refuseIn(fileName);
  const nul = text.indexOf("\0");
  if (nul >= 0) return fail(refuse("a NUL byte", "text files in UTF-8", lineAt(text, nul)));
  const ports = /\.s(\d+)p$/i.exec(fileName)?.[1];
  if (ports === undefined) return readCsv(text, columns, refuse);
  if (Number(ports) !== 2) return fail(refuse(`a file of ${ports} ports`, "two-port files, .s2p"));
  if (columns !== undefined) return fail(refuse("--columns for an .s2p file", "CSV files with --columns"));
  return readS2p(text, refuse);
}

function lineAt(text: string, index: number): number {
  let line = 1;
  for (let at = text.indexOf("\n"); at >= 0 && at < index; at = text.indexOf("\n", at + 1)) line += 1;
  return line;
}
