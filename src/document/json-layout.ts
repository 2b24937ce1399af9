/** JSON as a person would lay it out: an entry to a line where it fits, in braces with a blank inside. */

const WIDTH = 110;
const STEP = "  ";

/** Everything on one line: `{ "kind": "gain", "parts": { "gain": 10 } }`. */
export function onOneLine(value: unknown): string {
  if (Array.isArray(value)) return value.length === 0 ? "[]" : `[${value.map(onOneLine).join(", ")}]`;
  if (typeof value === "object" && value !== null) {
    const entries = entriesOf(value).map(([name, inner]) => `${JSON.stringify(name)}: ${onOneLine(inner)}`);
    return entries.length === 0 ? "{}" : `{ ${entries.join(", ")} }`;
  }
  return Object.is(value, -0) ? "-0" : (JSON.stringify(value) ?? "null");
}

/** Entries that JSON can hold. */
export const entriesOf = (value: object): [string, unknown][] =>
  Object.entries(value).filter(([, inner]) => inner !== undefined);

/** On one line where it fits behind `usedColumns`, else an entry to a line, each `indent` and one step further in. */
export function laidOut(value: unknown, indent: string, usedColumns: number, lineEnd: string): string {
  const line = onOneLine(value);
  const isList = Array.isArray(value) && value.some((entry) => typeof entry === "object");
  if (!isList && usedColumns + line.length <= WIDTH) return line;
  if (typeof value !== "object" || value === null) return line;
  const inner = indent + STEP;
  const entries = Array.isArray(value)
    ? value.map((entry) => inner + laidOut(entry, inner, inner.length + 1, lineEnd))
    : entriesOf(value).map(([name, entry]) => {
        const lead = `${inner}${JSON.stringify(name)}: `;
        return lead + laidOut(entry, inner, lead.length + 1, lineEnd);
      });
  const [open, close] = Array.isArray(value) ? "[]" : "{}";
  return [open, entries.join(`,${lineEnd}`), indent + close].join(lineEnd);
}

/** A whole document: one entry of its top level to a line, lists with one entry to a line. */
export const laidOutDocument = (document: object, lineEnd = "\n"): string =>
  laidOut(document, "", WIDTH, lineEnd) + lineEnd;
