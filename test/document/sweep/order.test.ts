import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { tabulated, unwrapped } from "../../../src/document/sweep/tabulated.ts";
import { curveOf, sweepOf } from "./support.ts";

const AVERAGED =
  "1 frequency occurs more than once, averaged: mean of the dB and mean direction of the phase";

describe("repeated frequencies", () => {
  // Mean directions by symmetry of the unit vectors.
  test.each([
    ["both on one side", [10, 30], 20],
    ["either side of the cut", [170, -170], 180],
    ["either side of 0 as 0 to 360", [350, 10], 360],
    ["unwrapped beyond the cut", [-370, -350], -360],
    ["three, one far off by symmetry", [90, -30, 30], 30],
  ])("%s", (_, phases, meanDeg) => {
    const rows = phases.map((phase, index) => `1000,${-index},${phase}`).join("\n");
    const sweep = sweepOf(`${rows}\n2000,-9,0\n`);
    expect(sweep.gainDb[0]).toBeCloseTo(-(phases.length - 1) / 2, 12);
    const turns = ((sweep.phaseDeg?.[0] ?? Number.NaN) - meanDeg) / 360;
    expect(turns - Math.round(turns)).toBeCloseTo(0, 12);
    expect(sweep.understood).toMatchObject({ averaged: 1, rows: phases.length + 1 });
    expect(sweep.understood.notes).toContain(AVERAGED);
  });

  test("equal rows stay the same to the last bit", () => {
    const { phaseDeg, gainDb } = curveOf(sweepOf("1,-0.1,-271.3\n1,-0.1,-271.3\n2,0,0\n"));
    expect([gainDb[0], phaseDeg?.[0]]).toEqual([-0.1, -271.3]);
  });

  test("the mean of the dB is the same with and without a phase", () => {
    const rows = ["1,-3", "1,-5", "2,0"];
    const withPhase = sweepOf(rows.map((row) => `${row},120`).join("\n"));
    expect([...sweepOf(rows.join("\n")).gainDb]).toEqual([...withPhase.gainDb]);
  });
});

describe("order of rows", () => {
  test("does not matter", () => {
    const row = fc.record({
      freqHz: fc.integer({ min: 1, max: 30 }),
      gainDb: fc.integer({ min: -80, max: 20 }),
      phaseDeg: fc.integer({ min: -40, max: 40 }),
    });
    const shuffled = fc
      .array(row, { minLength: 2, maxLength: 40 })
      .filter((rows) => new Set(rows.map(({ freqHz }) => freqHz)).size > 1)
      .chain((rows) =>
        fc.tuple(
          fc.constant(rows),
          fc.shuffledSubarray(rows, { minLength: rows.length, maxLength: rows.length }),
        ),
      );
    const textOf = (rows: readonly { freqHz: number; gainDb: number; phaseDeg: number }[]) =>
      rows.map(({ freqHz, gainDb, phaseDeg }) => `${freqHz},${gainDb},${phaseDeg}`).join("\n");
    fc.assert(
      fc.property(shuffled, ([rows, other]) => {
        const one = curveOf(sweepOf(textOf(rows)));
        const two = curveOf(sweepOf(textOf(other)));
        expect(two.freqHz).toEqual(one.freqHz);
        expect(one.freqHz).toEqual([...new Set(rows.map(({ freqHz }) => freqHz))].sort((a, b) => a - b));
        one.gainDb.forEach((gain, index) => {
          expect(two.gainDb[index]).toBeCloseTo(gain, 10);
          expect(two.phaseDeg?.[index]).toBeCloseTo(one.phaseDeg?.[index] ?? Number.NaN, 10);
        });
      }),
    );
  });
});

describe("tabulated(sweep)", () => {
  test("unwraps the phase from row to row and shares the rest", () => {
    const sweep = sweepOf("1,-1,-170\n2,-2,170\n3,-3,-20\n4,-4,-10\n5,-5,345\n");
    const table = tabulated(sweep);
    // By hand: +340 is −20, then −190 is +170, then +10, then +355 is −5.
    expect([...table.phaseDeg]).toEqual([-170, -190, -20, -10, -15]);
    expect(table).toMatchObject({ type: "table", freqHz: sweep.freqHz, gainDb: sweep.gainDb });
    expect([...(sweep.phaseDeg ?? [])]).toEqual([-170, 170, -20, -10, 345]);
  });

  test("has phase 0 where none was measured", () => {
    expect([...tabulated(sweepOf("1,-1\n2,-2\n")).phaseDeg]).toEqual([0, 0]);
  });

  test("unwrapped(wrapped angles) gives the angles back but for whole turns", () => {
    const steps = fc.array(fc.integer({ min: -179, max: 179 }), { minLength: 1, maxLength: 200 });
    fc.assert(
      fc.property(fc.integer({ min: -180, max: 180 }), steps, (first, changes) => {
        const angles = [first];
        for (const change of changes) angles.push(angles[angles.length - 1] + change);
        // Wrapping by remainder, apart from the program's own.
        const wrapped = Float64Array.from(angles, (angle, index) =>
          index === 0 ? angle : ((angle % 360) + 360) % 360,
        );
        expect([...unwrapped(wrapped)]).toEqual(angles);
        expect([...unwrapped(Float64Array.from(angles))]).toEqual(angles);
      }),
    );
  });
});
