import type { Node } from "jsonc-parser";
import { entriesOf, laidOut, onOneLine } from "./json-layout.ts";
import { pairEntries } from "./pair.ts";

/** A text that is being changed, with the way its lines end. */
interface Source {
  readonly text: string;
  readonly lineEnd: string;
}

/** An entry of a list or object to be written, and which old entry it continues. */
interface Entry {
  readonly text: string;
  readonly from: number | undefined;
}

/**
 * The text of `after`, made from the text of `before` at `node`: what has not changed is copied character by character,
 * also where it was moved; blanks, line ends and commas between entries are those that stood there.
 */
export function rewritten(source: Source, node: Node, before: unknown, after: unknown): string {
  if (before === after || onOneLine(before) === onOneLine(after)) return slice(source, node);
  if (Array.isArray(before) && Array.isArray(after)) return rewrittenList(source, node, before, after);
  if (node.type === "object" && typeof after === "object" && after !== null && !Array.isArray(after)) {
    return rewrittenObject(source, node, before as Record<string, unknown>, after);
  }
  return fresh(source, node, after);
}

function rewrittenList(
  source: Source,
  node: Node,
  before: readonly unknown[],
  after: readonly unknown[],
): string {
  const old = node.children ?? [];
  if (old.length === 0) return fresh(source, node, after);
  const pairs = pairEntries(before, after);
  const entries = after.map((value, index): Entry => {
    const from = pairs[index];
    const text =
      from === undefined ? fresh(source, old[0], value) : rewritten(source, old[from], before[from], value);
    return { text, from };
  });
  return joined(source, node, entries);
}

function rewrittenObject(
  source: Source,
  node: Node,
  before: Readonly<Record<string, unknown>>,
  after: object,
): string {
  const old = node.children ?? [];
  if (old.length === 0) return fresh(source, node, after);
  const names = old.map(({ children = [] }) => children[0].value as string);
  const entries = entriesOf(after).map(([name, value]): Entry => {
    const from = names.indexOf(name);
    if (from === -1)
      return { text: `${JSON.stringify(name)}: ${fresh(source, old[0], value)}`, from: undefined };
    const valueNode = (old[from].children as Node[])[1];
    const lead = source.text.slice(old[from].offset, valueNode.offset);
    return { text: lead + rewritten(source, valueNode, before[name], value), from };
  });
  return joined(source, node, entries);
}

/** Entries with the gaps of the old text around them. */
function joined(source: Source, node: Node, entries: readonly Entry[]): string {
  const old = node.children as readonly Node[];
  const { text } = source;
  const open = text[node.offset];
  const close = text[node.offset + node.length - 1];
  if (entries.length === 0) return open + close;
  const lead = text.slice(node.offset + 1, old[0].offset);
  const trail = text.slice(end(old[old.length - 1]), node.offset + node.length - 1);
  /** Between the old entry `index` and the one before it; a list of one has only the blanks in front of it. */
  const gap = (index: number): string => {
    if (old.length === 1) return lead === "" ? ", " : `,${lead}`;
    const second = Math.max(1, index);
    return text.slice(end(old[second - 1]), old[second].offset);
  };
  const body = entries.map(
    (entry, index) => (index === 0 ? "" : gap(entry.from ?? old.length - 1)) + entry.text,
  );
  return open + lead + body.join("") + trail + close;
}

const end = ({ offset, length }: Node): number => offset + length;

const slice = ({ text }: Source, { offset, length }: Node): string => text.slice(offset, offset + length);

/** A new value in the place of `node`, or beside it: further lines are indented like the line it begins on. */
function fresh({ text, lineEnd }: Source, node: Node, value: unknown): string {
  const lineStart =
    Math.max(text.lastIndexOf("\n", node.offset - 1), text.lastIndexOf("\r", node.offset - 1)) + 1;
  const indent = /^[ \t]*/.exec(text.slice(lineStart, node.offset))?.[0] ?? "";
  return laidOut(value, indent, node.offset - lineStart, lineEnd);
}
