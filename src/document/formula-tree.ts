import type { MathNode } from "mathjs";
import type { BinaryOperator, FormulaFunction, FormulaTree } from "../core/formula/tree.ts";
import type { FormulaProblem } from "./context.ts";
import { isFunction } from "./formula-grammar.ts";
import type { Token } from "./formula-tokens.ts";

const MAX_EXPONENT = 30;

/** The parts of a parser's nodes that are looked at. */
interface SyntaxNode {
  readonly type: MathNode["type"];
  readonly op?: string;
  readonly name?: string;
  readonly value?: unknown;
  readonly args?: readonly SyntaxNode[];
  readonly content?: SyntaxNode;
  readonly fn?: string | SyntaxNode;
}

/** Thrown and caught within this layer only: a refusal somewhere deep in a tree. */
export class Refusal extends Error {
  readonly problem: FormulaProblem;
  constructor(position: number, found: string, allowed: string) {
    super(found);
    this.problem = { position, found: `${found} at character ${position}`, allowed };
  }
}

/**
 * The syntax tree as ours. Nodes carry no positions, so the words of the text are taken along: in the order in
 * which they are written, each operator, name and number belongs to one node.
 */
export function formulaTree(root: MathNode, tokens: readonly Token[]): FormulaTree {
  const words = tokens.filter(({ type }) => type === "number" || type === "name" || type === "operator");
  let used = 0;
  const take = (): Token => words[used++] ?? { type: "operator", text: "", position: 1 };
  const convert = (node: SyntaxNode, power: number): FormulaTree => {
    const args = node.args ?? [];
    switch (node.type) {
      case "ParenthesisNode":
        return convert(node.content as SyntaxNode, power);
      case "ConstantNode":
        return numberLeaf(take());
      case "SymbolNode":
        return nameLeaf(take());
      case "FunctionNode":
        return callOf(take(), args, (of) => convert(of, power));
      case "OperatorNode":
        return args.length === 1 ? signed(args[0], power) : binary(node, args, power);
      default:
        throw foreign(take());
    }
  };
  const signed = (of: SyntaxNode, power: number): FormulaTree => {
    const sign = take().text;
    const inner = convert(of, power);
    return sign === "-" ? { op: "negate", of: inner } : inner;
  };
  const binary = (node: SyntaxNode, [left, right]: readonly SyntaxNode[], power: number): FormulaTree => {
    if (node.op === "^") return powerOf(left, right, power);
    const leftTree = convert(left, power);
    const word = take();
    const op = BINARY[word.text];
    if (op === undefined || node.op !== word.text) throw foreign(word);
    return { op, left: leftTree, right: convert(right, power) };
  };
  const powerOf = (base: SyntaxNode, exponentNode: SyntaxNode, power: number): FormulaTree => {
    const exponent = wholeNumber(exponentNode);
    const total = power * Math.max(1, Math.abs(exponent ?? 1));
    const baseTree = convert(base, total);
    const word = take();
    if (exponent === undefined) {
      throw new Refusal(
        word.position,
        "no whole number as exponent",
        "a whole number behind ^, as in s^2 or s^(-1)",
      );
    }
    if (total > MAX_EXPONENT) {
      throw new Refusal(
        word.position,
        `a total power of ${total}`,
        `at most ${MAX_EXPONENT}, powers of powers included`,
      );
    }
    used += wordCount(exponentNode);
    return { op: "power", base: baseTree, exponent };
  };
  return convert(root as SyntaxNode, 1);
}

const BINARY: Readonly<Record<string, BinaryOperator>> = {
  "+": "add",
  "-": "subtract",
  "*": "multiply",
  "/": "divide",
};

const foreign = ({ text, position }: Token) =>
  new Refusal(position, `"${text}"`, "numbers, s, constants, + - * / ^, parentheses and functions");

function numberLeaf({ text, position }: Token): FormulaTree {
  const value = Number(text);
  if (Number.isFinite(value)) return { op: "number", value };
  throw new Refusal(position, `"${text}" is not a finite number`, "numbers up to about 1e308");
}

const nameLeaf = ({ text }: Token): FormulaTree =>
  text === "s" ? { op: "s" } : { op: "constant", name: text };

function callOf(
  word: Token,
  args: readonly SyntaxNode[],
  convert: (node: SyntaxNode) => FormulaTree,
): FormulaTree {
  if (!isFunction(word.text) || args.length !== 1) throw foreign(word);
  return { op: "call", name: word.text as FormulaFunction, of: convert(args[0]) };
}

/** The value of a whole number, with a sign or in parentheses; undefined for anything else. */
function wholeNumber(node: SyntaxNode): number | undefined {
  if (node.type === "ParenthesisNode") return wholeNumber(node.content as SyntaxNode);
  if (node.type === "ConstantNode") return Number.isInteger(node.value) ? (node.value as number) : undefined;
  const [only, another] = node.args ?? [];
  if (node.type !== "OperatorNode" || only === undefined || another !== undefined) return undefined;
  const size = wholeNumber(only);
  return size === undefined || node.op === "+" ? size : -size;
}

/** Words that a whole number is written with. */
function wordCount(node: SyntaxNode): number {
  if (node.type === "ParenthesisNode") return wordCount(node.content as SyntaxNode);
  return node.type === "ConstantNode" ? 1 : 1 + wordCount((node.args as readonly SyntaxNode[])[0]);
}
