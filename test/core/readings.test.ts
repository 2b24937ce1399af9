import { describe, expect, it } from "vitest";
import { makeChain } from "../../src/core/chain.ts";
import { branchImpedance } from "../../src/core/elements/branch.ts";
import { readings, sweepReadings } from "../../src/core/readings.ts";
import { stageKind } from "../../src/core/stages/index.ts";
import type { PartValues } from "../../src/core/stages/kind.ts";

const stage = (kind: string, values: PartValues) => ({
  kind,
  name: kind,
  elements: stageKind(kind)!.elements(values),
});

const sweep = { fromHz: 1, toHz: 1e6, perDecade: 10 };

// R behind a source of none, C across an open output: H = 1/(1 + jx), x = ωRC (Kirchhoff's laws).
const resistanceOhm = 1000;
const capacitanceFarad = 100e-9;
const cornerHz = 1 / (2 * Math.PI * resistanceOhm * capacitanceFarad);
const rc = makeChain({ stages: [stage("rc-lowpass", { R: resistanceOhm, C: capacitanceFarad })] });

/** By hand from H = 1/(1 + jx): |H|² = 1/(1+x²), φ = −atan x, τ = RC/(1+x²), slope = −20·x²/(1+x²). */
function byHand(freqHz: number) {
  const x = freqHz / cornerHz;
  return {
    gainDb: -10 * Math.log10(1 + x * x),
    phaseDeg: (-Math.atan(x) * 180) / Math.PI,
    groupDelayS: (resistanceOhm * capacitanceFarad) / (1 + x * x),
    slopeDbPerDecade: (-20 * x * x) / (1 + x * x),
  };
}

