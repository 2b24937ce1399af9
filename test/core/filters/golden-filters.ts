import type { FilterSpec } from "../../../src/core/filters/transform.ts";
import { readReference } from "./support.ts";

/** What a filter's row holds; rows of kind "step" hold something else. */
export interface GoldenFilter {
  readonly id: string;
  readonly call: string;
  readonly kind?: string;
  readonly zeros_rad_s: readonly (readonly [number, number])[];
  readonly poles_rad_s: readonly (readonly [number, number])[];
  readonly f_hz: readonly number[];
  readonly gain_db: readonly number[];
  readonly phase_deg_unwrapped: readonly number[];
  readonly group_delay_s: readonly number[];
}

/** The filters of golden-scipy.json, computed with SciPy 1.10.1. */
export const goldenFilters: readonly GoldenFilter[] = readReference("golden-scipy.json").rows.filter(
  (row: GoldenFilter) => row.kind === undefined,
);

const besselRows = readReference("prototypes.json").rows.filter(
  (row: { kind: string }) => row.kind === "bessel",
);

// SciPy puts the corner of cheby2 at the stop edge; ours is at half power, where Tn(X) = √(10^(stop/10) − 1).
const stopOverHalfPower = (order: number, stopDb: number): number =>
  Math.cosh(Math.acosh(Math.sqrt(10 ** (stopDb / 10) - 1)) / order);

/** A band-stop widened from stop edges to half-power edges: same centre, `factor` times as wide. */
function widened(lowHz: number, highHz: number, factor: number): { lowHz: number; highHz: number } {
  const half = (factor * (highHz - lowHz)) / 2;
  const reach = Math.sqrt(half * half + lowHz * highHz);
  return { lowHz: reach - half, highHz: reach + half };
}

/** Half-power frequency for a delay of 1 s, from the reference's own solution. */
const halfPowerOfUnitDelay = (order: number): number =>
  besselRows.find((row: { n: number }) => row.n === order).w3db_of_unit_delay_form;

// norm='phase' scales the poles' product to one: for order 6, θ6(0) = 10395.
const phaseToHalfPower = halfPowerOfUnitDelay(6) / 10395 ** (1 / 6);

/** Each row's SciPy call in our terms. */
export const goldenSpecs: Record<string, FilterSpec> = {
  "butter-lp4": { shape: "lowpass", family: "butterworth", order: 4, cornerHz: 1000 },
  "butter-hp3": { shape: "highpass", family: "butterworth", order: 3, cornerHz: 300 },
  "butter-bp2": { shape: "bandpass", family: "butterworth", order: 2, lowHz: 300, highHz: 3400 },
  "butter-bs3": { shape: "bandstop", family: "butterworth", order: 3, lowHz: 45, highHz: 55 },
  "cheby1-lp5": { shape: "lowpass", family: "chebyshev", order: 5, rippleDb: 0.5, cornerHz: 10000 },
  "cheby1-hp4": { shape: "highpass", family: "chebyshev", order: 4, rippleDb: 1, cornerHz: 2000 },
  "cheby1-bp3": {
    shape: "bandpass",
    family: "chebyshev",
    order: 3,
    rippleDb: 0.1,
    lowHz: 9000,
    highHz: 11000,
  },
  "cheby2-lp5": {
    shape: "lowpass",
    family: "inverse-chebyshev",
    order: 5,
    stopDb: 60,
    cornerHz: 20000 / stopOverHalfPower(5, 60),
  },
  "cheby2-bs4": {
    shape: "bandstop",
    family: "inverse-chebyshev",
    order: 4,
    stopDb: 40,
    ...widened(900, 1100, stopOverHalfPower(4, 40)),
  },
  "ellip-lp5": { shape: "lowpass", family: "elliptic", order: 5, rippleDb: 0.5, stopDb: 50, cornerHz: 3400 },
  "ellip-hp4": { shape: "highpass", family: "elliptic", order: 4, rippleDb: 0.2, stopDb: 40, cornerHz: 500 },
  "ellip-bp3": {
    shape: "bandpass",
    family: "elliptic",
    order: 3,
    rippleDb: 1,
    stopDb: 40,
    lowHz: 1000,
    highHz: 2000,
  },
  "bessel-lp4-mag": { shape: "lowpass", family: "bessel", order: 4, cornerHz: 5000 },
  "bessel-lp6-phase": { shape: "lowpass", family: "bessel", order: 6, cornerHz: 5000 * phaseToHalfPower },
  "bessel-lp5-delay": {
    shape: "lowpass",
    family: "bessel",
    order: 5,
    cornerHz: halfPowerOfUnitDelay(5) / (2 * Math.PI * 20e-6),
  },
  "bessel-bp2": { shape: "bandpass", family: "bessel", order: 2, lowHz: 400, highHz: 1600 },
};
