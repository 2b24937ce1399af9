/**
 * What an expression of a formula stage may be made of; anything else is refused when its text is read.
 * Functions are those of complex arguments, principal branch.
 */
export type FormulaTree =
  | { readonly op: "number"; readonly value: number }
  | { readonly op: "s" }
  | { readonly op: "constant"; readonly name: string }
  | { readonly op: "negate"; readonly of: FormulaTree }
  | { readonly op: BinaryOperator; readonly left: FormulaTree; readonly right: FormulaTree }
  | { readonly op: "power"; readonly base: FormulaTree; readonly exponent: number }
  | { readonly op: "call"; readonly name: FormulaFunction; readonly of: FormulaTree };

export type BinaryOperator = "add" | "subtract" | "multiply" | "divide";

export const FORMULA_FUNCTIONS = ["exp", "sqrt", "log", "sin", "cos", "tan", "sinh", "cosh", "tanh"] as const;
export type FormulaFunction = (typeof FORMULA_FUNCTIONS)[number];

/** Names that are always there; a stage's own constants may not take them, nor `s`. */
export const BUILT_IN_CONSTANTS: Readonly<Record<string, number>> = { pi: Math.PI, e: Math.E };

/** Values of named constants. */
export type Constants = Readonly<Record<string, number>>;

/** Names of constants used, other than the built-in ones. */
export function constantNames(tree: FormulaTree): ReadonlySet<string> {
  const names = new Set<string>();
  const walk = (node: FormulaTree): void => {
    if (node.op === "constant" && !Object.hasOwn(BUILT_IN_CONSTANTS, node.name)) names.add(node.name);
    for (const child of childrenOf(node)) walk(child);
  };
  walk(tree);
  return names;
}

export function childrenOf(node: FormulaTree): readonly FormulaTree[] {
  if ("left" in node) return [node.left, node.right];
  if ("of" in node) return [node.of];
  return node.op === "power" ? [node.base] : [];
}
