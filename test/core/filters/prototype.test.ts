import { describe, expect, it } from "vitest";
import { modulus } from "../../../src/core/complex.ts";
import { lowpassPrototype, stopEdge, type ZerosPolesGain } from "../../../src/core/filters/prototype.ts";
import type { PrototypeSpec } from "../../../src/core/filters/spec.ts";
import { readReference, rootsPower, unwrap } from "./support.ts";

const { rows } = readReference("prototypes.json");
const rowsOf = (kind: string) => rows.filter((row: { kind: string }) => row.kind === kind);
const design = (spec: PrototypeSpec): ZerosPolesGain => unwrap(lowpassPrototype(spec));

/** Frequency and Q of each upper or real pole, lowest Q first; Q is null for a real pole. */
function frequencyAndQ({ poles }: ZerosPolesGain) {
  return poles
    .filter((pole) => pole.im >= 0)
    .map((pole) => ({ f0: modulus(pole), q: pole.im === 0 ? null : modulus(pole) / (-2 * pole.re) }))
    .sort((a, b) => (a.q ?? 0) - (b.q ?? 0));
}

interface HandbookSection {
  f0: number;
  q: number | null;
  f0_ripple_edge: number;
  handbook_a: number;
  handbook_b?: number;
  handbook_q: number | null;
}

// Op Amps for Everyone, 5th ed., §16.9: 1/(1 + a·s + b·s²); a, b to 1e-4, Q to 0.006.
function expectHandbook(found: { f0: number; q: number | null }, section: HandbookSection) {
  const a = found.q === null ? 1 / found.f0 : 1 / (found.f0 * found.q);
  const b = found.q === null ? 0 : 1 / found.f0 ** 2;
  expect(Math.abs(a - section.handbook_a)).toBeLessThan(1e-4);
  if (section.handbook_b !== undefined) expect(Math.abs(b - section.handbook_b)).toBeLessThan(1e-4);
  if (typeof section.handbook_q === "number")
    expect(Math.abs(found.q! - section.handbook_q)).toBeLessThan(0.006);
}

describe("lowpassPrototype({family: 'butterworth'})", () => {
  it.each([1, 2, 3, 7, 8, 29, 30])("order %i: poles on the unit circle, π/n apart, gain 1", (order) => {
    const { poles, zeros, gain } = design({ family: "butterworth", order });
    expect(zeros).toEqual([]);
    expect(gain).toBeCloseTo(1, 14);
    // Butterworth (1930): angles from the positive real axis are π/2 + (2k − 1)π/2n.
    const angles = poles
      .map((pole) => Math.atan2(pole.im, pole.re))
      .map((angle) => (angle + 2 * Math.PI) % (2 * Math.PI));
    angles.sort((a, b) => a - b);
    angles.forEach((angle, index) => {
      expect(angle).toBeCloseTo(Math.PI / 2 + ((2 * index + 1) * Math.PI) / (2 * order), 13);
    });
    for (const pole of poles) expect(modulus(pole)).toBeCloseTo(1, 14);
  });

  it("gives the handbook's sections of orders 2 to 8", () => {
    for (const row of rowsOf("butterworth_sections")) {
      const found = frequencyAndQ(design({ family: "butterworth", order: row.n }));
      expect(found).toHaveLength(row.sections.length);
      found.forEach((section, index) => {
        expectHandbook(section, row.sections[index]);
        if (row.sections[index].q !== null) expect(section.q).toBeCloseTo(row.sections[index].q, 8);
      });
    }
  });
});

describe("lowpassPrototype({family: 'bessel'})", () => {
  it("gives the poles scaled to half power of orders 1 to 6, and the handbook's sections", () => {
    for (const row of rowsOf("bessel")) {
      const prototype = design({ family: "bessel", order: row.n });
      const upper = prototype.poles.filter((pole) => pole.im >= 0);
      for (const [re, im] of row.poles_3db) {
        const nearest = Math.min(...upper.map((pole) => Math.hypot(pole.re - re, pole.im - im)));
        expect(nearest).toBeLessThan(1e-10);
      }
      const found = frequencyAndQ(prototype);
      expect(found).toHaveLength(row.sections.length);
      found.forEach((section, index) => {
        expectHandbook(section, row.sections[index]);
        expect(section.f0).toBeCloseTo(row.sections[index].f0, 8);
      });
    }
  });
});

