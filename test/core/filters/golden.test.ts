import { describe, expect, it } from "vitest";
import type { Complex } from "../../../src/core/complex.ts";
import { designRoots, designSections } from "../../../src/core/filters/transform.ts";
import { type GoldenFilter, goldenFilters, goldenSpecs } from "./golden-filters.ts";
import { responseAt, unwrap } from "./support.ts";

const wrapped = (phaseDeg: number): number => phaseDeg - 360 * Math.round(phaseDeg / 360);

// SciPy 1.10.1; gain to 1e-7 dB (1e-6 dB below −120 dB), phase to 1e-7° modulo 360.
describe("designSections(spec) against SciPy's filters", () => {
  it("covers all 16 filters of the file", () => {
    expect(goldenFilters.map((row) => row.id)).toEqual(Object.keys(goldenSpecs));
    expect(goldenFilters).toHaveLength(16);
  });

  for (const row of goldenFilters) {
    it(`${row.id}: gain and phase of ${row.call}`, () => {
      const sections = unwrap(designSections(goldenSpecs[row.id]));
      row.f_hz.forEach((freqHz, index) => {
        const { gainDb, phaseDeg } = responseAt(sections, freqHz);
        const expectedDb = row.gain_db[index];
        expect(Math.abs(gainDb - expectedDb)).toBeLessThan(expectedDb < -120 ? 1e-6 : 1e-7);
        expect(Math.abs(wrapped(phaseDeg - row.phase_deg_unwrapped[index]))).toBeLessThan(1e-7);
      });
    });

    it(`${row.id}: the same poles and zeros`, () => {
      const { zeros, poles } = unwrap(designRoots(goldenSpecs[row.id]));
      expectSameRoots(poles, row.poles_rad_s);
      expectSameRoots(zeros, row.zeros_rad_s);
    });
  }
});

function expectSameRoots(found: readonly Complex[], expected: GoldenFilter["poles_rad_s"]) {
  expect(found).toHaveLength(expected.length);
  for (const [re, im] of expected) {
    const nearest = Math.min(...found.map((root) => Math.hypot(root.re - re, root.im - im)));
    expect(nearest).toBeLessThanOrEqual(1e-9 * Math.hypot(re, im));
  }
}
