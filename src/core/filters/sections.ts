import type { Complex } from "../complex.ts";

/**
 * One real pole, or a conjugate pair given by its upper pole, with the pair of zeros on the axis that belongs to it.
 * Its gain at DC is one.
 */
export interface PrototypeSection {
  /** Real part < 0; imaginary part > 0, or 0 for a single real pole. */
  readonly pole: Complex;
  /** Zeros at ±j·zero. */
  readonly zero?: number;
}

/** A low-pass prototype as a product of sections, times the gain at DC. The corner is at 1. */
export interface Prototype {
  readonly sections: readonly PrototypeSection[];
  readonly dcGain: number;
}

export const isRealPole = (section: PrototypeSection): boolean => section.pole.im === 0;

/**
 * `(2k − 1)·π/2n` for k = 1 … ⌊n/2⌋: the angles from the axis of the pole pairs of Butterworth and Chebyshev filters,
 * as sine (along the real axis) and cosine (along the imaginary axis).
 */
export function pairAngles(order: number): readonly { readonly sin: number; readonly cos: number }[] {
  return Array.from({ length: Math.floor(order / 2) }, (_, index) => {
    const angle = (Math.PI * (2 * index + 1)) / (2 * order);
    // The cosine as a sine of the complement keeps its relative accuracy near 90°.
    const complement = (Math.PI * (order - 2 * index - 1)) / (2 * order);
    return { sin: Math.sin(angle), cos: Math.sin(complement) };
  });
}

/** `10^(dB/10) − 1`, the square of ε, without loss of digits at small dB. */
export const excessPower = (lossDb: number): number => Math.expm1((lossDb * Math.LN10) / 10);