describe("lowpassPrototype({family: 'chebyshev'})", () => {
  it("gives f0 and Q of every section at the ripple edge, orders 1 to 8", () => {
    for (const row of rowsOf("chebyshev_sections")) {
      const found = frequencyAndQ(design({ family: "chebyshev", order: row.n, rippleDb: row.ripple_db }));
      expect(found).toHaveLength(row.sections.length);
      found.forEach((section, index) => {
        const reference: HandbookSection = row.sections[index];
        expect(Math.abs(section.f0 / reference.f0_ripple_edge - 1)).toBeLessThan(1e-7);
        if (reference.q === null) expect(section.q).toBeNull();
        else expect(Math.abs(section.q! / reference.q - 1)).toBeLessThan(1e-7);
      });
    }
  });

  it("is at half power where the table says, below the peak and below DC", () => {
    for (const row of rowsOf("chebyshev_sections")) {
      const prototype = design({ family: "chebyshev", order: row.n, rippleDb: row.ripple_db });
      const levelDb = (x: number) => 10 * Math.log10(rootsPower(prototype, x));
      const half = 10 * Math.log10(1 / 2);
      expect(levelDb(row.w3db_below_peak_over_ripple_edge)).toBeCloseTo(half, 6);
      expect(levelDb(row.w3db_below_dc_over_ripple_edge)).toBeCloseTo(levelDb(0) + half, 6);
    }
  });

  it("starts at −ripple for even order and at 0 dB for odd order", () => {
    expect(rootsPower(design({ family: "chebyshev", order: 4, rippleDb: 1 }), 0)).toBeCloseTo(10 ** -0.1, 12);
    expect(rootsPower(design({ family: "chebyshev", order: 5, rippleDb: 1 }), 0)).toBeCloseTo(1, 12);
  });
});

interface EllipticRow {
  readonly n: number;
  readonly ripple_db: number;
  readonly stop_db: number;
  readonly call: string;
  readonly zeros_imag: readonly number[];
  readonly poles: readonly (readonly [number, number])[];
  readonly k: number;
  readonly stop_edge: number;
  readonly samples: readonly { readonly w: number; readonly gain_db: number }[];
}

// SciPy 1.10.1, ellipap: see the rows' calls; 1e-7 relative.
describe("lowpassPrototype({family: 'elliptic'})", () => {
  for (const row of rowsOf("elliptic_scipy") as readonly EllipticRow[]) {
    it(`agrees with ${row.call}`, () => {
      const spec: PrototypeSpec = {
        family: "elliptic",
        order: row.n,
        rippleDb: row.ripple_db,
        stopDb: row.stop_db,
      };
      const prototype = design(spec);
      const zeros = prototype.zeros.map((zero) => zero.im).filter((im) => im > 0);
      expect(zeros).toHaveLength(row.zeros_imag.length);
      zeros.sort((a, b) => a - b);
      zeros.forEach((zero, index) => {
        expect(Math.abs(zero / row.zeros_imag[index] - 1)).toBeLessThan(1e-7);
      });
      const upper = prototype.poles.filter((pole) => pole.im >= 0);
      expect(upper).toHaveLength(row.poles.length);
      for (const [re, im] of row.poles) {
        const nearest = Math.min(...upper.map((pole) => Math.hypot(pole.re - re, pole.im - im)));
        expect(nearest).toBeLessThan(1e-7 * Math.hypot(re, im));
      }
      expect(Math.abs(prototype.gain / row.k - 1)).toBeLessThan(1e-7);
      expect(Math.abs(unwrap(stopEdge(spec))! / row.stop_edge - 1)).toBeLessThan(1e-7);
      for (const { w, gain_db } of row.samples) {
        expect(Math.abs(10 * Math.log10(rootsPower(prototype, w)) - gain_db)).toBeLessThan(1e-6);
      }
    });
  }
});

it("has every row of prototypes.json", () => {
  const counts = (kind: string) => rowsOf(kind).length;
  expect(counts("butterworth_sections")).toBe(7);
  expect(counts("bessel")).toBe(6);
  expect(counts("chebyshev_sections")).toBe(40);
  expect(counts("elliptic_scipy")).toBe(10);
  expect(counts("butterworth_g")).toBe(10);
  expect(counts("chebyshev_g")).toBe(36);
  expect(rows).toHaveLength(109);
});
