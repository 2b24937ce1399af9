import { describe, expect, test } from "vitest";
import { compile } from "../../src/core/formula/evaluate.ts";
import type { FormulaTree } from "../../src/core/formula/tree.ts";
import { needsFormulaParser } from "../../src/document/formula-text.ts";
import { context, EXAMPLE } from "./read-here.ts";

function treeOf(text: string): FormulaTree {
  const parsed = context.formula?.(text);
  if (!parsed?.ok) throw new Error(`refused: ${text}`);
  return parsed.value;
}

const s: FormulaTree = { op: "s" };
const number = (value: number): FormulaTree => ({ op: "number", value });
const square: FormulaTree = { op: "power", base: s, exponent: 2 };

/** Trees by the usual rules of precedence: ^ before signs, signs before * and /, these before + and −, left to right. */
const trees: readonly (readonly [string, FormulaTree])[] = [
  ["s", s],
  [" +s ", s],
  ["-s^2", { op: "negate", of: square }],
  ["(-s)^2", { op: "power", base: { op: "negate", of: s }, exponent: 2 }],
  ["s^-1", { op: "power", base: s, exponent: -1 }],
  ["s^(-1)*s", { op: "multiply", left: { op: "power", base: s, exponent: -1 }, right: s }],
  ["s^+2", square],
  ["1-2-s", { op: "subtract", left: { op: "subtract", left: number(1), right: number(2) }, right: s }],
  ["1/2/s", { op: "divide", left: { op: "divide", left: number(1), right: number(2) }, right: s }],
  ["1+2*s", { op: "add", left: number(1), right: { op: "multiply", left: number(2), right: s } }],
  [
    "exp(-s)/k",
    {
      op: "divide",
      left: { op: "call", name: "exp", of: { op: "negate", of: s } },
      right: { op: "constant", name: "k" },
    },
  ],
  ["2*pi", { op: "multiply", left: number(2), right: { op: "constant", name: "pi" } }],
  ["(s^5)^(2)", { op: "power", base: { op: "power", base: s, exponent: 5 }, exponent: 2 }],
  [".5e-3", number(0.0005)],
];

describe("an expression becomes a tree", () => {
  test.each(trees)("%s", (text, tree) => expect(treeOf(text)).toEqual(tree));

  test("that has the value of the expression", () => {
    // At s = j: 1/(1 + 2j) = 0.2 − 0.4j, and e^(−jπ) = −1; by hand.
    const first = compile(treeOf("1/(1 + tau*s)"), { tau: 2 })(1);
    expect([first.re, first.im]).toEqual([expect.closeTo(0.2, 14), expect.closeTo(-0.4, 14)]);
    const second = compile(treeOf("exp(-pi*s)*sqrt(4)"), {})(1);
    expect([second.re, second.im]).toEqual([expect.closeTo(-2, 14), expect.closeTo(0, 14)]);
  });

  test("also one as long and as deep as allowed", () => {
    expect(treeOf(`${"(".repeat(60)}s${")".repeat(60)}`)).toEqual(s);
    const sum = treeOf(`s${"+s".repeat(499)}`);
    expect(compile(sum, {})(1).im).toBe(500);
    expect(treeOf("s^30")).toEqual({ op: "power", base: s, exponent: 30 });
  });
});

test.each([
  ["1+2s", 4],
  ["1+(2", 3],
  ["1+$", 3],
  ["s^s", 2],
  ["1+s^2^2", 4],
  ["(s^6)^6", 3],
  ["tan(1) + sqrt", 10],
  ["abs(s)", 1],
])("%s is refused at character %i", (text, position) => {
  const parsed = context.formula?.(text);
  expect(parsed?.ok === false && parsed.problem.position).toBe(position);
  expect(parsed?.ok === false && parsed.problem.found).toMatch(new RegExp(`at character ${position}$`));
});

test("the parser is asked for by files with a formula only", () => {
  expect(needsFormulaParser(EXAMPLE)).toBe(false);
  expect(needsFormulaParser('{"kind":"formula"}')).toBe(true);
  expect(needsFormulaParser('{"kind":"\\u0066ormula"}')).toBe(true);
});
