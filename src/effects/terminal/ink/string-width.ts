import type exactly from "string-width";

/** Set up by the bundler when it is first called for: the library's own setting up takes longer than a frame. */
declare const require: (name: "string-width") => { readonly default: typeof exactly };

/** Latin, punctuation, arrows, signs, lines and blocks: every one of them a cell wide, as in `cells.ts`. */
const ONE_COLUMN =
  /^[\u0020-\u007e\u00a0-\u00ac\u00ae-\u02ff\u0370-\u03ff\u2010-\u2027\u2030-\u205e\u2070-\u209c\u2100-\u214f\u2190-\u22ff\u2500-\u25fc\u2800-\u28ff]*$/;
/** Select Graphic Rendition of ECMA-48, the only sequence in what is drawn here. */
const STYLES = /\u001b\[[\d;]*m/g;

/**
 * Cells that a text takes up, styles not counted. Stands in for the library when the program is bundled: nearly all that
 * is drawn is made of characters that are plainly one cell wide, and the library looks at each grapheme.
 */
export default function stringWidth(text: string): number {
  const plain = text.includes("\u001b") ? text.replace(STYLES, "") : text;
  return ONE_COLUMN.test(plain) ? plain.length : require("string-width").default(plain);
}
