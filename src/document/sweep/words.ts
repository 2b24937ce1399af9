/** The words that headers are made of. Everything else in a header is unknown, on purpose: a near miss is no match. */

export type Quantity =
  | "frequency"
  | "magnitude"
  | "level"
  | "phase"
  | "real"
  | "imaginary"
  | "input"
  | "output";

export type HeaderUnit =
  | "hz"
  | "khz"
  | "mhz"
  | "ghz"
  | "db"
  | "linear"
  | "degree"
  | "radian"
  | "V"
  | "mV"
  | "µV";

const QUANTITY_WORDS: Readonly<Record<Quantity, string>> = {
  frequency: "f freq frequency",
  magnitude: "gain mag magnitude ratio h abs s21",
  // Alone these could be volts or dB, so they need a unit.
  level: "level amplitude amp response",
  phase: "phase angle arg argument phi φ ϕ ∠",
  real: "re real",
  imaginary: "im imag imaginary",
  input: "vin uin input in",
  output: "vout uout output out",
};

const UNIT_WORDS: Readonly<Record<HeaderUnit, string>> = {
  hz: "hz hertz",
  khz: "khz kilohertz",
  mhz: "mhz megahertz",
  ghz: "ghz gigahertz",
  db: "db decibel decibels",
  linear: "lin linear",
  degree: "deg degs degree degrees °",
  radian: "rad rads radian radians",
  V: "v volt volts vrms vpp vpk",
  mV: "mv millivolt millivolts mvrms mvpp mvpk",
  µV: "uv µv μv microvolt microvolts",
};

/** Say nothing about which column it is. */
const NEUTRAL_WORDS = "voltage part transfer function measured meas rms pk pp peak the of";

/** Columns that stand beside a response and are left out without asking. */
const OTHER_WORDS = "attenuation loss slope delay coherence time date temperature temp index no nr";

const byWord = <T extends string>(table: Readonly<Record<T, string>>): ReadonlyMap<string, T> =>
  new Map(
    (Object.keys(table) as T[]).flatMap((key) => table[key].split(" ").map((word) => [word, key] as const)),
  );

export const QUANTITIES = byWord(QUANTITY_WORDS);
export const UNITS_BY_WORD = byWord(UNIT_WORDS);
export const NEUTRAL: ReadonlySet<string> = new Set(NEUTRAL_WORDS.split(" "));
export const OTHER: ReadonlySet<string> = new Set(OTHER_WORDS.split(" "));

const WORD = /[\p{L}\p{N}]+|[°∠]/gu;
/** Units whose capital would be taken for the start of a word. */
const CAPITAL_INSIDE = /dB(?![a-z])|kHz|mHz|[muµμ]V/g;

/** Lower-case words of a header cell: `freqHz`, `Freq_(Hz)` and `freq/Hz` all give `freq` and `hz`. */
export function wordsOf(cell: string): string[] {
  const apart = cell.replace(/\bV\s*\/\s*V\b/gi, " linear ").replace(CAPITAL_INSIDE, " $& ");
  const words = (apart.match(WORD) ?? []).flatMap((word) =>
    new RegExp(`^(?:${CAPITAL_INSIDE.source})$`).test(word) ? [word] : humps(word),
  );
  return joinedVoltages(words.map((word) => word.toLowerCase()));
}

const humps = (word: string): string[] => word.split(/(?<=[\p{Ll}\p{N}])(?=\p{Lu})/u);

/** `v out` and `u_in` as one word. */
function joinedVoltages(words: readonly string[]): string[] {
  const joined: string[] = [];
  for (const word of words) {
    const before = joined.at(-1);
    if ((before === "v" || before === "u") && (word === "in" || word === "out"))
      joined[joined.length - 1] = before + word;
    else joined.push(word);
  }
  return joined;
}
