import type { ChainStage } from "../core/chain.ts";
import { fail, ok, type Result } from "../core/result.ts";
import { STAGE_KINDS, stageKind } from "../core/stages/index.ts";
import type { PartValues, StageKind } from "../core/stages/kind.ts";
import { plainText, quoted } from "../core/text.ts";
import { buildWithin } from "./build.ts";
import type { DocumentContext } from "./context.ts";
import { firstProblem } from "./order.ts";
import { resolveParts } from "./parts.ts";
import { type DocumentProblem, problemAt } from "./problem.ts";
import { stageSchema } from "./schema.ts";
import { shapeProblems } from "./structure.ts";
import { resolveTolerances } from "./tolerance.ts";
import type { StageDocument } from "./types.ts";
import { suggestion } from "./words.ts";

/** A stage with every value checked and in SI units. */
export interface ResolvedStage {
  /** Safe to show; the kind where the person gave no name. */
  readonly name: string;
  readonly kind: string;
  readonly off: boolean;
  readonly values: PartValues;
  /** By part, as a fraction above 0 and below 1. */
  readonly tolerances: Readonly<Record<string, number>>;
  /** For the engine; absent when the stage is out of the line. */
  readonly stage?: ChainStage;
}

type StageResult = Result<ResolvedStage, DocumentProblem>;

/** Results by the stage's own data: an edit of one stage leaves those of the others as they are. */
const known = new WeakMap<object, { readonly context: DocumentContext; readonly result: StageResult }>();

/**
 * The stage, or its first problem by path from the stage on. The same data with the same context
 * gives the same result object again.
 */
export function resolveStage(data: unknown, context: DocumentContext): StageResult {
  if (typeof data !== "object" || data === null) return checkStage(data, context);
  const before = known.get(data);
  if (before?.context === context) return before.result;
  const result = checkStage(data, context);
  known.set(data, { context, result });
  return result;
}

function checkStage(data: unknown, context: DocumentContext): StageResult {
  const shape = shapeProblems(stageSchema, data);
  const kind = kindOf(data);
  if (kind === undefined || shape.length > 0) {
    const problems = kind === undefined ? [...shape, ...unknownKind(data)] : shape;
    return fail(firstProblem(problems, data) as DocumentProblem);
  }
  return checkValues(data as StageDocument, kind, context);
}

function kindOf(data: unknown): StageKind | undefined {
  const name = (data as Partial<StageDocument> | null)?.kind;
  return typeof name === "string" ? stageKind(name) : undefined;
}

function unknownKind(data: unknown): readonly DocumentProblem[] {
  const name = (data as Partial<StageDocument> | null)?.kind;
  if (typeof name !== "string") return [];
  const names = STAGE_KINDS.map(({ kind }) => kind);
  return [problemAt(["kind"], `there is no kind ${quoted(name)}`, suggestion(name, names))];
}

function checkValues(data: StageDocument, kind: StageKind, context: DocumentContext): StageResult {
  const parts = resolveParts(data.parts ?? {}, kind, context);
  const tolerances = resolveTolerances(data, kind);
  const problem = firstProblem([...parts.problems, ...tolerances.problems], data);
  if (problem !== undefined) return fail(problem);
  const name = plainText(data.name ?? "", Infinity) || kind.kind;
  const built = buildWithin(kind, parts.values, name);
  if (!built.ok) return built;
  const off = data.off ?? false;
  const resolved = { name, kind: kind.kind, off, values: parts.values, tolerances: tolerances.values };
  return ok(off ? resolved : { ...resolved, stage: built.value });
}
