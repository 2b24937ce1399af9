import {
  add,
  type Dual,
  derivativeOf,
  divide,
  dual,
  exponential,
  integerPower,
  multiply,
  negate,
  ONE,
  plain,
  toldAngle,
  withDerivative,
} from "../dual.ts";
import { BUILT_IN_CONSTANTS, type Constants, type FormulaFunction, type FormulaTree } from "./tree.ts";

/** A compiled expression: its value and derivative by ln ω at `s = jω`. */
export type Evaluate = (omega: number) => Dual;

/** Compiles an expression to nested functions, once; what has no `s` in it becomes a number. */
export function compile(tree: FormulaTree, constants: Constants): Evaluate {
  switch (tree.op) {
    case "number":
      return always(tree.value);
    case "constant":
      return always(constants[tree.name] ?? BUILT_IN_CONSTANTS[tree.name]);
    case "s":
      return (omega) => dual(0, omega, 0, omega);
    case "negate": {
      const of = compile(tree.of, constants);
      return (omega) => negate(of(omega));
    }
    case "power": {
      const base = compile(tree.base, constants);
      return (omega) => integerPower(base(omega), tree.exponent);
    }
    case "call": {
      const of = compile(tree.of, constants);
      const apply = FUNCTIONS[tree.name];
      return (omega) => apply(of(omega));
    }
    default: {
      const left = compile(tree.left, constants);
      const right = compile(tree.right, constants);
      const apply = OPERATORS[tree.op];
      return (omega) => apply(left(omega), right(omega));
    }
  }
}

const always = (value: number): Evaluate => {
  const constant = dual(value);
  return () => constant;
};

const OPERATORS = {
  add,
  subtract: (p: Dual, q: Dual) => add(p, negate(q)),
  multiply,
  divide,
};

/** `f(z)` from its value and `f'(z)`, by the chain rule. */
const chain = (z: Dual, value: Dual, slope: Dual): Dual =>
  withDerivative(value, multiply(slope, derivativeOf(z)));

function exp(z: Dual): Dual {
  const value = pointExp(z);
  return chain(z, value, value);
}

function log(z: Dual): Dual {
  const size = Math.log(Math.hypot(z.re, z.im)) + z.exponent * Math.LN2;
  return chain(z, dual(size, Math.atan2(z.im, z.re)), divide(ONE, z));
}

function sqrt(z: Dual): Dual {
  const odd = z.exponent % 2 !== 0;
  const size = Math.sqrt(Math.hypot(z.re, z.im) * (odd ? 2 : 1));
  const angle = Math.atan2(z.im, z.re) / 2;
  const exponent = (z.exponent - (odd ? 1 : 0)) / 2;
  const root = dual(size * Math.cos(angle), size * Math.sin(angle), 0, 0, exponent);
  return chain(z, root, divide(HALF, root));
}

const sinh = (z: Dual): Dual => chain(z, pointSinh(z), pointCosh(z));
const cosh = (z: Dual): Dual => chain(z, pointCosh(z), pointSinh(z));

/** Its derivative as 1/cosh², which the quotient rule would lose in a difference. */
function tanh(z: Dual): Dual {
  const inverse = divide(ONE, pointCosh(z));
  return chain(z, multiply(pointSinh(z), inverse), multiply(inverse, inverse));
}

/** Values alone, without derivatives. */
function pointExp(z: Dual): Dual {
  const { re, im } = plain(z);
  return exponential(re, im, 0, 0);
}

function pointSinh(z: Dual): Dual {
  // So near the origin it is the argument itself, even where that is below the least double.
  if (z.exponent < TINY_EXPONENT) return dual(z.re, z.im, 0, 0, z.exponent);
  const { re, im } = plain(z);
  const angle = toldAngle(im);
  if (Math.abs(re) < LARGE_ARGUMENT)
    return dual(Math.sinh(re) * Math.cos(angle), Math.cosh(re) * Math.sin(angle));
  return multiply(HALF, add(exponential(re, im, 0, 0), negate(exponential(-re, -im, 0, 0))));
}

function pointCosh(z: Dual): Dual {
  const { re, im } = plain(z);
  const angle = toldAngle(im);
  if (Math.abs(re) < LARGE_ARGUMENT)
    return dual(Math.cosh(re) * Math.cos(angle), Math.sinh(re) * Math.sin(angle));
  return multiply(HALF, add(exponential(re, im, 0, 0), exponential(-re, -im, 0, 0)));
}

const HALF = dual(0.5);
const TINY_EXPONENT = -500;
const LARGE_ARGUMENT = 300;

const J = dual(0, 1);
const turned = (z: Dual): Dual => multiply(J, z);
const turnedBack = (z: Dual): Dual => multiply(z, dual(0, -1));

const FUNCTIONS: Readonly<Record<FormulaFunction, (z: Dual) => Dual>> = {
  exp,
  log,
  sqrt,
  sinh,
  cosh,
  tanh,
  sin: (z) => turnedBack(sinh(turned(z))),
  cos: (z) => cosh(turned(z)),
  tan: (z) => turnedBack(tanh(turned(z))),
};
