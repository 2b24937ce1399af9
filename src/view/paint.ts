import type { Role } from "../chart/spans.ts";

/** How a piece of text is set. What a look tells is always told in words or shape too. */
export type Look =
  | "plain"
  | "strong"
  | "faint"
  | "inHand"
  | "caret"
  | "bad"
  | "good"
  | "value"
  | "heading"
  | "trace"
  | "ghost"
  | "limit"
  | "edge"
  | "bench"
  | "band"
  | "pin";

export interface Piece {
  readonly text: string;
  readonly look: Look;
}

/** Pieces from left to right. */
export type Line = readonly Piece[];

export const piece = (text: string, look: Look = "plain"): Piece => ({ text, look });

/** Select Graphic Rendition of ECMA-48; colours from the first eight, so that every palette has them. */
const SGR: Readonly<Record<Look, string>> = {
  plain: "",
  strong: "1",
  faint: "2",
  inHand: "1;36",
  caret: "7",
  bad: "1;31",
  good: "32",
  value: "1",
  heading: "1;4",
  trace: "36",
  ghost: "35",
  limit: "31",
  edge: "33",
  bench: "32",
  band: "34",
  pin: "1;33",
};

/** Pieces as text for the terminal module, which drops what the terminal cannot show. */
export const painted = (line: Line): string =>
  line
    .map(({ text, look }) =>
      SGR[look] === "" || text === "" ? text : `\u001b[${SGR[look]}m${text}\u001b[0m`,
    )
    .join("");

const LOOK_OF_ROLE: Readonly<Record<Role, Look>> = {
  label: "faint",
  axis: "faint",
  grid: "faint",
  trace: "trace",
  ghost: "ghost",
  cursor: "caret",
  pin: "pin",
  limit: "limit",
  level: "faint",
  fold: "edge",
  bench: "bench",
  band: "band",
  asymptote: "faint",
};

export const lookOfRole = (role: Role): Look => LOOK_OF_ROLE[role];
