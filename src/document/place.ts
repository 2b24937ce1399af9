import { findNodeAtLocation, type Node } from "jsonc-parser";
import type { DocumentProblem, Place } from "./problem.ts";

/** Lines end with LF, CR or both; a surrogate pair is one character. */
export function placeAt(text: string, offset: number, fileName: string): Place {
  const lines = text.slice(0, offset).split(/\r\n|\n|\r/);
  return { fileName, line: lines.length, column: [...(lines.at(-1) ?? "")].length + 1 };
}

/** Where in the text the problem is: at its value or name, or at what should hold it where that is missing. */
export function offsetOf({ path, at }: DocumentProblem, root: Node): number {
  for (let length = path.length; length >= 0; length--) {
    const node = findNodeAtLocation(root, path.slice(0, length));
    if (node === undefined) continue;
    const isNamed = at === "name" && length === path.length && node.parent?.type === "property";
    return isNamed ? (node.parent?.offset ?? node.offset) : node.offset;
  }
  return root.offset;
}
