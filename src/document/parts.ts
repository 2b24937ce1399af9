import type { PartSpec, PartValue, PartValues, StageKind } from "../core/stages/kind.ts";
import type { DocumentContext } from "./context.ts";
import { missingConstant } from "./formula-names.ts";
import { checkPart, partNameProblem } from "./part.ts";
import { type DocumentProblem, problemAt } from "./problem.ts";
import { wanted } from "./value.ts";
import { orList } from "./words.ts";

export interface Resolved<T> {
  readonly values: T;
  readonly problems: readonly DocumentProblem[];
}

/** All parts of a stage; `values` are complete only where there is no problem. */
export function resolveParts(
  parts: Readonly<Record<string, unknown>>,
  kind: StageKind,
  context: DocumentContext,
): Resolved<PartValues> {
  const problems: DocumentProblem[] = [];
  const values: [string, PartValue][] = [];
  for (const [name, raw] of Object.entries(parts)) {
    const checked = checkPart(kind.kind, name, raw, context);
    if (checked.ok) {
      values.push([name, checked.value]);
      continue;
    }
    const at = partNameProblem(kind, name) === undefined ? "value" : "name";
    problems.push(problemAt(["parts", name], checked.problem.found, checked.problem.allowed, at));
    // An unknown name is the last thing looked at: a hostile stage may hold a million of them.
    if (at === "name") break;
  }
  const found = Object.fromEntries(values);
  problems.push(...missingParts(parts, kind));
  if (problems.length === 0) problems.push(...tiedParts(found, kind));
  return { values: found, problems };
}

const missingParts = (
  parts: Readonly<Record<string, unknown>>,
  kind: StageKind,
): readonly DocumentProblem[] =>
  kind.parts
    .filter(({ name, optional }) => !optional && !Object.hasOwn(parts, name))
    .map((spec) => problemAt(["parts", spec.name], `it is missing (${spec.what})`, wantedFor(spec)));

function wantedFor(spec: PartSpec): string {
  if (spec.type === "number") return wanted(spec);
  if (spec.type === "choice") return orList(spec.choices.map((choice) => `"${choice}"`));
  return "a text";
}

/** Rules that hold between parts. */
function tiedParts(values: PartValues, kind: StageKind): readonly DocumentProblem[] {
  const broken = kind.check?.(values);
  if (broken !== undefined) return [problemAt(["parts", broken.part], broken.found, broken.allowed)];
  for (const [name, value] of Object.entries(values)) {
    if (typeof value !== "object" || value.type !== "formula") continue;
    const missing = missingConstant(
      value.text,
      value.tree,
      (constant) => typeof values[constant] === "number",
    );
    if (missing !== undefined) return [problemAt(["parts", name], missing.found, missing.allowed)];
  }
  return [];
}
