/** A key as the editor is told of it; the terminal module makes these. */
export interface KeyPress {
  readonly name: string;
  /** One character for the name "character", the text of a "paste", else empty. */
  readonly text: string;
  readonly ctrl: boolean;
  readonly alt: boolean;
  readonly shift: boolean;
}

/** One word for a key: `left`, `shift+left`, `ctrl+r`, `a`, `space`. */
export function keyWord({ name, text, ctrl, alt, shift }: KeyPress): string {
  const base = name === "character" ? (text === " " ? "space" : text) : name;
  return `${ctrl ? "ctrl+" : ""}${alt ? "alt+" : ""}${shift ? "shift+" : ""}${base}`;
}
