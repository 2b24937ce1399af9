import { fail, ok, type Result } from "../core/result.ts";
import { quoted } from "../core/text.ts";
import type { FormulaProblem } from "./context.ts";

/** A word of an expression and where it stands, from 1. */
export interface Token {
  readonly type: "number" | "name" | "operator" | "open" | "close";
  readonly text: string;
  readonly position: number;
}

const TOKEN =
  /[ \t]+|((?:\d+(?:\.\d+)?|\.\d+)(?:[eE][+-]?\d+)?)|([A-Za-z_][A-Za-z0-9_]*)|([-+*/^])|(\()|(\))/y;
const TYPES = ["number", "name", "operator", "open", "close"] as const;

const HINTS: Readonly<Record<string, string>> = {
  ",": "a decimal point, and one value in a function's parentheses",
  "=": "an expression only, without an assignment",
  ".": "numbers with digits on both sides of the point, as in 4.7",
};
const ALLOWED = "numbers, names, + - * / ^ and parentheses";

export const formulaProblem = (position: number, found: string, allowed: string) =>
  fail<FormulaProblem>({ position, found: `${found} at character ${position}`, allowed });

/** Splits an expression into words; anything that no expression may hold is refused where it stands. */
export function formulaTokens(text: string): Result<readonly Token[], FormulaProblem> {
  const tokens: Token[] = [];
  for (let index = 0; index < text.length; ) {
    TOKEN.lastIndex = index;
    const match = TOKEN.exec(text);
    if (match === null) return foreignCharacter(text, index);
    const group = match.slice(1).findIndex((part) => part !== undefined);
    if (group >= 0) tokens.push({ type: TYPES[group], text: match[0], position: index + 1 });
    index += match[0].length;
  }
  return ok(tokens);
}

function foreignCharacter(text: string, index: number) {
  const character = String.fromCodePoint(text.codePointAt(index) as number);
  return formulaProblem(index + 1, quoted(character), HINTS[character] ?? ALLOWED);
}
