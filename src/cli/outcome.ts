import type { Result } from "../core/result.ts";
import type { FileProblem } from "../effects/file-problem.ts";

/** What a command leaves behind. */
export interface Output {
  /** For standard output, the last line ended. */
  readonly text: string;
  /** Lines for standard error. */
  readonly notes?: readonly string[];
  /** A table beside the result, for standard error as it stands, the last line ended. */
  readonly aside?: string;
  /** 0 unless said otherwise. */
  readonly exitCode?: number;
}

export type Outcome = Result<Output, FileProblem>;

export const DONE = 0;
/** Limits not met. */
export const NOT_MET = 1;
/** Bad usage or input. */
export const REFUSED = 2;
