import { describe, expect, it } from "vitest";
import { readAt } from "../../../src/core/response/exact.ts";
import { engineChain } from "../../helpers/netlist-engine.ts";
import { expectNodalReading } from "../../helpers/netlist-expect.ts";
import { goldenRows, goldenTolerance } from "../../helpers/netlist-golden.ts";
import { type FileChain, readNodes } from "../../helpers/netlists.ts";
import { expectAngle, expectClose, expectPolar } from "../../helpers/nodal-close.ts";
import { gainDb, magnitude } from "../../helpers/nodal-complex.ts";

interface GoldenChain {
  readonly chain: FileChain;
  /** The golden node at the chain's input and behind each of its stages. */
  readonly nodes: readonly string[];
}

const follower = { kind: "sallen-key-lowpass", parts: { R1: 10e3, R2: 10e3, C1: 22e-9, C2: 10e-9 } };
const afterFollower = { kind: "rc-lowpass", parts: { R: 1e3, C: 10e-9 } };

/** The golden netlists as chains; the one with a finite DC gain of the op amp stands apart below. */
const chains: Readonly<Record<string, GoldenChain>> = {
  "rc3-loaded": {
    chain: {
      source: { R: 600 },
      stages: [
        { kind: "rc-lowpass", parts: { R: 1e3, C: 10e-9 } },
        { kind: "rc-lowpass", parts: { R: 2.2e3, C: 4.7e-9 } },
        { kind: "rc-lowpass", parts: { R: 4.7e3, C: 2.2e-9 } },
      ],
      load: { R: 10e3, C: 100e-12 },
    },
    nodes: ["1", "2", "3", "4"],
  },
  "lc-lossy": {
    chain: {
      source: { R: 50 },
      stages: [{ kind: "lc-lowpass", parts: { L: 10e-6, C: 4.7e-9, Rw: 0.35, Rc: 0.08 } }],
      load: { R: 50 },
    },
    nodes: ["1", "3"],
  },
  "twin-t-loaded": {
    chain: {
      source: { R: 1e3 },
      stages: [
        { kind: "twin-t", parts: { R1: 31.8e3, R2: 31.8e3, R3: 15.9e3, C1: 100e-9, C2: 100e-9, C3: 200e-9 } },
      ],
      load: { R: 100e3 },
    },
    nodes: ["1", "4"],
  },
  "lead-lag": {
    chain: {
      source: { R: 100 },
      stages: [
        { kind: "series", parts: { R: 10e3, C: 1e-9, joined: "parallel" } },
        { kind: "shunt", parts: { R: 1e3, C: 220e-9, joined: "series" } },
      ],
      load: { R: 47e3 },
    },
    nodes: ["1", "2", "2"],
  },
  "t-pad": {
    chain: {
      source: { R: 600 },
      stages: [
        { kind: "series", parts: { R: 311.6963119775494, joined: "series" } },
        { kind: "shunt", parts: { R: 421.6370213557838, C: 1e-9, joined: "parallel" } },
        { kind: "series", parts: { R: 311.6963119775494, joined: "series" } },
      ],
      load: { R: 600 },
    },
    nodes: ["1", "2", "2", "3"],
  },
  "butter5-lc": {
    chain: {
      source: { R: 50 },
      stages: [
        {
          kind: "ladder",
          parts: { shape: "lowpass", family: "butterworth", order: 5, corner: 10e6, Z0: 50, first: "L" },
        },
      ],
      load: { R: 50 },
    },
    nodes: ["1", "4"],
  },
  trap: {
    chain: {
      source: { R: 75 },
      stages: [
        { kind: "shunt", parts: { R: 1.2, L: 4.7e-6, C: 270e-12, joined: "series" } },
        { kind: "lc-lowpass", parts: { L: 1e-6, C: 470e-12, Rw: 0.3 } },
      ],
      load: { R: 75 },
    },
    nodes: ["1", "1", "5"],
  },
  "sallen-key-ideal": {
    chain: { source: { R: 600 }, stages: [follower, afterFollower], load: { R: 10e3 } },
    nodes: ["1", "4", "5"],
  },
  "mfb-bandpass": {
    chain: {
      source: { R: 50 },
      stages: [
        { kind: "mfb-bandpass", parts: { R1: 7960, R2: 80.4, R3: 31.8e3, C1: 100e-9, C2: 100e-9 } },
        { kind: "rc-lowpass", parts: { R: 10e3, C: 1e-9 } },
      ],
      load: { R: 22e3 },
    },
    nodes: ["1", "4", "5"],
  },
};

const goldenRow = (id: string) => goldenRows.find((row) => row.id === id)!;

describe("the engine gives the golden chains' numbers, at that file's tolerance", () => {
  it.each(Object.entries(chains))("%s", (id, { chain, nodes }) => {
    const engine = engineChain(chain, "emf");
    for (const golden of goldenRow(id).readings) {
      const reading = readAt(engine, golden.f_hz);
      const at = `at ${golden.f_hz} Hz`;
      expectClose(reading.gainDb, golden.gain_db, goldenTolerance.gainDb(golden.gain_db), `gain in dB ${at}`);
      expectAngle(reading.phaseDeg, golden.phase_deg_wrapped, goldenTolerance.phaseDeg, `phase ${at}`);
      let ratio = 1;
      const largest = Math.max(...[...golden.voltages.values()].map(magnitude));
      nodes.forEach((node, k) => {
        ratio *= 10 ** (reading.shares[k].gainDb / 20);
        const expected = magnitude(golden.voltages.get(node)!);
        expectClose(ratio, expected, goldenTolerance.voltage * largest, `|V(${node})| from the shares ${at}`);
      });
    }
  });

  it("but for the one whose op amp's DC gain ends: that is sallen-key-gbw", () => {
    expect(goldenRows.map((row) => row.id).filter((id) => !(id in chains))).toEqual(["sallen-key-gbw"]);
  });
});

// An op amp with `gbw` has no end to its DC gain by definition; the golden one ends at 1e5. So the nodal solver is held
// against the golden numbers at 1e5, and the engine against the nodal solver at infinity.
describe("sallen-key-gbw", () => {
  const stages = [{ ...follower, parts: { ...follower.parts, gbw: 1e6 } }, afterFollower];
  const chain: FileChain = { source: { R: 600 }, stages, load: { R: 10e3 } };
  const { readings } = goldenRow("sallen-key-gbw");

  it("as a chain netlist gives the golden numbers at a DC gain of 1e5", () => {
    for (const golden of readings) {
      const { nodes } = readNodes(chain, golden.f_hz, { a0: 1e5 });
      const toleranceDb = goldenTolerance.gainDb(golden.gain_db);
      expectPolar(nodes[2].voltage, golden, toleranceDb, goldenTolerance.phaseDeg);
    }
  });

  it("as the engine has it agrees with the nodal solver at an infinite DC gain", () => {
    for (const { f_hz } of readings) {
      expectNodalReading(chain, f_hz);
    }
  });

  it("is the case that tells the two apart", () => {
    const [{ f_hz, gain_db }] = readings;
    const apart = Math.abs(gainDb(readNodes(chain, f_hz).nodes[2].voltage) - gain_db);
    expect(apart).toBeGreaterThan(1e-5);
  });
});
