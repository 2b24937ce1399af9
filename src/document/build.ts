import type { ChainStage } from "../core/chain.ts";
import { fail, ok, type Result } from "../core/result.ts";
import { buildStage } from "../core/stages/build.ts";
import type { PartValues, StageKind } from "../core/stages/kind.ts";
import { type DocumentPath, type DocumentProblem, problemAt } from "./problem.ts";

/** Values that leave the range of numbers together. */
export const beyondNumbers = (path: DocumentPath): DocumentProblem =>
  problemAt(
    path,
    "the values together lead to numbers that are too large or too small",
    "values of the size that real parts have",
  );

/** The stage, unless its values, each allowed by itself, leave the range of numbers together. */
export function buildWithin(
  kind: StageKind,
  values: PartValues,
  name: string,
): Result<ChainStage, DocumentProblem> {
  const problem = beyondNumbers(["parts"]);
  if (kind.group === "passive" && productVanishes(values)) return fail(problem);
  try {
    const stage = buildStage(kind.kind, values, name);
    return hasFiniteNumbers(stage.elements) ? ok(stage) : fail(problem);
  } catch (error) {
    // Designs refuse what they cannot compute by a RangeError; anything else is a fault of the program.
    if (error instanceof RangeError) return fail(problem);
    throw error;
  }
}

const LEAST_POWER_OF_TEN = -300;

/** Whether parts, each allowed by itself, make a product that would be taken for zero, as that of L and C. */
export function productVanishes(values: Readonly<Record<string, unknown>>): boolean {
  const powers = Object.values(values)
    .filter((value): value is number => typeof value === "number" && value > 0 && value < 1)
    .map(Math.log10);
  return powers.length > 1 && powers.reduce((sum, power) => sum + power, 0) < LEAST_POWER_OF_TEN;
}

/** Whether every number within is finite, so that no response can become undefined by an overflow. */
function hasFiniteNumbers(value: unknown): boolean {
  if (typeof value === "number") return Number.isFinite(value);
  return typeof value !== "object" || value === null || Object.values(value).every(hasFiniteNumbers);
}
