import { add, type Dual, divide, dual, multiply, ONE, scale } from "../dual.ts";
import { BUILT_IN_CONSTANTS, type Constants, type FormulaFunction, type FormulaTree } from "./tree.ts";

/** A compiled expression: its value and derivative by ω at `s = jω`. */
export type Evaluate = (omega: number) => Dual;

/** Compiles an expression to nested functions, once; what has no `s` in it becomes a number. */
export function compile(tree: FormulaTree, constants: Constants): Evaluate {
  switch (tree.op) {
    case "number":
      return always(tree.value);
    case "constant":
      return always(constants[tree.name] ?? BUILT_IN_CONSTANTS[tree.name]);
    case "s":
      return (omega) => dual(0, omega, 0, 1);
    case "negate": {
      const of = compile(tree.of, constants);
      return (omega) => scale(of(omega), -1);
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
  subtract: (p: Dual, q: Dual) => add(p, scale(q, -1)),
  multiply,
  divide,
};

function integerPower(base: Dual, exponent: number): Dual {
  let result = ONE;
  let square = base;
  for (let rest = Math.abs(exponent); rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) result = multiply(result, square);
    square = multiply(square, square);
  }
  return exponent < 0 ? divide(ONE, result) : result;
}

function exp(z: Dual): Dual {
  const size = Math.exp(z.re);
  return chain(z, size * Math.cos(z.im), size * Math.sin(z.im), (value) => value);
}

/** `f(z)` with derivative `f'(z)·z'`, where f' is worked out from f's value. */
function chain(z: Dual, re: number, im: number, slopeOf: (value: Dual) => Dual): Dual {
  const slope = slopeOf(dual(re, im));
  return dual(re, im, slope.re * z.dRe - slope.im * z.dIm, slope.re * z.dIm + slope.im * z.dRe);
}

function log(z: Dual): Dual {
  return chain(z, Math.log(Math.hypot(z.re, z.im)), Math.atan2(z.im, z.re), () =>
    divide(ONE, dual(z.re, z.im)),
  );
}

function sqrt(z: Dual): Dual {
  const size = Math.sqrt(Math.hypot(z.re, z.im));
  const angle = Math.atan2(z.im, z.re) / 2;
  return chain(z, size * Math.cos(angle), size * Math.sin(angle), (root) => divide(dual(0.5), root));
}

const J = dual(0, 1);
const turned = (z: Dual): Dual => multiply(J, z);

const sinh = (z: Dual): Dual => scale(add(exp(z), scale(exp(scale(z, -1)), -1)), 0.5);
const cosh = (z: Dual): Dual => scale(add(exp(z), exp(scale(z, -1))), 0.5);

/** Through `e^(−2|z|)`, so that a large argument gives ±1 and not Infinity/Infinity. */
function tanh(z: Dual): Dual {
  const sign = z.re < 0 ? -1 : 1;
  const shrunk = exp(scale(z, -2 * sign));
  return scale(divide(add(ONE, scale(shrunk, -1)), add(ONE, shrunk)), sign);
}

const FUNCTIONS: Readonly<Record<FormulaFunction, (z: Dual) => Dual>> = {
  exp,
  log,
  sqrt,
  sinh,
  cosh,
  tanh,
  sin: (z) => multiply(dual(0, -1), sinh(turned(z))),
  cos: (z) => cosh(turned(z)),
  tan: (z) => multiply(dual(0, -1), tanh(turned(z))),
};
