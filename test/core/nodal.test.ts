import { describe, expect, it } from "vitest";
import { goldenRows, goldenTolerance } from "../helpers/netlist-golden.ts";
import { currentOf, solve, voltageAt } from "../helpers/nodal.ts";
import { expectClose, expectComplex, expectPolar } from "../helpers/nodal-close.ts";
import { magnitude } from "../helpers/nodal-complex.ts";
import type { Netlist } from "../helpers/nodal-components.ts";

// The tests' own network solver against numbers computed outside this project (golden-ladders.json).
describe("nodal analysis gives every node voltage of the golden chains", () => {
  it.each(goldenRows.map((row) => [row.id, row] as const))("%s", (_, row) => {
    expect(row.readings).toHaveLength(25);
    for (const reading of row.readings) {
      const solution = solve(row.netlist, reading.f_hz);
      const toleranceDb = goldenTolerance.gainDb(reading.gain_db);
      expectPolar(voltageAt(solution, row.outputNode), reading, toleranceDb, goldenTolerance.phaseDeg);
      const largest = Math.max(...[...reading.voltages.values()].map(magnitude));
      for (const [node, expected] of reading.voltages) {
        const what = `V(${node}) at ${reading.f_hz} Hz`;
        expectComplex(voltageAt(solution, node), expected, goldenTolerance.voltage * largest, what);
      }
    }
  });
});

describe("nodal analysis of what the golden chains do not have", () => {
  // By hand: 2 A into 5 Ω is 10 V; a 1:3 transformer makes 30 V of it, and 90 Ω there look like 10 Ω.
  it("has current sources, ideal transformers and controlled sources", () => {
    const netlist: Netlist = [
      { type: "I", name: "I1", ends: ["0", "a"], ampere: 2 },
      { type: "R", name: "R1", ends: ["a", "0"], ohm: 10 },
      { type: "transformer", name: "T", ends: ["a", "0"], to: ["b", "0"], ratio: 3 },
      { type: "R", name: "R2", ends: ["b", "0"], ohm: 90 },
      { type: "vcvs", name: "E", ends: ["c", "0"], sense: ["b", "a"], gain: -2 },
      { type: "R", name: "R3", ends: ["c", "0"], ohm: 8 },
    ];
    const solution = solve(netlist, 50);
    expectComplex(voltageAt(solution, "a"), { re: 10, im: 0 }, 1e-12, "V(a)");
    expectComplex(voltageAt(solution, "b"), { re: 30, im: 0 }, 1e-12, "V(b)");
    expectComplex(voltageAt(solution, "c"), { re: -40, im: 0 }, 1e-12, "V(c)");
    expectComplex(currentOf(solution, "R3"), { re: -5, im: 0 }, 1e-12, "I(R3)");
  });

  // By hand: each section of 9 kΩ in the line and 1 kΩ to common, buffered, divides by 10.
  it("keeps its relative accuracy 400 dB down", () => {
    const sections = Array.from({ length: 20 }, (_, index): Netlist => {
      const [input, middle, output] = [`n${index}`, `m${index}`, `n${index + 1}`];
      return [
        { type: "R", name: `A${index}`, ends: [input, middle], ohm: 9000 },
        { type: "R", name: `B${index}`, ends: [middle, "0"], ohm: 1000 },
        { type: "vcvs", name: `E${index}`, ends: [output, "0"], sense: [middle, "0"], gain: 1 },
      ];
    });
    const solution = solve([{ type: "V", name: "V1", ends: ["n0", "0"], volt: 1 }, ...sections.flat()], 1000);
    expectClose(voltageAt(solution, "n20").re * 1e20, 1, 1e-12, "V(n20) in units of 1e-20 V");
  });

  it("refuses a network without a unique solution", () => {
    const netlist: Netlist = [
      { type: "V", name: "V1", ends: ["a", "0"], volt: 1 },
      { type: "V", name: "V2", ends: ["a", "0"], volt: 2 },
    ];
    expect(() => solve(netlist, 1)).toThrow();
  });
});
