import { fail, ok, type Result } from "../core/result.ts";
import type { DocumentContext } from "./context.ts";
import { type JsonText, readJson } from "./json-text.ts";
import { offsetOf, placeAt } from "./place.ts";
import type { DocumentProblem } from "./problem.ts";
import { type ResolvedChain, resolveChain } from "./resolve.ts";
import type { ChainDocument } from "./types.ts";

/** A chain file that was read without a problem. */
export interface LoadedChain {
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  /** The text itself, so that what is written later can keep its layout. */
  readonly text: string;
}

const BYTE_ORDER_MARK = "\ufeff";

/** The text without a byte order mark in front. */
export const withoutMark = (text: string): string =>
  text.startsWith(BYTE_ORDER_MARK) ? text.slice(1) : text;

/** Reads and checks the text of a chain file; the problem names line, column and path. Never throws. */
export function readChainText(
  text: string,
  fileName: string,
  context: DocumentContext,
): Result<LoadedChain, DocumentProblem> {
  const body = withoutMark(text);
  const json = readJson(body);
  if (!json.ok) {
    const { offset, ...problem } = json.problem;
    return fail({ ...problem, place: placeAt(body, offset, fileName) });
  }
  const document = json.value.data as ChainDocument;
  const resolved = resolveChain(document, context);
  if (resolved.ok) return ok({ document, resolved: resolved.value, text });
  return fail(withPlace(resolved.problem, body, json.value, fileName));
}

const withPlace = (
  problem: DocumentProblem,
  body: string,
  { root }: JsonText,
  fileName: string,
): DocumentProblem => ({
  ...problem,
  place: placeAt(body, offsetOf(problem, root), fileName),
});
