import { type Rational, rational } from "../rational.ts";

/** `s² + s·w/Q + w²`, w = 2π·freqHz; 1/Q above 2 means two real roots. */
export interface QuadraticFactor {
  readonly freqHz: number;
  readonly inverseQ: number;
}

/** A section and 1/Q of its poles, by which sections are put in order. */
export interface RatedSection {
  readonly rational: Rational;
  readonly inverseQ: number;
}

/** Where the gain of a section with zeros on the axis is one. */
export type UnityAt = "dc" | "infinity";

const angular = (freqHz: number): number => 2 * Math.PI * freqHz;

/** A real pole counts as the least of all Qs. */
const FIRST_ORDER = Number.POSITIVE_INFINITY;

/** `numerator / (1 + x)`, x = s over the pole. */
export function firstOrderSection(poleHz: number, numerator: readonly number[]): RatedSection {
  return { rational: rational(numerator, [1, 1], angular(poleHz)), inverseQ: FIRST_ORDER };
}

/** `numerator / (1 + x/Q + x²)`, x = s over the poles' own frequency. */
export function secondOrderSection(pole: QuadraticFactor, numerator: readonly number[]): RatedSection {
  const { freqHz, inverseQ } = pole;
  return { rational: rational(numerator, [1, inverseQ, 1], angular(freqHz)), inverseQ };
}

/**
 * Poles with zeros on the axis at `zeroHz`. Scaled to the zeros, so that `1 + x²` vanishes exactly there; its gain is one
 * at DC or at infinity.
 */
export function axisZeroSection(pole: QuadraticFactor, zeroHz: number, unityAt: UnityAt): RatedSection {
  const ratio = pole.freqHz / zeroHz;
  const den =
    unityAt === "dc"
      ? [1, pole.inverseQ / ratio, 1 / (ratio * ratio)]
      : [ratio * ratio, ratio * pole.inverseQ, 1];
  return { rational: rational([1, 0, 1], den, angular(zeroHz)), inverseQ: pole.inverseQ };
}

export function withGain(section: RatedSection, gain: number): RatedSection {
  const { num, den, omega0 } = section.rational;
  return {
    ...section,
    rational: rational(
      num.map((coefficient) => coefficient * gain),
      den,
      omega0,
    ),
  };
}
