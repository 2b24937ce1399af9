import {
  BUILT_IN_CONSTANTS,
  constantNames,
  FORMULA_FUNCTIONS,
  type FormulaTree,
} from "../core/formula/tree.ts";
import type { Problem } from "../core/result.ts";
import { quoted } from "../core/text.ts";
import type { ValueSpec } from "./value.ts";

/** A named constant of a formula stage: any finite number. */
export const CONSTANT: ValueSpec = { unit: "number", range: "any" };

const IDENTIFIER = /^[A-Za-z_][A-Za-z0-9_]*$/;
const MAX_NAME_LENGTH = 40;

/** Words with a meaning in expressions other than that of a name. */
const RESERVED_WORDS = [
  "mod",
  "to",
  "in",
  "and",
  "or",
  "xor",
  "not",
  "end",
  "true",
  "false",
  "null",
  "undefined",
];
const RESERVED_NUMBERS = ["NaN", "Infinity", "uninitialized"];
const RESERVED: ReadonlySet<string> = new Set([
  "s",
  "__proto__",
  ...Object.keys(BUILT_IN_CONSTANTS),
  ...FORMULA_FUNCTIONS,
  ...RESERVED_WORDS,
  ...RESERVED_NUMBERS,
]);

/** Whether a name in an expression can stand for a constant. */
export const isConstantName = (name: string): boolean =>
  Object.hasOwn(BUILT_IN_CONSTANTS, name) || constantNameProblem(name) === undefined;

/** Why a formula stage cannot have a constant of this name. */
export function constantNameProblem(name: string): Problem | undefined {
  if (!IDENTIFIER.test(name) || name.length > MAX_NAME_LENGTH) {
    const allowed = `a name of at most ${MAX_NAME_LENGTH} letters, digits and _, no digit first, as in tau1`;
    return { found: `${quoted(name)} cannot be the name of a constant`, allowed };
  }
  if (!RESERVED.has(name)) return undefined;
  return {
    found: `${quoted(name)} has a meaning of its own in a formula`,
    allowed: "any other name, as in tau1",
  };
}

/** The first name in the expression for which no value is given. */
export function missingConstant(
  text: string,
  tree: FormulaTree,
  isGiven: (name: string) => boolean,
): Problem | undefined {
  const missing = [...constantNames(tree)]
    .filter((name) => !isGiven(name))
    .map((name) => ({ name, index: text.search(new RegExp(`(?<![\\w.])${name}(?!\\w)`)) }))
    .sort((one, other) => one.index - other.index)[0];
  if (missing === undefined) return undefined;
  const { name, index } = missing;
  return {
    found: `${quoted(name)} at character ${index + 1} is not given`,
    allowed: `s, pi, e, or a constant that is given among the parts, as in ${quoted(name)}: 1`,
  };
}
