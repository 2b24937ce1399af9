/** Items set one after the other with `joint` between them, in lines of at most `columns` where the items allow it. */
export function packed(items: readonly string[], joint: string, columns: number): readonly string[] {
  const lines: string[] = [];
  for (const item of items) {
    const last = lines.at(-1);
    const longer = last === undefined ? item : last + joint + item;
    if (last !== undefined && longer.length <= columns) lines[lines.length - 1] = longer;
    else lines.push(item);
  }
  return lines;
}

/** A sentence in lines of at most `columns`, what goes on set in under the first. */
export function wrapped(text: string, columns: number, indent = "  "): readonly string[] {
  const words = text.split(" ").filter((word) => word !== "");
  return packed(words, " ", columns - indent.length).map((line, k) => (k === 0 ? line : indent + line));
}
