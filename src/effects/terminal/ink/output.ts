import stringWidth from "./string-width.ts";

type Transformer = (line: string, index: number) => string;

interface Segment {
  readonly x: number;
  readonly line: string;
}

/**
 * Stands in for the drawing library's own module of this name when the program is bundled (see `.ci/lean-ink.mjs`).
 *
 * The library takes every text apart into styled characters, some 8000 objects a frame. Here texts are whole lines that
 * fit their boxes and never lie over each other: it is enough to set them side by side.
 */
export default class Output {
  readonly #rows: Segment[][];

  constructor({ height }: { readonly width: number; readonly height: number }) {
    this.#rows = Array.from({ length: height }, () => []);
  }

  write(
    x: number,
    y: number,
    text: string,
    { transformers }: { readonly transformers: readonly Transformer[] },
  ): void {
    for (const [index, line] of text.split("\n").entries()) {
      const shown = transformers.reduce((sofar, transform) => transform(sofar, index), line);
      this.#rows[y + index]?.push({ x, line: shown });
    }
  }

  /** Nothing here is ever clipped: lines are cut to their boxes before they come. */
  clip(): void {}
  unclip(): void {}

  get(): { readonly output: string; readonly height: number } {
    return { output: this.#rows.map(rowText).join("\n"), height: this.#rows.length };
  }
}

function rowText(segments: readonly Segment[]): string {
  let text = "";
  let column = 0;
  for (const { x, line } of segments.toSorted((one, other) => one.x - other.x)) {
    text += " ".repeat(Math.max(0, x - column)) + line;
    // Only where something comes behind it does the width of a line matter.
    column = segments.length > 1 ? Math.max(x, column) + stringWidth(line) : column;
  }
  return text.trimEnd();
}
