/** What a column of a sweep holds. */
export type Role =
  | "frequency"
  | "gainDb"
  | "ratio"
  | "input"
  | "output"
  | "phase"
  | "phaseUnwrapped"
  | "real"
  | "imaginary"
  | "skip";

export interface Column {
  readonly role: Role;
  /** Factor to Hz, V or degrees; 1 for the rest. */
  readonly scale: number;
  /** `frequency in kHz`, `dB`, `degrees`, `not read`. */
  readonly label: string;
  /** What was assumed about it. */
  readonly note?: string;
}

export const FREQUENCY_UNITS: Readonly<Record<string, { readonly name: string; readonly scale: number }>> = {
  hz: { name: "Hz", scale: 1 },
  khz: { name: "kHz", scale: 1e3 },
  mhz: { name: "MHz", scale: 1e6 },
  ghz: { name: "GHz", scale: 1e9 },
};

export const SKIP: Column = { role: "skip", scale: 1, label: "not read" };

export function frequencyColumn(unit: string): Column {
  const { name, scale } = FREQUENCY_UNITS[unit];
  return { role: "frequency", scale, label: unit === "hz" ? "frequency" : `frequency in ${name}` };
}

export const DECIBEL: Column = { role: "gainDb", scale: 1, label: "dB" };
export const RATIO: Column = { role: "ratio", scale: 1, label: "ratio" };
export const REAL: Column = { role: "real", scale: 1, label: "real part" };
export const IMAGINARY: Column = { role: "imaginary", scale: 1, label: "imaginary part" };
export const DEGREES: Column = { role: "phase", scale: 1, label: "degrees" };
export const RADIANS: Column = { role: "phase", scale: 180 / Math.PI, label: "radians" };

/** Of a text without a header, by its number of columns. */
export const DEFAULT_COLUMNS: Readonly<Record<number, readonly Column[]>> = {
  2: [frequencyColumn("hz"), DECIBEL],
  3: [frequencyColumn("hz"), DECIBEL, DEGREES],
};
