import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lowpassPrototype, type ZerosPolesGain } from "../../../src/core/filters/prototype.ts";
import type { PrototypeSpec } from "../../../src/core/filters/spec.ts";
import { FILTER_SHAPES, type FilterShape } from "../../../src/core/filters/spec.ts";
import { designRoots, designSections, type FilterSpec } from "../../../src/core/filters/transform.ts";
import type { Rational } from "../../../src/core/rational.ts";
import { closedFormLoss } from "./closed-forms.ts";
import {
  allowedError,
  condition,
  type FullPrototypeSpec,
  powerAt,
  prototypeSpecs,
  rootsPower,
  unwrap,
} from "./support.ts";

const frequencyOf = (decades: number): number => 10 ** decades;

/** Relative width (high − low)/centre from 1e-6 to 100, the last being low/high = 1e-4. */
const bands = fc
  .record({
    centre: fc.double({ min: -3, max: 9, noNaN: true }),
    width: fc.double({ min: -6, max: 2, noNaN: true }),
  })
  .map(({ centre, width }) => {
    const half = 10 ** width / 2;
    const high = half + Math.sqrt(half * half + 1);
    return { lowHz: frequencyOf(centre) / high, highHz: frequencyOf(centre) * high };
  });

type FullFilterSpec = FullPrototypeSpec & {
  readonly shape: FilterShape;
  readonly cornerHz: number;
  readonly lowHz: number;
  readonly highHz: number;
};

const filters: fc.Arbitrary<FullFilterSpec> = fc
  .record({ shape: fc.constantFrom(...FILTER_SHAPES), prototype: prototypeSpecs, band: bands })
  .map(({ shape, prototype, band }) => ({ ...prototype, ...band, shape, cornerHz: band.lowHz }))
  .filter((spec) => lowpassPrototype(spec).ok);

/** |S| of the prototype's variable at freqHz, straight from the definition of the transforms. */
function prototypeVariable(spec: FullFilterSpec, freqHz: number): number {
  const { shape, cornerHz, lowHz, highHz } = spec;
  if (shape === "lowpass") return freqHz / cornerHz;
  if (shape === "highpass") return cornerHz / freqHz;
  const centre = Math.sqrt(lowHz * highHz);
  const detuning = (Math.abs(freqHz - centre) * (freqHz + centre)) / (freqHz * (highHz - lowHz));
  return shape === "bandpass" ? detuning : 1 / detuning;
}

/** Roots as multiples of the frequency, for the condition number at that frequency. */
function conditionAt(spec: FilterSpec, freqHz: number): number {
  const { zeros, poles } = unwrap(designRoots(spec));
  const omega = 2 * Math.PI * freqHz;
  const relative = (root: { re: number; im: number }) => ({ re: root.re / omega, im: root.im / omega });
  return condition({ zeros: zeros.map(relative), poles: poles.map(relative) }, 1);
}

const inverseQ = ({ den }: Rational): number =>
  den.length === 2 ? Number.POSITIVE_INFINITY : den[1] / Math.sqrt(den[0] * den[2]);

/** Loss of the prototype: its closed form, for elliptic the product of its roots (tested on its own). */
const prototypeLoss = (spec: PrototypeSpec, prototype: ZerosPolesGain, x: number): number =>
  spec.family === "elliptic" ? 1 / rootsPower(prototype, x) : closedFormLoss(spec, x);

