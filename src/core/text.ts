/**
 * Text from files and arguments made safe to show: nothing in it can move the cursor, colour the terminal,
 * break the line or reverse the reading direction.
 */

/** Blanks that would break a line or jump along it; each run becomes one blank so that words stay apart. */
const LINE_BREAKS = /[\t\n\v\f\r\u0085\u2028\u2029]+/g;

/** C0 (with ESC), DEL, C1, and the directional marks, embeddings, overrides and isolates of Unicode Annex 9. */
const CONTROLS = /[\u0000-\u001f\u007f-\u009f\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069\ufeff]/g;

const LONE_SURROGATES = /\p{Surrogate}/gu;

/**
 * One line without control characters, at most `maxLength` code points long including the ellipsis
 * that stands for what was cut off.
 */
export function plainText(text: string, maxLength = 64, ellipsis = "…"): string {
  const clean = text.replace(LINE_BREAKS, " ").replace(CONTROLS, "").replace(LONE_SURROGATES, "\ufffd");
  if (clean.length <= maxLength) return clean;
  const kept = firstCodePoints(clean, maxLength + 1);
  if (kept.length <= maxLength) return kept.join("");
  const room = Math.max(0, maxLength - [...ellipsis].length);
  return kept.slice(0, room).join("") + ellipsis;
}

/** `"text"` in quotation marks, for messages. */
export const quoted = (text: string, maxLength = 32): string => `"${plainText(text, maxLength)}"`;

function firstCodePoints(text: string, count: number): string[] {
  // A code point takes at most two units, so a long text is never split as a whole.
  return [...text.slice(0, 2 * count)].slice(0, count);
}
