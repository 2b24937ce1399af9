/** A value, or the reason why there is none. Errors a person can cause are values here, never exceptions. */
export type Result<T, P = Problem> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly problem: P };

/** What was found and what is allowed; the caller knows the place. Both are sentences' parts without a full stop. */
export interface Problem {
  /** For example: `"4,7k" has a comma`. */
  readonly found: string;
  /** For example: `a decimal point, as in 4.7k`. */
  readonly allowed: string;
}

export const ok = <T>(value: T): { readonly ok: true; readonly value: T } => ({ ok: true, value });

export const fail = <P>(problem: P): { readonly ok: false; readonly problem: P } => ({ ok: false, problem });
