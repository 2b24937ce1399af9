import type { Charset } from "../core/units/format.ts";

/** Signs beside the texts, each with a plain one for terminals that know only ASCII. */
export interface Signs {
  /** In front of the row, and of the value, in hand. */
  readonly row: string;
  readonly value: string;
  /** In front of a tolerance. */
  readonly plusMinus: string;
  readonly difference: string;
  readonly none: string;
  readonly infinity: string;
  readonly more: string;
  readonly divider: string;
  readonly dot: string;
}

const UNICODE: Signs = {
  row: "▸",
  value: "›",
  plusMinus: "±",
  difference: "Δ",
  none: "–",
  infinity: "∞",
  more: "⋮",
  divider: "│",
  dot: "·",
};

const ASCII: Signs = {
  row: ">",
  value: ">",
  plusMinus: "+-",
  difference: "d ",
  none: "-",
  infinity: "inf",
  more: ":",
  divider: "|",
  dot: "-",
};

export const signsOf = (charset: Charset): Signs => (charset === "ascii" ? ASCII : UNICODE);

/** Words of ours in plain ASCII where nothing else can be shown: arrows, degrees, plus-minus. */
export function plainWords(text: string, charset: Charset): string {
  if (charset === "unicode") return text;
  return text.replace(/[←→↑↓±°ΩµΔ–…√]/g, (sign) => PLAIN_WORDS[sign] as string);
}

const PLAIN_WORDS: Readonly<Record<string, string>> = {
  "←": "Left",
  "→": "Right",
  "↑": "Up",
  "↓": "Down",
  "±": "+-",
  "°": " deg",
  Ω: "ohm",
  µ: "u",
  Δ: "d ",
  "–": "-",
  "…": "...",
  "√": "rt",
};
