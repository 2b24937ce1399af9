import { getLocation, type Node, type ParseError, printParseErrorCode } from "jsonc-parser";
import { quoted } from "../core/text.ts";
import { type DocumentPath, type DocumentProblem, problemAt } from "./problem.ts";

/** A problem whose place is a character of the text, counted from 0, and not that of its path. */
export type OffsetProblem = DocumentProblem & { readonly offset: number };

const VALUE = "a value: a text in double quotes, a number, true, false, a list or an object";
const NAME = "a name in double quotes";

const ALLOWED: Readonly<Record<string, string>> = {
  InvalidSymbol: VALUE,
  InvalidNumberFormat: "a number, as in 4.7 or 1e3",
  PropertyNameExpected: NAME,
  ValueExpected: VALUE,
  ColonExpected: "a colon after the name",
  CommaExpected: "a comma between entries, or the closing bracket of the same kind",
  CloseBraceExpected: 'a comma or a closing "}"',
  CloseBracketExpected: 'a comma or a closing "]"',
  EndOfFileExpected: "nothing more after the end of the chain",
  InvalidCommentToken: 'no comments; what is to be remembered goes into "notes"',
  UnexpectedEndOfNumber: "a number with digits behind its point and exponent, as in 4.7 or 1e3",
  UnexpectedEndOfString: "a text that ends on its line with a double quote",
  InvalidUnicode: "four hexadecimal digits after \\u, as in \\u03a9",
  InvalidEscapeCharacter: 'after a backslash one of " \\ / b f n r t u',
  InvalidCharacter: "control characters as escapes, as in \\n or \\t",
};

/** The first error of a text that is not JSON, with the path of the value that it is in. */
export function syntaxProblem(
  text: string,
  errors: readonly ParseError[],
  root: Node | undefined,
): OffsetProblem {
  const { offset, length } = errors[0] ?? { offset: 0, length: 0 };
  const [code, next] = errors.map(({ error }) => printParseErrorCode(error));
  const path = pathAt(text, offset);
  const comma = commaBefore(text, offset);
  if (comma !== undefined) {
    const found = `there is a comma before ${quoted(text[offset])}`;
    return { ...problemAt(path, found, "no comma behind the last entry"), offset: comma };
  }
  const isAfter = root !== undefined && code === "InvalidSymbol" && offset >= root.offset + root.length;
  const isName = code === "InvalidSymbol" && next === "PropertyNameExpected";
  const allowed = isAfter ? ALLOWED.EndOfFileExpected : isName ? NAME : ALLOWED[code];
  return { ...problemAt(path, foundText(text, offset, length), allowed ?? VALUE), offset };
}

function foundText(text: string, offset: number, length: number): string {
  if (text.trim() === "") return "the file is empty";
  if (offset >= text.trimEnd().length) return "found the end of the file";
  return `found ${quoted(text.slice(offset, offset + Math.max(1, length)))}`;
}

function pathAt(text: string, offset: number): DocumentPath {
  const { path } = getLocation(text, offset);
  return path.at(-1) === "" ? path.slice(0, -1) : path;
}

/** Where the comma is that has only blanks between it and the closing bracket at `offset`. */
function commaBefore(text: string, offset: number): number | undefined {
  if (text[offset] !== "}" && text[offset] !== "]") return undefined;
  const index = text.slice(0, offset).trimEnd().length - 1;
  return text[index] === "," ? index : undefined;
}
