import type * as z from "zod/mini";
import { quoted } from "../core/text.ts";
import { type DocumentProblem, described, problemAt } from "./problem.ts";

/** Every place where `data` has not the shape of `schema`, as problems by path from `data` on. */
export function shapeProblems(schema: z.ZodMiniType, data: unknown): readonly DocumentProblem[] {
  const checked = schema.safeParse(data);
  return checked.success ? [] : checked.error.issues.map((issue) => asProblem(issue, data));
}

function asProblem(issue: z.core.$ZodIssue, data: unknown): DocumentProblem {
  const path = issue.path.map((step) => (typeof step === "symbol" ? String(step) : step));
  if (issue.code === "unrecognized_keys") {
    // One unknown name is reported; a hostile file may hold a million.
    const name = issue.keys[0];
    return problemAt([...path, name], `there is no ${quoted(name)} here`, issue.message, "name");
  }
  const value = valueAt(data, path);
  if (value === undefined) return problemAt(path, "it is missing", issue.message);
  return problemAt(path, foundText(value, issue), issue.message);
}

function foundText(value: unknown, issue: z.core.$ZodIssue): string {
  return typeof value === "string" && issue.code === "too_big"
    ? `found a text of ${value.length} characters`
    : `found ${described(value)}`;
}

function valueAt(data: unknown, path: readonly (string | number)[]): unknown {
  return path.reduce<unknown>((value, step) => {
    if (typeof value !== "object" || value === null || !Object.hasOwn(value, step)) return undefined;
    return (value as Record<string | number, unknown>)[step];
  }, data);
}
