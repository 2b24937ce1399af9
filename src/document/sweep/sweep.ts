/** A measured response as read from a text, and what was understood of that text. */
export interface MeasuredSweep {
  /** Hz, ascending, each frequency once, at least two. */
  readonly freqHz: Float64Array;
  readonly gainDb: Float64Array;
  /** Degrees as measured, wrapped or not; absent where the text has no phase. */
  readonly phaseDeg?: Float64Array;
  readonly understood: Understood;
  /** Ω of source and load that an S-parameter file refers to. */
  readonly referenceOhm?: number;
}

export interface Understood {
  readonly separator: SeparatorName;
  /** One per column of the text, in its order: `frequency in kHz`, `dB`, `degrees`, `not read`. */
  readonly columns: readonly string[];
  /** Of the frequencies in the text: Hz, kHz, MHz or GHz. */
  readonly unit: string;
  /** Rows in the text, repeated frequencies counted each time. */
  readonly rows: number;
  readonly rangeHz: readonly [from: number, to: number];
  /** How many frequencies occur in more than one row. */
  readonly averaged: number;
  /** Sentences without a full stop: whatever was assumed, sorted, averaged or not read. */
  readonly notes: readonly string[];
}

export type SeparatorName = "comma" | "semicolon" | "tab" | "blanks";

/** Rows beyond this many are refused. */
export const MAX_ROWS = 1_000_000;
