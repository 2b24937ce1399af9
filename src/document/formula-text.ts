import type { MathNode } from "mathjs";
import type { FormulaTree } from "../core/formula/tree.ts";
import { fail, ok, type Result } from "../core/result.ts";
import type { FormulaParser, FormulaProblem } from "./context.ts";
import { checkGrammar } from "./formula-grammar.ts";
import { formulaProblem, formulaTokens, type Token } from "./formula-tokens.ts";
import { formulaTree, Refusal } from "./formula-tree.ts";

const MAX_LENGTH = 1000;

/** Whether reading this text may need the parser: it is large, so it is loaded for formula stages only. */
export const needsFormulaParser = (chainText: string): boolean =>
  chainText.includes('"formula"') || chainText.includes("\\u");

/**
 * Loads the parser for expressions. Only its syntax tree is used, nothing of a text is ever evaluated; the words of
 * the text are checked before it sees them.
 */
export async function loadFormulaParser(): Promise<FormulaParser> {
  const { create, parseDependencies } = await import("mathjs");
  const { parse } = create(parseDependencies) as { readonly parse: (text: string) => MathNode };
  return (text) => parseFormula(text, parse);
}

function parseFormula(text: string, parse: (text: string) => MathNode): Result<FormulaTree, FormulaProblem> {
  if (text.length > MAX_LENGTH) {
    const found = `the expression has ${text.length} characters`;
    return fail({ position: MAX_LENGTH + 1, found, allowed: `at most ${MAX_LENGTH}` });
  }
  const tokens = formulaTokens(text);
  if (!tokens.ok) return tokens;
  const checked = checkGrammar(tokens.value);
  return checked.ok ? treeOf(text, checked.value, parse) : checked;
}

function treeOf(
  text: string,
  tokens: readonly Token[],
  parse: (text: string) => MathNode,
): Result<FormulaTree, FormulaProblem> {
  try {
    return ok(formulaTree(parse(text), tokens));
  } catch (error) {
    if (error instanceof Refusal) return fail(error.problem);
    // The parser reports by exception, with the character that it stopped at.
    const position = Number((error as { readonly char?: unknown }).char) || 1;
    return formulaProblem(position, "no expression", "an expression, as in 1/(1 + s/6283)");
  }
}
