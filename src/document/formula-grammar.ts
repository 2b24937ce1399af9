import { FORMULA_FUNCTIONS } from "../core/formula/tree.ts";
import { ok, type Result } from "../core/result.ts";
import { quoted } from "../core/text.ts";
import type { FormulaProblem } from "./context.ts";
import { isConstantName } from "./formula-names.ts";
import { formulaProblem, type Token } from "./formula-tokens.ts";
import { orList } from "./words.ts";

/** Parentheses within parentheses: bounds the recursion of the parser. */
const MAX_NESTING = 60;
const OPERAND = "a number, a name or an opening parenthesis";

export const isFunction = (name: string): boolean => (FORMULA_FUNCTIONS as readonly string[]).includes(name);

/**
 * Refuses, where it stands, whatever two neighbouring words cannot mean: a missing operator, a second sign, a
 * function without its parentheses. What is left is an expression, but for parentheses that do not pair.
 */
export function checkGrammar(tokens: readonly Token[]): Result<readonly Token[], FormulaProblem> {
  let nesting = 0;
  for (const [index, token] of tokens.entries()) {
    const problem = nameProblem(token) ?? pairProblem(tokens[index - 1], token);
    if (problem !== undefined) return problem;
    nesting += token.type === "open" ? 1 : token.type === "close" ? -1 : 0;
    if (nesting < 0) return formulaProblem(token.position, '")" without "("', 'a "(" for each ")"');
    if (nesting > MAX_NESTING) {
      return formulaProblem(
        token.position,
        "parentheses too deep",
        `at most ${MAX_NESTING} within each other`,
      );
    }
  }
  return endProblem(tokens, nesting) ?? ok(tokens);
}

function nameProblem({ type, text, position }: Token) {
  if (type !== "name" || text === "s" || isFunction(text) || isConstantName(text)) return undefined;
  return formulaProblem(position, `unknown name ${quoted(text)}`, "s, pi, e, constants and functions");
}

function pairProblem(before: Token | undefined, token: Token) {
  const { type, text, position } = token;
  const opens = type === "number" || type === "name" || type === "open";
  if (before !== undefined && before.type === "name" && isFunction(before.text)) {
    return type === "open" ? undefined : functionProblem(before);
  }
  const afterValue = before?.type === "number" || before?.type === "name" || before?.type === "close";
  if (afterValue) return opens ? sideBySide(before, token) : undefined;
  const isSign = text === "+" || text === "-";
  if (opens || (isSign && (before === undefined || before.type === "open" || before.text === "^")))
    return undefined;
  if (isSign)
    return formulaProblem(position, `a second operator ${quoted(text)}`, `${OPERAND}, signs in parentheses`);
  return formulaProblem(position, quoted(text), OPERAND);
}

function sideBySide(before: Token, token: Token) {
  const { position } = token;
  if (before.type === "name" && token.type === "open") {
    const allowed = `a function (${orList(FORMULA_FUNCTIONS)}), or ${before.text}*(…) for a product`;
    return formulaProblem(before.position, `${quoted(before.text)} is no function`, allowed);
  }
  const found = `${quoted(before.text)} and ${quoted(token.text)} side by side`;
  return formulaProblem(position, found, "an operator between them, as in 2*s");
}

const functionProblem = ({ text, position }: Token) =>
  formulaProblem(position, `${quoted(text)} without parentheses`, `${text}(…) with one value in it`);

function endProblem(tokens: readonly Token[], nesting: number) {
  const last = tokens.at(-1);
  if (last === undefined) return formulaProblem(1, "nothing", "an expression, as in 1/(1 + s/6283)");
  if (last.type === "name" && isFunction(last.text)) return functionProblem(last);
  if (last.type === "operator")
    return formulaProblem(last.position, `${quoted(last.text)} as the last word`, OPERAND);
  if (nesting === 0) return undefined;
  const open = tokens.findLast((token) => token.type === "open") as Token;
  return formulaProblem(open.position, `"(" without ")"`, 'a ")" for each "("');
}
