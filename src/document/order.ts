import type { DocumentPath, DocumentProblem } from "./problem.ts";

/** Of several problems the one that a reader of the file meets first; what is missing is noticed where its object ends. */
export function firstProblem<P extends DocumentProblem>(
  problems: readonly P[],
  data: unknown,
): P | undefined {
  const ranked = problems.map((problem) => ({ problem, rank: ranks(problem.path, data) }));
  // Sorting is stable, so of several at one place the first found stays first.
  return ranked.sort((one, other) => compare(one.rank, other.rank))[0]?.problem;
}

/** Position of each step among its neighbours. */
function ranks(path: DocumentPath, data: unknown): readonly number[] {
  const found: number[] = [];
  let value = data;
  for (const step of path) {
    if (typeof value !== "object" || value === null || !Object.hasOwn(value, step))
      return [...found, Infinity];
    found.push(Array.isArray(value) ? Number(step) : Object.keys(value).indexOf(String(step)));
    value = (value as Record<string | number, unknown>)[step];
  }
  return found;
}

function compare(one: readonly number[], other: readonly number[]): number {
  const differs = one.findIndex((rank, k) => rank !== other[k]);
  if (differs === -1) return one.length - other.length;
  if (differs >= other.length) return 1;
  return one[differs] < other[differs] ? -1 : 1;
}
