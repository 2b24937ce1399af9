import type { Element } from "../elements/element.ts";
import type { FormulaTree } from "../formula/tree.ts";
import type { Problem } from "../result.ts";
import type { UnitTag } from "../units/unit.ts";

/**
 * One kind of stage: its parts, its circuit, its formula and source, its defaults and one line about it.
 * The chooser, the file check, the help and the README's catalogue are all read from this.
 */
export interface StageKind {
  readonly kind: string;
  readonly group: StageGroup;
  /** One line for the chooser: what it is for. */
  readonly summary: string;
  /** How the parts are wired, for the catalogue. */
  readonly circuit: string;
  /** Transfer of the open, unloaded stage driven from zero impedance. */
  readonly formula: string;
  /** Published source of the formula. */
  readonly source: string;
  readonly parts: readonly PartSpec[];
  /** Whether names beyond `parts` are taken as numeric constants (formula stages). */
  readonly ownConstants?: boolean;
  /** Rules that tie parts together; undefined when they hold. The problem names the part it is about. */
  readonly check?: (values: PartValues) => (Problem & { readonly part: string }) | undefined;
  /** The circuit. Called with checked values only. */
  readonly elements: (values: PartValues) => readonly Element[];
}

export type StageGroup = "passive" | "active" | "ideal" | "sampled";

/** Checked part values in SI units by name; absent parts are absent. */
export type PartValues = Readonly<Record<string, PartValue>>;
export type PartValue = number | string | TabulatedResponse | FormulaValue;

/** A measured response: ascending frequencies in Hz, gain in dB, unwrapped phase in degrees. */
export interface TabulatedResponse {
  readonly type: "table";
  readonly freqHz: Float64Array;
  readonly gainDb: Float64Array;
  readonly phaseDeg: Float64Array;
}

/** A parsed expression; see `core/formula`. */
export interface FormulaValue {
  readonly type: "formula";
  readonly text: string;
  readonly tree: FormulaTree;
}

export type PartSpec = NumberSpec | ChoiceSpec | FileSpec | FormulaSpec;

interface SpecBase {
  readonly name: string;
  /** A few words: what the part is. */
  readonly what: string;
  readonly optional: boolean;
  /** Text the chooser starts with; absent for an optional part that starts left out. */
  readonly initial?: string;
  /** What an optional part begins with once another part's choice asks for it. */
  readonly suggested?: string;
}

export interface NumberSpec extends SpecBase {
  readonly type: "number";
  readonly unit: UnitTag;
  readonly range: NumberRange;
  /** Value used when an optional part is left out, where that is not the same as being absent. */
  readonly fallback?: number;
}

/** `positive`: > 0; `nonNegative`: ≥ 0; `nonZero`; `any`; or a whole number or real range. */
export type NumberRange =
  | "positive"
  | "nonNegative"
  | "nonZero"
  | "any"
  | { readonly from: number; readonly to: number; readonly whole: boolean };

export interface ChoiceSpec extends SpecBase {
  readonly type: "choice";
  readonly choices: readonly string[];
}

export interface FileSpec extends SpecBase {
  readonly type: "file";
}

export interface FormulaSpec extends SpecBase {
  readonly type: "formula";
}

type NumberOptions = { readonly range?: NumberRange; readonly initial?: string; readonly fallback?: number };

const number =
  (unit: UnitTag, range: NumberRange) =>
  (name: string, what: string, options: NumberOptions = {}): NumberSpec => ({
    type: "number",
    name,
    what,
    unit,
    range: options.range ?? range,
    optional: false,
    ...(options.initial === undefined ? {} : { initial: options.initial }),
    ...(options.fallback === undefined ? {} : { fallback: options.fallback }),
  });

export const resistance = number("ohm", "positive");
export const capacitance = number("farad", "positive");
export const inductance = number("henry", "positive");
export const frequency = number("hertz", "positive");
export const duration = number("second", "positive");
export const metres = number("metre", "positive");
export const gain = number("gain", "nonZero");
export const lossDb = number("level", "positive");
export const voltageNoise = number("voltPerRootHertz", "nonNegative");
export const currentNoise = number("amperePerRootHertz", "nonNegative");
export const sampleRate = number("samplesPerSecond", "positive");
export const plain = number("number", "positive");

/** A loss or port that may be zero. */
export const orZero = (spec: NumberSpec): NumberSpec => ({ ...spec, range: "nonNegative" });

export const optional = <S extends PartSpec>(spec: S): S => ({ ...spec, optional: true });

/** Left out until another part's choice asks for it. */
export const suggested = <S extends PartSpec>(spec: S, text: string): S => ({
  ...spec,
  optional: true,
  suggested: text,
});

export const whole = (from: number, to: number): NumberRange => ({ from, to, whole: true });

export const choice = (
  name: string,
  what: string,
  choices: readonly string[],
  initial: string,
): ChoiceSpec => ({ type: "choice", name, what, choices, initial, optional: false });

type Defined<V, K extends StageKind> = Omit<K, "elements" | "check"> & {
  readonly elements: (values: V) => readonly Element[];
  readonly check?: (values: V) => (Problem & { readonly part: string }) | undefined;
};

/** Declares a kind with its own type of values `V`, whose names must be those of its parts. */
export function defineKind<V extends object>(kind: Defined<V, StageKind>): StageKind {
  return kind as unknown as StageKind;
}
