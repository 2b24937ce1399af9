import { parseTree } from "jsonc-parser";
import { laidOutDocument } from "./json-layout.ts";
import { withoutMark } from "./read.ts";
import { rewritten } from "./rewrite.ts";
import type { ChainDocument } from "./types.ts";

/** A chain as it was read: the text and what it says. */
export interface OriginalChain {
  readonly text: string;
  readonly document: ChainDocument;
}

/**
 * The text of a chain file. With the text it came from, everything that was not edited stays as the person wrote it:
 * an unchanged document gives that text back, byte by byte. Reading the text again gives exactly the document.
 */
export function chainText(document: ChainDocument, original?: OriginalChain): string {
  if (original === undefined) return laidOutDocument(document);
  if (document === original.document) return original.text;
  const body = withoutMark(original.text);
  const lineEnd = /\r\n|\n|\r/.exec(body)?.[0] ?? "\n";
  const root = parseTree(body);
  if (root === undefined) return laidOutDocument(document, lineEnd);
  const text = rewritten({ text: body, lineEnd }, root, original.document, document);
  const mark = original.text.slice(0, original.text.length - body.length);
  return mark + body.slice(0, root.offset) + text + body.slice(root.offset + root.length);
}
