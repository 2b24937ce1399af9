import type { ChainStage } from "../core/chain.ts";
import { fail, ok, type Result } from "../core/result.ts";
import { buildStage } from "../core/stages/build.ts";
import type { PartValues, StageKind } from "../core/stages/kind.ts";
import { type DocumentProblem, problemAt } from "./problem.ts";

const FOUND = "the values together lead to numbers that are too large or too small";
const ALLOWED = "values of the size that real parts have";

/** The stage, unless its values, each allowed by itself, leave the range of numbers together. */
export function buildWithin(
  kind: StageKind,
  values: PartValues,
  name: string,
): Result<ChainStage, DocumentProblem> {
  const problem = problemAt(["parts"], FOUND, ALLOWED);
  try {
    const stage = buildStage(kind.kind, values, name);
    return hasFiniteNumbers(stage.elements) ? ok(stage) : fail(problem);
  } catch (error) {
    // Designs refuse what they cannot compute by a RangeError; anything else is a fault of the program.
    if (error instanceof RangeError) return fail(problem);
    throw error;
  }
}

/** Whether every number within is finite, so that no response can become undefined by an overflow. */
function hasFiniteNumbers(value: unknown): boolean {
  if (typeof value === "number") return Number.isFinite(value);
  return typeof value !== "object" || value === null || Object.values(value).every(hasFiniteNumbers);
}
