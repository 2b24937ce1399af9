import type { Dual } from "../dual.ts";
import type { Polynomial, Rational } from "../rational.ts";

/**
 * What a stage is made of, as the engine sees it: a row of two-ports from source to load.
 *
 * Transmission parameters, `V1 = A·V2 + B·I2`, `I1 = C·V2 + D·I2`, are kept as polynomials over a common `n`
 * (`A = a/n … D = d/n`) so that nothing is divided and a null is `n = 0`.
 * Source: D. M. Pozar, Microwave Engineering, ch. 4 (transmission parameters).
 */
export type Element = SeriesElement | ShuntElement | LumpedElement | DistributedElement | IsolatingElement;

/** A branch in the line: `n = den, a = den, b = num, c = 0, d = den` of its impedance. */
export interface SeriesElement {
  readonly form: "series";
  readonly impedance: Rational;
}

/** A branch from line to common: `n = num, a = num, b = 0, c = den, d = num` of its impedance. */
export interface ShuntElement {
  readonly form: "shunt";
  readonly impedance: Rational;
}

/** Any other reciprocal or ideal lumped two-port, all five functions in `x = s / omega0`. */
export interface LumpedElement {
  readonly form: "lumped";
  readonly omega0: number;
  readonly n: Polynomial;
  readonly a: Polynomial;
  readonly b: Polynomial;
  readonly c: Polynomial;
  readonly d: Polynomial;
}

/** A uniform line of real characteristic impedance: not a rational function of s. */
export interface DistributedElement {
  readonly form: "distributed";
  readonly z0Ohm: number;
  readonly delayS: number;
  /** Loss of the whole length in nepers at `lossAtHz`, rising with the square root of frequency. */
  readonly lossNeper: number;
  readonly lossAtHz: number;
}

/**
 * A stage whose output does not load its input: `A = 1/G, B = Zo/G, C = Yi/G, D = Yi·Zo/G`.
 * The chain factors here; everything between two of these is a group of its own.
 */
export interface IsolatingElement {
  readonly form: "isolating";
  readonly transfer: Transfer;
  /** Input admittance in siemens; absent when no current flows in. */
  readonly inputAdmittance?: Rational;
  /** Output impedance in ohm; absent when zero. */
  readonly outputImpedance?: Rational;
  /** Input-referred noise voltage in V/√Hz and current in A/√Hz. */
  readonly noise?: { readonly voltage: number; readonly current: number };
}

/** Open-circuit voltage transfer: a product of rational sections, or anything that can be evaluated on the axis. */
export type Transfer = RationalTransfer | IrrationalTransfer;

export interface RationalTransfer {
  readonly type: "rational";
  readonly sections: readonly Rational[];
}

export interface IrrationalTransfer {
  readonly type: "irrational";
  /** Value and derivative by ln ω at `omega` (rad/s); NaN where there is no value. */
  readonly at: (omega: number) => Dual;
  /** Pure delay contained in it, seconds: taken out before phase is unwrapped. */
  readonly delayS: number;
  /** Frequencies in Hz between `fromHz` and `toHz` where it has nulls, corners or breaks; bounded in number. */
  readonly marks: (fromHz: number, toHz: number) => readonly number[];
}
