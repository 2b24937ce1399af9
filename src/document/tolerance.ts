import type { StageKind } from "../core/stages/kind.ts";
import { quoted } from "../core/text.ts";
import { parseTolerance } from "../core/units/tolerance.ts";
import { partNameProblem } from "./part.ts";
import type { Resolved } from "./parts.ts";
import { type DocumentProblem, described, problemAt } from "./problem.ts";
import type { StageDocument } from "./types.ts";

const ALLOWED = "a tolerance above 0 and below 100 %, as in 5% or 0.05";

/** Tolerances by part, as fractions; each must belong to a part that is a number and is given. */
export function resolveTolerances(
  stage: StageDocument,
  kind: StageKind,
): Resolved<Readonly<Record<string, number>>> {
  const problems: DocumentProblem[] = [];
  const values: [string, number][] = [];
  for (const [name, raw] of Object.entries(stage.tolerance ?? {})) {
    const path = ["tolerance", name];
    const unfit = partProblem(path, name, stage, kind);
    if (unfit !== undefined) {
      problems.push(unfit);
      break;
    }
    const read = readTolerance(raw);
    if (read.ok) values.push([name, read.value]);
    else problems.push(problemAt(path, read.problem.found, read.problem.allowed));
  }
  return { values: Object.fromEntries(values), problems };
}

function partProblem(
  path: readonly string[],
  name: string,
  { parts = {} }: StageDocument,
  kind: StageKind,
): DocumentProblem | undefined {
  const unknown = partNameProblem(kind, name);
  if (unknown !== undefined) return problemAt(path, unknown.found, unknown.allowed, "name");
  if (!Object.hasOwn(parts, name)) {
    return problemAt(
      path,
      `the part ${quoted(name)} is not given`,
      "a tolerance of a part that is given",
      "name",
    );
  }
  const spec = kind.parts.find((part) => part.name === name);
  if (spec === undefined || spec.type === "number") return undefined;
  return problemAt(
    path,
    `the part ${quoted(name)} is no number`,
    "a tolerance of a part that is a number",
    "name",
  );
}

function readTolerance(raw: unknown): ReturnType<typeof parseTolerance> {
  if (typeof raw === "number" || (typeof raw === "string" && raw.trim() !== "")) return parseTolerance(raw);
  const found = typeof raw === "string" ? "it is empty" : `found ${described(raw)}`;
  return { ok: false, problem: { found, allowed: ALLOWED } };
}