describe("readings(chain, sweep, freqsHz, rateHz)", () => {
  it("reads a first-order low-pass as its closed form says, in the order asked for", () => {
    const freqsHz = [1e5, cornerHz, 10, cornerHz];
    const found = readings(rc, sweep, freqsHz).readings;
    expect(found.map(({ freqHz }) => freqHz)).toEqual(freqsHz);
    for (const reading of found) {
      const expected = byHand(reading.freqHz);
      expect(reading.gainDb).toBeCloseTo(expected.gainDb, 10);
      expect(reading.attenuationDb).toBeCloseTo(-expected.gainDb, 10);
      expect(reading.ratio).toBeCloseTo(10 ** (expected.gainDb / 20), 12);
      expect(reading.phaseDeg).toBeCloseTo(expected.phaseDeg, 10);
      expect(reading.phaseUnwrappedDeg).toBeCloseTo(expected.phaseDeg, 9);
      expect(reading.groupDelayS).toBeCloseTo(expected.groupDelayS, 14);
      expect(reading.slopeDbPerDecade).toBeCloseTo(expected.slopeDbPerDecade, 10);
    }
  });

  it("has the fields of the specification and no others", () => {
    const names = [
      "freqHz",
      "gainDb",
      "attenuationDb",
      "ratio",
      "phaseDeg",
      "phaseUnwrappedDeg",
      "groupDelayS",
      "slopeDbPerDecade",
      "shares",
    ];
    expect(Object.keys(readings(rc, sweep, [50]).readings[0])).toEqual(names);
    expect(Object.keys(readings(rc, sweep, [50], 100).readings[0])).toEqual([...names, "foldHz"]);
    const [first] = sweepReadings(rc, sweep, 100).readings;
    expect(Object.keys(first)).toEqual([...names.filter((name) => name !== "shares"), "foldHz"]);
  });

  it("lists the source first among shares that add up to the gain", () => {
    // A divider of 1 kΩ over 3 kΩ loaded by 6 kΩ behind 1 kΩ, by hand: V0/E = 3/4, V1/V0 = 2/3, gain 1/2.
    const loaded = makeChain({
      source: branchImpedance({ R: 1000, joined: "series" }),
      stages: [stage("divider", { R1: 1000, R2: 3000 })],
      load: branchImpedance({ R: 6000, joined: "parallel" }),
    });
    const [reading] = readings(loaded, sweep, [100]).readings;
    expect(reading.ratio).toBeCloseTo(1 / 2, 12);
    expect(reading.shares!.map(({ name }) => name)).toEqual(["source", "divider"]);
    expect(reading.shares![0].gainDb).toBeCloseTo(20 * Math.log10(3 / 4), 10);
    expect(reading.shares![1].gainDb).toBeCloseTo(20 * Math.log10(2 / 3), 10);
  });

  it("tells a null as ratio 0 and nothing else", () => {
    // 1 + x² is zero at x = j.
    const notch = makeChain({ stages: [stage("notch-2", { f0: 1000, Q: 5 })] });
    const [reading] = readings(notch, sweep, [1000], 1500).readings;
    expect(reading).toEqual({
      freqHz: 1000,
      gainDb: null,
      attenuationDb: null,
      ratio: 0,
      phaseDeg: null,
      phaseUnwrappedDeg: null,
      groupDelayS: null,
      slopeDbPerDecade: null,
      shares: [
        { name: "source", gainDb: 0 },
        { name: "notch-2", gainDb: null },
      ],
      foldHz: 500,
    });
  });

  it("tells the share of the source at a null across the line, and that of the trap as its limit", () => {
    // 1 H and 1 F in series are a short at 1 rad/s: nothing is left of the EMF, and nothing more is lost by the trap.
    const trap = makeChain({
      source: branchImpedance({ R: 50, joined: "series" }),
      stages: [stage("shunt", { L: 1, C: 1, joined: "series" })],
    });
    const [reading] = readings(trap, sweep, [1 / (2 * Math.PI)]).readings;
    expect(reading).toMatchObject({ gainDb: null, ratio: 0 });
    expect(reading.shares).toEqual([
      { name: "source", gainDb: null },
      { name: "shunt", gainDb: 0 },
    ]);
  });

  it("counts the continuous phase from the wrapped phase at the start of the sweep", () => {
    // e^(−s·1 ms): −0.36° per Hz. From 700 Hz on, where it is −252° and so +108° wrapped.
    const late = makeChain({ stages: [stage("delay", { time: 1e-3 })] });
    const from700 = { fromHz: 700, toHz: 1e4, perDecade: 20 };
    const [above, below] = readings(late, from700, [2000, 100]).readings;
    expect(above.phaseUnwrappedDeg).toBeCloseTo(108 - 0.36 * 1300, 8);
    expect(below.phaseUnwrappedDeg).toBeCloseTo(108 + 0.36 * 600, 8);
    expect(above.phaseDeg).toBeCloseTo(0, 8);
    const swept = sweepReadings(late, from700).readings;
    expect(swept[0].phaseUnwrappedDeg).toBeCloseTo(108, 8);
    for (const { freqHz, phaseUnwrappedDeg } of swept) {
      expect(phaseUnwrappedDeg).toBeCloseTo(108 - 0.36 * (freqHz - 700), 6);
    }
  });

  it.each([
    // |f − rate·round(f/rate)|, by hand.
    [400, 400],
    [500, 500],
    [900, 100],
    [12_300, 300],
  ])("folds %d Hz at 1000 samples/s to %d Hz", (freqHz, expected) => {
    expect(readings(rc, sweep, [freqHz], 1000).readings[0].foldHz).toBe(expected);
  });

  it("has no reading outside a measured response, and says where", () => {
    const table = {
      type: "table" as const,
      freqHz: Float64Array.of(10, 1000),
      gainDb: Float64Array.of(0, -20),
      phaseDeg: Float64Array.of(0, -90),
    };
    const measured = makeChain({ stages: [stage("table", { file: table })] });
    const found = readings(measured, sweep, [5, 100, 2000]);
    expect(found.withoutValueHz).toEqual([5, 2000]);
    // Halfway on a logarithmic axis, so half of −20 dB and of −90°.
    expect(found.readings).toHaveLength(1);
    expect(found.readings[0].gainDb).toBeCloseTo(-10, 10);
    expect(found.readings[0].phaseDeg).toBeCloseTo(-45, 10);
    const swept = sweepReadings(measured, sweep);
    expect(swept.readings).toHaveLength(21);
    expect(swept.withoutValueHz).toHaveLength(40);
  });
});

describe("sweepReadings(chain, sweep, rateHz)", () => {
  it("reads every point as its closed form says, both ends included", () => {
    const found = sweepReadings(rc, sweep).readings;
    expect(found).toHaveLength(61);
    expect([found[0].freqHz, found[60].freqHz]).toEqual([1, 1e6]);
    for (const [k, reading] of found.entries()) {
      const expected = byHand(reading.freqHz);
      expect(reading.freqHz).toBeCloseTo(10 ** (k / 10), 5);
      expect(reading.gainDb).toBeCloseTo(expected.gainDb, 10);
      expect(reading.phaseUnwrappedDeg).toBeCloseTo(expected.phaseDeg, 8);
      expect(reading.groupDelayS).toBeCloseTo(expected.groupDelayS, 14);
    }
  });
});
