import { readFileSync } from "node:fs";
import fc from "fast-check";
import type { Complex } from "../../../src/core/complex.ts";
import type { PrototypeSpec } from "../../../src/core/filters/spec.ts";
import { FILTER_FAMILIES } from "../../../src/core/filters/spec.ts";
import type { Rational } from "../../../src/core/rational.ts";
import type { Result } from "../../../src/core/result.ts";

export const readReference = (name: string) =>
  JSON.parse(readFileSync(new URL(`../../reference/${name}`, import.meta.url), "utf8"));

export function unwrap<T>(result: Result<T>): T {
  if (result.ok) return result.value;
  throw new Error(`${result.problem.found}; allowed: ${result.problem.allowed}`);
}

/** Gain in dB and phase in degrees (not unwrapped) of a product of sections at one frequency. */
export function responseAt(
  sections: readonly Rational[],
  freqHz: number,
): { gainDb: number; phaseDeg: number } {
  let gainDb = 0;
  let phaseDeg = 0;
  for (const { num, den, omega0 } of sections) {
    const x = (2 * Math.PI * freqHz) / omega0;
    const above = onAxis(num, x);
    const below = onAxis(den, x);
    gainDb += 20 * Math.log10(Math.hypot(above.re, above.im) / Math.hypot(below.re, below.im));
    phaseDeg += ((Math.atan2(above.im, above.re) - Math.atan2(below.im, below.re)) * 180) / Math.PI;
  }
  return { gainDb, phaseDeg };
}

/** |H|² of a product of sections at one frequency. */
export function powerAt(sections: readonly Rational[], freqHz: number): number {
  return sections.reduce((power, { num, den, omega0 }) => {
    const x = (2 * Math.PI * freqHz) / omega0;
    const above = onAxis(num, x);
    const below = onAxis(den, x);
    return power * (Math.hypot(above.re, above.im) / Math.hypot(below.re, below.im)) ** 2;
  }, 1);
}

function onAxis(coefficients: readonly number[], x: number): Complex {
  const [constant, linear = 0, square = 0] = coefficients;
  return { re: constant - square * x * x, im: linear * x };
}

/** |H|² of `gain·Π(jx − zero)/Π(jx − pole)`, factor by factor so that nothing overflows. */
export function rootsPower(
  system: { zeros: readonly Complex[]; poles: readonly Complex[]; gain: number },
  x: number,
): number {
  const { zeros, poles, gain } = system;
  let magnitude = Math.abs(gain);
  poles.forEach((pole, index) => {
    magnitude /= Math.hypot(pole.re, x - pole.im);
    if (index < zeros.length) magnitude *= Math.hypot(zeros[index].re, x - zeros[index].im);
  });
  return magnitude ** 2;
}

/**
 * How much the relative error of |H| exceeds that of the frequency and of the roots: `Σ |x|/|jx − root|`. A frequency is
 * known to one rounding only, so no program can do better than a few times this, times the machine epsilon.
 */
export function condition(
  system: { zeros: readonly Complex[]; poles: readonly Complex[] },
  x: number,
): number {
  const roots = [...system.zeros, ...system.poles];
  return roots.reduce((sum, { re, im }) => sum + Math.hypot(re, im) / Math.hypot(re, x - im), 0);
}

/** Relative difference allowed for a power: 1e-12 where the frequency's own rounding allows it. */
export const allowedError = (conditionNumber: number): number =>
  Math.max(1e-12, 16 * Number.EPSILON * conditionNumber);

/** A prototype with both losses given, whether its family uses them or not. */
export type FullPrototypeSpec = PrototypeSpec & { readonly rippleDb: number; readonly stopDb: number };

/** Every family over orders 1 to 30, with losses from the everyday to the odd. */
export const prototypeSpecs: fc.Arbitrary<FullPrototypeSpec> = fc.record({
  family: fc.constantFrom(...FILTER_FAMILIES),
  order: fc.integer({ min: 1, max: 30 }),
  rippleDb: fc.double({ min: -6, max: 1, noNaN: true }).map((decades) => 10 ** decades),
  stopDb: fc.double({ min: 1, max: 400, noNaN: true }),
});
