import { type Polynomial, type Rational, rational } from "../rational.ts";
import { frequency, optional } from "./kind.ts";

/** Open-loop gain `A(s) = 2π·gbw/s`: what every op-amp stage may be given. */
export const gbwPart = optional(frequency("gbw", "gain–bandwidth product of the op amp"));

/** `1/A` as a polynomial in s; zero for an ideal op amp. */
export const inverseOpenLoopGain = (gbw: number | undefined): Polynomial =>
  gbw === undefined ? [0] : [0, 1 / (2 * Math.PI * gbw)];

/** Resistor and capacitor in series, impedance in s; the capacitor may be left out. */
export const inSeries = (R: number, C: number | undefined): Rational =>
  C === undefined ? rational([R]) : rational([1, R * C], [0, C]);

/** Resistor and capacitor in parallel; the capacitor may be left out. */
export const inParallel = (R: number, C: number | undefined): Rational =>
  C === undefined ? rational([R]) : rational([R], [1, R * C]);
