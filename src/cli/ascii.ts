/** Signs of the trade and of print in plain ASCII, as a terminal without UTF-8 shows them. */
const SPELLED: Readonly<Record<string, string>> = {
  Ω: "ohm",
  "\u2126": "ohm",
  µ: "u",
  μ: "u",
  "°": "deg",
  "…": "...",
  "−": "-",
  "‐": "-",
  "‑": "-",
  "–": "-",
  "—": "-",
  "‘": "'",
  "’": "'",
  "“": '"',
  "”": '"',
  "„": '"',
  "«": '"',
  "»": '"',
  "±": "+/-",
  "×": "x",
  "·": "*",
  "÷": "/",
  "√": "rt",
  "∞": "inf",
  "‖": "||",
  "≤": "<=",
  "≥": ">=",
  "→": "->",
  ß: "ss",
  æ: "ae",
  Æ: "AE",
  ø: "o",
  Ø: "O",
  œ: "oe",
  Œ: "OE",
  ł: "l",
  Ł: "L",
};

const BEYOND_ASCII = /[^\0-\x7f]/gu;

/** The text in plain ASCII: signs spelled out, accents left off, `?` for what is left. */
export const toAscii = (text: string): string => text.replace(BEYOND_ASCII, plainForm);

function plainForm(character: string): string {
  const spelled = SPELLED[character];
  if (spelled !== undefined) return spelled;
  const base = character.normalize("NFKD").replace(/\p{Mark}/gu, "");
  if (/^[\0-\x7f]*$/.test(base)) return base;
  return SPELLED[base] ?? "?";
}

const escaped = (character: string): string => {
  const units = Array.from({ length: character.length }, (_, k) => character.charCodeAt(k));
  return units.map((unit) => `\\u${unit.toString(16).padStart(4, "0")}`).join("");
};

/** JSON text in plain ASCII; it says the same. */
export const jsonToAscii = (json: string): string => json.replace(BEYOND_ASCII, escaped);

/** Delete, C1 and the signs that turn the reading direction: JSON lets them stand as they are. */
const HARMFUL = /[\x7f-\x9f\u061c\u200e\u200f\u2028-\u202e\u2066-\u2069\ufeff]/g;

/** JSON text that says the same and does nothing to a terminal. */
export const jsonMadeSafe = (json: string): string => json.replace(HARMFUL, escaped);
