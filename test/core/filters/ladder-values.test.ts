import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { ladderValues } from "../../../src/core/filters/ladder-values.ts";
import type { PrototypeSpec } from "../../../src/core/filters/spec.ts";
import { closedFormLoss } from "./closed-forms.ts";
import { readReference, unwrap } from "./support.ts";

const { rows } = readReference("prototypes.json");
const rowsOf = (kind: string) => rows.filter((row: { kind: string }) => row.kind === kind);

interface TableRow {
  readonly formula: readonly number[];
  readonly printed: readonly number[];
  readonly load_formula: number;
  readonly load_printed: number;
}

/** Matthaei, Young and Jones (1964): printed tables to 6e-4 (loads 7e-4), the recursions to 1e-7. */
function expectTable(spec: PrototypeSpec, row: TableRow) {
  const { g, load } = unwrap(ladderValues(spec));
  expect(g).toHaveLength(row.formula.length);
  g.forEach((element, index) => {
    expect(Math.abs(element - row.formula[index])).toBeLessThan(1e-7);
    expect(Math.abs(element - row.printed[index])).toBeLessThan(6e-4);
  });
  expect(Math.abs(load - row.load_formula)).toBeLessThan(1e-7);
  expect(Math.abs(load - row.load_printed)).toBeLessThan(7e-4);
}

/**
 * Power into the load over the available power at ω = x: the ladder solved from its load back to a source of 1 Ω, first
 * element in shunt. The load is a resistance behind a last shunt element, a conductance behind a last series element.
 */
function ladderPower(g: readonly number[], load: number, x: number): number {
  const loadOhm = g.length % 2 === 1 ? load : 1 / load;
  let [vRe, vIm, iRe, iIm] = [1, 0, 1 / loadOhm, 0];
  for (let index = g.length - 1; index >= 0; index -= 1) {
    const reactance = g[index] * x;
    if (index % 2 === 0) [iRe, iIm] = [iRe - reactance * vIm, iIm + reactance * vRe];
    else [vRe, vIm] = [vRe - reactance * iIm, vIm + reactance * iRe];
  }
  return 4 / (loadOhm * ((vRe + iRe) ** 2 + (vIm + iIm) ** 2));
}

describe("ladderValues(spec) against the tables", () => {
  it("butterworth, orders 1 to 10", () => {
    for (const row of rowsOf("butterworth_g")) expectTable({ family: "butterworth", order: row.n }, row);
  });

  it("chebyshev, orders 1 to 9, four ripples", () => {
    for (const row of rowsOf("chebyshev_g")) {
      expectTable({ family: "chebyshev", order: row.n, rippleDb: row.ripple_db }, row);
    }
  });

  // Equal resistances, half power at 1 rad/s. From memory of the tables in Zverev, Handbook of Filter Synthesis (1967).
  it.each([
    [2, [0.5755, 2.1478]],
    [3, [0.3374, 0.9705, 2.2034]],
    [4, [0.2334, 0.6725, 1.0815, 2.2404]],
    [5, [0.1743, 0.5072, 0.804, 1.111, 2.2582]],
    [6, [0.1365, 0.4002, 0.6392, 0.8538, 1.1126, 2.2645]],
    [7, [0.1106, 0.3259, 0.5249, 0.702, 0.869, 1.1052, 2.2659]],
    [8, [0.0919, 0.2719, 0.4409, 0.5936, 0.7303, 0.8695, 1.0956, 2.2656]],
    [9, [0.078, 0.2313, 0.377, 0.5108, 0.6306, 0.7407, 0.8639, 1.0863, 2.2649]],
    [10, [0.0672, 0.1998, 0.327, 0.4454, 0.5528, 0.6493, 0.742, 0.8561, 1.0781, 2.2641]],
  ])("bessel, order %i", (order, table) => {
    const { g, load } = unwrap(ladderValues({ family: "bessel", order }));
    expect(load).toBe(1);
    expect(g).toHaveLength(table.length);
    g.forEach((element, index) => {
      expect(Math.abs(element - table[index])).toBeLessThan(6e-5);
    });
  });
});

describe("ladderValues(spec) as a circuit", () => {
  it("passes what the closed form says, every family and order up to 30", () => {
    const specs = fc.record({
      family: fc.constantFrom("butterworth" as const, "chebyshev" as const, "bessel" as const),
      order: fc.integer({ min: 1, max: 30 }),
      rippleDb: fc.double({ min: 0.001, max: 3, noNaN: true }),
    });
    fc.assert(
      fc.property(specs, fc.double({ min: 0, max: 3, noNaN: true }), (spec, x) => {
        const { g, load } = unwrap(ladderValues(spec));
        for (const element of g) expect(element > 0 && Number.isFinite(element)).toBe(true);
        expect(Math.abs(ladderPower(g, load, x) * closedFormLoss(spec, x) - 1)).toBeLessThan(1e-9);
      }),
      { numRuns: 500 },
    );
  });
});

describe("ladderValues(spec) refuses", () => {
  it.each(["inverse-chebyshev", "elliptic"] as const)("family %s, naming the families it has", (family) => {
    const result = ladderValues({ family, order: 3, rippleDb: 1, stopDb: 40 });
    expect(result).toEqual({
      ok: false,
      problem: {
        part: "family",
        found: `"${family}", whose nulls need resonant branches`,
        allowed: "butterworth, chebyshev or bessel",
      },
    });
  });

  it("order 0", () => {
    expect(ladderValues({ family: "bessel", order: 0 })).toMatchObject({
      ok: false,
      problem: { part: "order" },
    });
  });
});
