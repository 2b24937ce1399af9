import type { FormulaTree } from "../core/formula/tree.ts";
import type { Problem, Result } from "../core/result.ts";
import type { TabulatedResponse } from "../core/stages/kind.ts";

/**
 * What a chain needs from outside its file. Stages are resolved once per context: when a file behind `table`
 * changed, pass a new object.
 */
export interface DocumentContext {
  /** Absent while it is not loaded; see `needsFormulaParser`. */
  readonly formula: FormulaParser | undefined;
  /** The measured response in a file named by a `table` stage. */
  readonly table: (file: string) => Result<TabulatedResponse>;
}

export type FormulaParser = (text: string) => Result<FormulaTree, FormulaProblem>;

/** `position` is that of the character in the expression, from 1; `found` names it too. */
export interface FormulaProblem extends Problem {
  readonly position: number;
}
