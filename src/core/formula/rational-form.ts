import { add, multiply, scale, stretch } from "../polynomial.ts";
import { type Polynomial, type Rational, rational } from "../rational.ts";
import { BUILT_IN_CONSTANTS, type Constants, type FormulaTree } from "./tree.ts";

/** A product of fractions in s: products stay factored, so that high powers neither overflow nor lose digits. */
type Product = readonly Fraction[];
interface Fraction {
  readonly num: Polynomial;
  readonly den: Polynomial;
}

/** No sum is multiplied out beyond this degree; what is larger is evaluated as it stands. */
const HIGHEST_DEGREE = 24;

/**
 * The expression as a product of rational sections, each scaled to its own corner; undefined where it is not
 * rational in s (a function of s in it), or where writing it as one would lose digits.
 */
export function rationalForm(tree: FormulaTree, constants: Constants): readonly Rational[] | undefined {
  const product = reduce(tree, constants);
  if (product === undefined || product.some(({ den }) => den.every((c) => c === 0))) return undefined;
  return product.map(scaled);
}

function reduce(node: FormulaTree, constants: Constants): Product | undefined {
  switch (node.op) {
    case "number":
      return constant(node.value);
    case "s":
      return [{ num: [0, 1], den: [1] }];
    case "constant":
      return constant(constants[node.name] ?? BUILT_IN_CONSTANTS[node.name]);
    case "negate":
      return combine(constant(-1), reduce(node.of, constants));
    case "power":
      return power(reduce(node.base, constants), node.exponent);
    case "call":
      return undefined;
    case "multiply":
      return combine(reduce(node.left, constants), reduce(node.right, constants));
    case "divide":
      return combine(reduce(node.left, constants), power(reduce(node.right, constants), -1));
    case "add":
      return sum(reduce(node.left, constants), reduce(node.right, constants), 1);
    case "subtract":
      return sum(reduce(node.left, constants), reduce(node.right, constants), -1);
  }
}

const constant = (value: number): Product => [{ num: [value], den: [1] }];

function combine(left: Product | undefined, right: Product | undefined): Product | undefined {
  return left === undefined || right === undefined ? undefined : [...left, ...right];
}

function power(base: Product | undefined, exponent: number): Product | undefined {
  if (base === undefined) return undefined;
  const once = exponent < 0 ? base.map(({ num, den }) => ({ num: den, den: num })) : base;
  return Array.from({ length: Math.abs(exponent) }, () => once).flat();
}

function sum(left: Product | undefined, right: Product | undefined, sign: 1 | -1): Product | undefined {
  const p = left && expand(left);
  const q = right && expand(right);
  if (p === undefined || q === undefined) return undefined;
  const same = p.den.length === q.den.length && p.den.every((c, k) => c === q.den[k]);
  const total = same
    ? { num: add(p.num, scale(q.num, sign)), den: p.den }
    : { num: add(multiply(p.num, q.den), scale(multiply(q.num, p.den), sign)), den: multiply(p.den, q.den) };
  return [total];
}

function expand(product: Product): Fraction | undefined {
  const degree = product.reduce((n, { num, den }) => n + Math.max(num.length, den.length) - 1, 0);
  if (degree > HIGHEST_DEGREE) return undefined;
  return product.reduce(
    (whole, { num, den }) => ({ num: multiply(whole.num, num), den: multiply(whole.den, den) }),
    { num: [1], den: [1] },
  );
}

/** Scales the variable to the section's own corner: the geometric mean of its roots. */
function scaled({ num, den }: Fraction): Rational {
  const omega0 = corner(den) ?? corner(num) ?? 1;
  return rational(stretch(num, omega0), stretch(den, omega0), omega0);
}

function corner(p: Polynomial): number | undefined {
  const low = p.findIndex((c) => c !== 0);
  const high = p.findLastIndex((c) => c !== 0);
  if (high <= low) return undefined;
  const mean = Math.abs(p[low] / p[high]) ** (1 / (high - low));
  return mean > 0 && mean < Infinity ? mean : undefined;
}
