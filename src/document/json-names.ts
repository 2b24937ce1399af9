import type { Node } from "jsonc-parser";
import { quoted } from "../core/text.ts";
import type { OffsetProblem } from "./json-syntax.ts";
import { type DocumentPath, problemAt } from "./problem.ts";

/** The first name that stands twice in one object, or that would be lost on the way into an object. */
export function repeatedName(node: Node, path: DocumentPath = []): OffsetProblem | undefined {
  const isObject = node.type === "object";
  const names = new Set<string>();
  for (const [index, child] of (node.children ?? []).entries()) {
    const [name, value] = isObject ? (child.children as Node[]) : [undefined, child];
    const inner = [...path, name === undefined ? index : String(name.value)];
    const problem = (name && nameProblem(name, inner, names)) ?? repeatedName(value, inner);
    if (problem !== undefined) return problem;
  }
  return undefined;
}

function nameProblem(node: Node, path: DocumentPath, names: Set<string>): OffsetProblem | undefined {
  const name = String(node.value);
  const refuse = (found: string, allowed: string): OffsetProblem => ({
    ...problemAt(path, found, allowed, "name"),
    offset: node.offset,
  });
  if (name === "__proto__") return refuse(`there is no ${quoted(name)} in a chain`, "any other name");
  if (names.has(name)) return refuse(`${quoted(name)} is given a second time`, "each name once in an object");
  names.add(name);
  return undefined;
}