describe("designSections(spec), any family, order, shape and band", () => {
  it("has the prototype's loss at the transformed frequency, from far below to far above the band", () => {
    const offset = fc.double({ min: -3, max: 3, noNaN: true });
    fc.assert(
      fc.property(filters, offset, fc.boolean(), (spec, decades, nearBand) => {
        const centre = Math.sqrt(spec.lowHz * spec.highHz);
        // Half of the frequencies within a few widths of the band, where a narrow one does anything at all.
        const near = spec.lowHz + (decades / 2 + 0.5) * (spec.highHz - spec.lowHz);
        const freqHz = nearBand && near > 0 ? near : centre * 10 ** decades;
        const x = prototypeVariable(spec, freqHz);
        fc.pre(x > 1e-9 && x < 1e9);
        const prototype = unwrap(lowpassPrototype(spec));
        const loss = prototypeLoss(spec, prototype, x);
        fc.pre(loss < 1e250);
        const power = powerAt(unwrap(designSections(spec)), freqHz);
        // The transform itself turns one rounding of the frequency into so many of x.
        const error = conditionAt(spec, freqHz) + condition(prototype, x);
        expect(Math.abs(power * loss - 1)).toBeLessThan(allowedError(error));
      }),
      { numRuns: 1500 },
    );
  });

  it("has exactly the corner's loss at every edge", () => {
    fc.assert(
      fc.property(filters, (spec) => {
        const isRipple = spec.family === "chebyshev" || spec.family === "elliptic";
        const edge = isRipple ? 10 ** (-spec.rippleDb / 10) : 0.5;
        const isBand = spec.shape === "bandpass" || spec.shape === "bandstop";
        const sections = unwrap(designSections(spec));
        for (const freqHz of isBand ? [spec.lowHz, spec.highHz] : [spec.cornerHz]) {
          const error = conditionAt(spec, freqHz);
          expect(Math.abs(powerAt(sections, freqHz) / edge - 1)).toBeLessThan(allowedError(error));
        }
      }),
      { numRuns: 400 },
    );
  });

  it("is made of real, stable, finite sections of at most second order, lowest Q first", () => {
    fc.assert(
      fc.property(filters, (spec) => {
        const sections = unwrap(designSections(spec));
        const poleCount = sections.reduce((sum, { den }) => sum + den.length - 1, 0);
        const isBand = spec.shape === "bandpass" || spec.shape === "bandstop";
        expect(poleCount).toBe(isBand ? 2 * spec.order : spec.order);
        sections.forEach((section, index) => {
          expect(section.den.length).toBeLessThanOrEqual(3);
          expect(section.num.length).toBeLessThanOrEqual(section.den.length);
          for (const coefficient of section.den)
            expect(coefficient > 0 && Number.isFinite(coefficient)).toBe(true);
          for (const coefficient of section.num)
            expect(coefficient >= 0 && Number.isFinite(coefficient)).toBe(true);
          if (index > 0)
            expect(inverseQ(section)).toBeLessThanOrEqual(inverseQ(sections[index - 1]) * (1 + 1e-12));
        });
      }),
      { numRuns: 300 },
    );
  });

  it("has roots in the left half plane or on the axis, in conjugate pairs", () => {
    fc.assert(
      fc.property(filters, (spec) => {
        const { zeros, poles } = unwrap(designRoots(spec));
        for (const pole of poles) expect(pole.re).toBeLessThan(0);
        for (const zero of zeros) expect(Math.abs(zero.re)).toBe(0);
        for (const list of [zeros, poles]) {
          for (const root of list) {
            expect(Number.isFinite(root.re) && Number.isFinite(root.im)).toBe(true);
            expect(list.some((other) => other.re === root.re && other.im === -root.im)).toBe(true);
          }
        }
      }),
      { numRuns: 300 },
    );
  });
});

describe("designSections(spec) at its nulls", () => {
  const power = (sections: readonly Rational[], section: Rational): number =>
    powerAt(sections, section.omega0 / (2 * Math.PI));

  it("is exactly zero at the centre of every band-stop without nulls elsewhere", () => {
    for (const family of ["butterworth", "chebyshev", "bessel"] as const) {
      const spec = { shape: "bandstop" as FilterShape, family, order: 4, rippleDb: 1, lowHz: 40, highHz: 90 };
      expect(powerAt(unwrap(designSections(spec)), 60)).toBe(0);
    }
  });

  it("has one exact null per section with zeros on the axis", () => {
    const spec = { family: "elliptic" as const, order: 6, rippleDb: 0.5, stopDb: 60, cornerHz: 1000 };
    const sections = unwrap(designSections({ ...spec, shape: "lowpass" }));
    expect(sections).toHaveLength(3);
    for (const section of sections) {
      // The frequency is rounded once; where 2π·f gives omega0 back, the null is exact.
      const [constant, linear, square] = section.num;
      expect(linear).toBe(0);
      expect(constant).toBe(square);
      expect(power(sections, section)).toBeLessThan(1e-28);
    }
  });
});
