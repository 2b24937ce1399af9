import stringWidth from "string-width";
import type { Charset } from "../core/units/format.ts";
import { type Line, type Look, type Piece, piece } from "./paint.ts";

const PLAIN = /^[ -~]*$/;
/** Made when it is wanted: most screens hold nothing that it is needed for. */
let segmenter: Intl.Segmenter | undefined;
function graphemesOf(text: string): Intl.Segments {
  segmenter ??= new Intl.Segmenter();
  return segmenter.segment(text);
}

/** Cells that a text takes up: two for wide characters, none for combining ones. */
export const widthOf = (text: string): number => (PLAIN.test(text) ? text.length : stringWidth(text));

export const ellipsisOf = (charset: Charset): string => (charset === "ascii" ? "~" : "…");

/** The text in at most so many cells; what is cut off is stood for by an ellipsis. */
export function cut(text: string, columns: number, charset: Charset = "unicode"): string {
  if (columns <= 0) return "";
  if (widthOf(text) <= columns) return text;
  if (PLAIN.test(text)) return text.slice(0, columns - 1) + ellipsisOf(charset);
  let kept = "";
  let width = 0;
  for (const { segment } of graphemesOf(text)) {
    width += widthOf(segment);
    if (width > columns - 1) break;
    kept += segment;
  }
  return kept + ellipsisOf(charset);
}

/** The text in exactly so many cells, set to the left or to the right. */
export function fitted(
  text: string,
  columns: number,
  side: "left" | "right" = "left",
  charset: Charset = "unicode",
): string {
  const shown = cut(text, columns, charset);
  const blank = " ".repeat(Math.max(0, columns - widthOf(shown)));
  return side === "left" ? shown + blank : blank + shown;
}

/** The line in exactly so many cells, filled up with blanks. */
export function fittedLine(line: Line, columns: number, charset: Charset = "unicode"): Line {
  const shown: Piece[] = [];
  let left = columns;
  for (const { text, look } of line) {
    if (left <= 0) break;
    const width = widthOf(text);
    shown.push(piece(width <= left ? text : fitted(text, left, "left", charset), look));
    left -= Math.min(width, left);
  }
  return left > 0 ? [...shown, piece(" ".repeat(left))] : shown;
}

/** Both ends of a line with blanks between; the left one is cut where there is no room for both. */
export function spread(left: Line, right: Line, columns: number, charset: Charset = "unicode"): Line {
  const rightWidth = right.reduce((sum, { text }) => sum + widthOf(text), 0);
  return [...fittedLine(left, Math.max(0, columns - rightWidth), charset), ...right];
}

/** Words in lines of at most so many cells; a word that is too long is cut in pieces. */
export function wrapped(text: string, columns: number): readonly string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ").flatMap((each) => chunks(each, columns))) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (widthOf(longer) <= columns) line = longer;
    else {
      lines.push(line);
      line = word;
    }
  }
  return line === "" ? lines : [...lines, line];
}

function chunks(word: string, columns: number): readonly string[] {
  if (widthOf(word) <= columns) return [word];
  const parts: string[] = [];
  let part = "";
  for (const { segment } of graphemesOf(word)) {
    if (widthOf(part + segment) > columns && part !== "") {
      parts.push(part);
      part = "";
    }
    part += segment;
  }
  return [...parts, part];
}

export const wrappedLines = (text: string, columns: number, look: Look): readonly Line[] =>
  wrapped(text, columns).map((line) => [piece(line, look)]);
