import { type AttributeMask, attributeMask } from "./style.ts";

/** What a terminal understands, as far as this program makes use of it. */
export interface Dialect {
  /** A second screen, left without a trace (xterm's private mode 1049). */
  readonly alternateScreen: boolean;
  /** Private mode 25. */
  readonly hiddenCursor: boolean;
  /** Private mode 2004. */
  readonly bracketedPaste: boolean;
  /** Moves to a column in the same row (CHA). */
  readonly columnMoves: boolean;
  /** Attributes and colours taken back one at a time (SGR 22 to 49). */
  readonly partialReset: boolean;
  readonly attributes: AttributeMask;
  readonly colour: boolean;
}

const xterm: Dialect = {
  alternateScreen: true,
  hiddenCursor: true,
  bracketedPaste: true,
  columnMoves: true,
  partialReset: true,
  attributes: attributeMask(["bold", "dim", "italic", "underline", "blink", "inverse", "hidden", "strike"]),
  colour: true,
};

/** Linux `console_codes(4)`: no second screen, no pasting, no italics. From memory. */
const linuxConsole: Dialect = {
  ...xterm,
  alternateScreen: false,
  bracketedPaste: false,
  attributes: attributeMask(["bold", "dim", "underline", "blink", "inverse"]),
};

/** DEC VT100 user guide, chapter 3: cursor moves, erasing, autowrap and four attributes. From memory. */
const vt100: Dialect = {
  alternateScreen: false,
  hiddenCursor: false,
  bracketedPaste: false,
  columnMoves: false,
  partialReset: false,
  attributes: attributeMask(["bold", "underline", "blink", "inverse"]),
  colour: false,
};

/** DEC VT220 programmer reference: a VT100 that hides its cursor and takes attributes back singly. From memory. */
const vt220: Dialect = { ...vt100, hiddenCursor: true, partialReset: true };

/** The dialect of a terminal by its name in TERM; anything unknown is taken for a relative of xterm. */
export function dialectOf(term: string, colour: boolean): Dialect {
  const dialect = family(term);
  return { ...dialect, colour: dialect.colour && colour && !/-(m|mono)$/.test(term) };
}

function family(term: string): Dialect {
  if (/^linux/.test(term)) return linuxConsole;
  if (/^vt1\d\d/.test(term)) return vt100;
  return /^vt[2-5]\d\d/.test(term) ? vt220 : xterm;
}
