import stringWidth from "./string-width.ts";

/**
 * Stands in for the drawing library's own module of this name when the program is bundled (see `.ci/lean-ink.mjs`): the
 * library keeps every text it has ever measured, which in a program that is open all day fills the memory.
 */
export default function measureText(text: string): { readonly width: number; readonly height: number } {
  if (text === "") return { width: 0, height: 0 };
  const lines = text.split("\n");
  return {
    width: lines.reduce((widest, line) => Math.max(widest, stringWidth(line)), 0),
    height: lines.length,
  };
}
