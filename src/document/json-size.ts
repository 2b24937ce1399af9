/** Bounds that are checked before a text is parsed, so that no text can exhaust memory or stack. */
import type { OffsetProblem } from "./json-syntax.ts";
import { problemAt } from "./problem.ts";

const MAX_LENGTH = 5_000_000;
const MAX_DEPTH = 64;

export function sizeProblem(text: string): OffsetProblem | undefined {
  if (text.length > MAX_LENGTH) {
    const problem = problemAt(
      [],
      `the text has ${text.length} characters`,
      `at most ${MAX_LENGTH} characters`,
    );
    return { ...problem, offset: 0 };
  }
  const offset = offsetOfDepth(text, MAX_DEPTH + 1);
  if (offset === undefined) return undefined;
  const found = `brackets are nested more than ${MAX_DEPTH} deep`;
  return { ...problemAt([], found, "3 or 4 levels, as in stages[0].parts.R"), offset };
}

/** Where a bracket outside of texts first reaches the depth. */
function offsetOfDepth(text: string, tooDeep: number): number | undefined {
  let depth = 0;
  // A text in quotation marks is skipped as a whole, an unended one to its line's end, as the parser does.
  for (const { 0: token, index } of text.matchAll(/"(?:[^"\\\r\n]|\\.)*"?|[[\]{}]/g)) {
    if (token === "[" || token === "{") depth++;
    else if (token === "]" || token === "}") depth--;
    if (depth >= tooDeep) return index;
  }
  return undefined;
}
