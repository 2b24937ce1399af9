/** How a cell looks. `key` is equal exactly where two styles look the same. */
export interface Style {
  readonly key: string;
  readonly attributes: AttributeMask;
  /** SGR parameters of the colour, such as `31` or `38;5;9`; empty for the terminal's own. */
  readonly foreground: string;
  readonly background: string;
}

/** One bit for each attribute. */
export type AttributeMask = number;

interface Attribute {
  readonly name: string;
  readonly on: number;
  readonly off: number;
}

/** ECMA-48, 5th edition, 8.3.117 (SGR). Bold and dim share the code that takes them back. */
const attributes: readonly Attribute[] = [
  { name: "bold", on: 1, off: 22 },
  { name: "dim", on: 2, off: 22 },
  { name: "italic", on: 3, off: 23 },
  { name: "underline", on: 4, off: 24 },
  { name: "blink", on: 5, off: 25 },
  { name: "inverse", on: 7, off: 27 },
  { name: "hidden", on: 8, off: 28 },
  { name: "strike", on: 9, off: 29 },
];

const bitOf = (index: number): AttributeMask => 1 << index;

export const attributeMask = (names: readonly string[]): AttributeMask =>
  attributes.reduce((mask, { name }, index) => (names.includes(name) ? mask | bitOf(index) : mask), 0);

const makeStyle = (mask: AttributeMask, foreground: string, background: string): Style => ({
  key: `${mask}/${foreground}/${background}`,
  attributes: mask,
  foreground,
  background,
});

export const plain: Style = makeStyle(0, "", "");

/** What may be shown at all; the rest is dropped where a frame is read. */
export interface StyleRules {
  readonly attributes: AttributeMask;
  readonly colour: boolean;
}

/** Few styles and few changes between them come up, each a thousand times a frame: what was worked out is kept. */
class Kept<T> {
  readonly #values = new Map<string, T>();

  of(key: string, make: () => T): T {
    const known = this.#values.get(key);
    if (known !== undefined) return known;
    // Only a stream of ever new colours gets this far.
    if (this.#values.size >= MOST_KEPT) this.#values.clear();
    const made = make();
    this.#values.set(key, made);
    return made;
  }
}

const MOST_KEPT = 1000;
const appliedStyles = new Kept<Style>();
const styleChanges = new Kept<string>();

/** The style after `CSI parameters m`. Codes that are none of ours change nothing. */
export const applySgr = (style: Style, parameters: string, rules: StyleRules): Style =>
  appliedStyles.of(`${style.key} ${parameters} ${rules.attributes} ${rules.colour}`, () =>
    appliedSgr(style, parameters, rules),
  );

function appliedSgr(style: Style, parameters: string, rules: StyleRules): Style {
  let { attributes: mask, foreground, background } = style;
  const codes = parameters.split(";");
  for (let index = 0; index < codes.length; index += 1) {
    const code = Number.parseInt(codes[index] || "0", 10);
    if (code === 0) [mask, foreground, background] = [0, "", ""];
    else if (code === 38 || code === 48 || code === 58) {
      const colour = extendedColour(codes, index);
      if (code === 38) foreground = colour.text;
      if (code === 48) background = colour.text;
      index = colour.last;
    } else if (code === 39) foreground = "";
    else if (code === 49) background = "";
    else if (isForeground(code)) foreground = String(code);
    else if (isBackground(code)) background = String(code);
    else mask = applyAttribute(mask, code);
  }
  return makeStyle(mask & rules.attributes, rules.colour ? foreground : "", rules.colour ? background : "");
}

const isForeground = (code: number) => (code >= 30 && code <= 37) || (code >= 90 && code <= 97);
const isBackground = (code: number) => (code >= 40 && code <= 47) || (code >= 100 && code <= 107);

/** `38;5;n`, `38;2;r;g;b` or the same with colons in one parameter. */
function extendedColour(codes: readonly string[], first: number): { text: string; last: number } {
  if (codes[first]!.includes(":")) return { text: codes[first]!, last: first };
  const last = first + (codes[first + 1] === "2" ? 4 : 2);
  return { text: codes.slice(first, last + 1).join(";"), last };
}

function applyAttribute(mask: AttributeMask, code: number): AttributeMask {
  return attributes.reduce((result, { on, off }, index) => {
    if (code === on) return result | bitOf(index);
    return code === off ? result & ~bitOf(index) : result;
  }, mask);
}

/** The shortest sequence that turns one style into the other; empty where they are the same. */
export function styleChange(from: Style, to: Style, partialReset: boolean): string {
  if (from.key === to.key) return "";
  return styleChanges.of(`${from.key} ${to.key} ${partialReset}`, () =>
    shortestChange(from, to, partialReset),
  );
}

function shortestChange(from: Style, to: Style, partialReset: boolean): string {
  if (to.key === plain.key) return "\u001b[m";
  const afresh = `\u001b[${["0", ...onCodes(to.attributes), to.foreground, to.background].filter(Boolean).join(";")}m`;
  if (!partialReset) return afresh;
  const stepwise = `\u001b[${stepCodes(from, to).join(";")}m`;
  return stepwise.length <= afresh.length ? stepwise : afresh;
}

const onCodes = (mask: AttributeMask): string[] =>
  attributes.filter((_, index) => mask & bitOf(index)).map(({ on }) => String(on));

function stepCodes(from: Style, to: Style): string[] {
  const lost = from.attributes & ~to.attributes;
  const offCodes = new Set(
    attributes.filter((_, index) => lost & bitOf(index)).map(({ off }) => String(off)),
  );
  const takenAlong = offCodes.has("22") ? attributeMask(["bold", "dim"]) : 0;
  const codes = [...offCodes, ...onCodes(to.attributes & (~from.attributes | takenAlong))];
  if (from.foreground !== to.foreground) codes.push(to.foreground || "39");
  if (from.background !== to.background) codes.push(to.background || "49");
  return codes;
}
