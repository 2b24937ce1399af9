import { expect } from "vitest";
import { angleApartDeg, type Complex, gainDb, magnitude, minus, phaseDeg } from "./nodal-complex.ts";

/** Fails, with both values and the tolerance, unless they are that close; NaN is never close. */
export function expectClose(actual: number, expected: number, tolerance: number, what: string): void {
  const apart = actual === expected ? 0 : Math.abs(actual - expected);
  failUnless(apart <= tolerance, () => `${what}: ${actual}, expected ${expected} within ${tolerance}`);
}

/** As `expectClose`, for degrees modulo 360. */
export function expectAngle(
  actualDeg: number,
  expectedDeg: number,
  toleranceDeg: number,
  what: string,
): void {
  const near = angleApartDeg(actualDeg, expectedDeg) <= toleranceDeg;
  failUnless(near, () => `${what}: ${actualDeg}°, expected ${expectedDeg}° within ${toleranceDeg}°`);
}

export function expectComplex(actual: Complex, expected: Complex, tolerance: number, what: string): void {
  const near = magnitude(minus(actual, expected)) <= tolerance;
  const text = ({ re, im }: Complex) => `${re} + j(${im})`;
  failUnless(near, () => `${what}: ${text(actual)}, expected ${text(expected)} within ${tolerance}`);
}

/** Many thousand comparisons: the sentence is only made when it is needed. */
function failUnless(holds: boolean, said: () => string): void {
  if (!holds) expect.fail(said());
}

export interface PolarSample {
  readonly f_hz: number;
  readonly gain_db: number;
  readonly phase_deg_wrapped: number;
}

export function expectPolar(
  actual: Complex,
  sample: PolarSample,
  toleranceDb: number,
  toleranceDeg: number,
): void {
  const at = `at ${sample.f_hz} Hz`;
  expectClose(gainDb(actual), sample.gain_db, toleranceDb, `gain in dB ${at}`);
  expectAngle(phaseDeg(actual), sample.phase_deg_wrapped, toleranceDeg, `phase ${at}`);
}
