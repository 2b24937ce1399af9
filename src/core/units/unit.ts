/**
 * Units a value can be asked for in. The tag says what a bare number means; `symbol` is what is shown after it.
 *
 * `gain` is a ratio that may be typed in dB; `level` is dB by itself (losses, ripples, limits).
 */
export type UnitTag =
  | "ohm"
  | "farad"
  | "henry"
  | "hertz"
  | "second"
  | "metre"
  | "volt"
  | "voltPerRootHertz"
  | "amperePerRootHertz"
  | "samplesPerSecond"
  | "gain"
  | "level"
  | "degree"
  | "celsius"
  | "number";

export interface Unit {
  /** Shown after a value, empty for bare numbers. */
  readonly symbol: string;
  /** The same in plain ASCII. */
  readonly ascii: string;
  /** Further spellings that are read. All spellings are case-sensitive, with Ω and µ as in `unifySymbols`. */
  readonly alsoRead: readonly string[];
  /** SI prefixes are read and shown, read only (`number`, `gain`), or neither (`dB`, angles, °C). */
  readonly prefixes: "shown" | "read" | "none";
  /** Letters of IEC 60062 with a meaning for this unit only, as powers of ten. */
  readonly codeLetters: Readonly<Record<string, number>>;
  /** Whether `5%` makes sense. */
  readonly percent: boolean;
  /** What messages ask for. */
  readonly wanted: string;
}

type Rest = Partial<Omit<Unit, "symbol" | "wanted">>;

const unit = (symbol: string, wanted: string, rest: Rest = {}): Unit => ({
  symbol,
  ascii: symbol,
  alsoRead: [],
  prefixes: "shown",
  codeLetters: {},
  percent: false,
  wanted,
  ...rest,
});

export const UNITS: Readonly<Record<UnitTag, Unit>> = {
  ohm: unit("Ω", "a resistance in ohm, as in 4.7k, 4k7 or 4.7 kohm", {
    ascii: "ohm",
    alsoRead: ["ohms", "Ohm", "Ohms"],
    codeLetters: { L: -3, R: 0 },
  }),
  farad: unit("F", "a capacitance in F, as in 100n, 4n7 or 0.1 uF", { codeLetters: { F: 0 } }),
  henry: unit("H", "an inductance in H, as in 10u or 4.7 mH"),
  hertz: unit("Hz", "a frequency in Hz, as in 50, 12.5k or 1 MHz"),
  second: unit("s", "a time in s, as in 0.5, 10u or 5 ms"),
  metre: unit("m", "a length in m, as in 10 or 250 mm"),
  volt: unit("V", "a voltage in V, as in 5 or 20 mV"),
  voltPerRootHertz: unit("V/√Hz", "a noise voltage in V/rtHz, as in 5n or 5 nV/rtHz", {
    ascii: "V/rtHz",
    alsoRead: ["V/sqrtHz", "V/sqrt(Hz)"],
  }),
  amperePerRootHertz: unit("A/√Hz", "a noise current in A/rtHz, as in 1p or 1 pA/rtHz", {
    ascii: "A/rtHz",
    alsoRead: ["A/sqrtHz", "A/sqrt(Hz)"],
  }),
  samplesPerSecond: unit("S/s", "a sample rate in S/s, as in 20k or 20 kS/s", { alsoRead: ["Sa/s", "Hz"] }),
  gain: unit("", "a ratio or dB, as in 10, -2.5 or 26 dB", {
    alsoRead: ["V/V"],
    prefixes: "read",
    percent: true,
  }),
  level: unit("dB", "dB, as in 3, 0.5 or -6 dB", { prefixes: "none" }),
  degree: unit("°", "an angle in degrees, as in 90 or -45 deg", {
    ascii: "deg",
    alsoRead: ["deg"],
    prefixes: "none",
  }),
  celsius: unit("°C", "a temperature in degrees Celsius, as in 25 or -40", {
    ascii: "degC",
    alsoRead: ["degC", "C"],
    prefixes: "none",
  }),
  number: unit("", "a number, as in 0.707, 10k or 5%", { prefixes: "read", percent: true }),
};

/** Every way the unit may be written after a number, nothing at all included. */
export const spellingsOf = ({ symbol, ascii, alsoRead }: Unit): readonly string[] => [
  "",
  symbol,
  ascii,
  ...alsoRead,
];

/** The two code points of Ω and of µ, and the one-character ℃, brought to one each. */
export const unifySymbols = (text: string): string =>
  text.replaceAll("\u2126", "Ω").replaceAll("\u03bc", "µ").replaceAll("\u2103", "°C");
