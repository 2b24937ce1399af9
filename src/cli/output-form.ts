import { fail, ok, type Result } from "../core/result.ts";
import { type FileProblem, fileProblem } from "../effects/file-problem.ts";

/** A table for people, one JSON document, or CSV. */
export type OutputForm = "table" | "json" | "csv";

export interface FormOptions {
  readonly json?: boolean;
  readonly csv?: boolean;
}

export function outputForm({ json = false, csv = false }: FormOptions): Result<OutputForm, FileProblem> {
  if (json && csv) return fail(fileProblem("--csv", "--json is given too", "one of the two"));
  return ok(json ? "json" : csv ? "csv" : "table");
}
