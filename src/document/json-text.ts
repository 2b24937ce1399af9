import { type Node, type ParseError, parseTree } from "jsonc-parser";
import { fail, ok, type Result } from "../core/result.ts";
import { repeatedName } from "./json-names.ts";
import { sizeProblem } from "./json-size.ts";
import { type OffsetProblem, syntaxProblem } from "./json-syntax.ts";

/** Strict JSON: its data, and its tree for the places of values. */
export interface JsonText {
  readonly data: unknown;
  readonly root: Node;
}

/** Reads JSON as RFC 8259 has it, without comments and trailing commas, and with each name once per object. */
export function readJson(text: string): Result<JsonText, OffsetProblem> {
  const unsafe = sizeProblem(text);
  if (unsafe !== undefined) return fail(unsafe);
  const errors: ParseError[] = [];
  const root = parseTree(text, errors, { disallowComments: true, allowTrailingComma: false });
  if (root === undefined || errors.length > 0) return fail(syntaxProblem(text, errors, root));
  const repeated = repeatedName(root);
  return repeated === undefined ? ok({ data: JSON.parse(text), root }) : fail(repeated);
}
