import { describe, expect, it } from "vitest";
import { type Chain, makeChain } from "../../../src/core/chain.ts";
import { levelDb } from "../../../src/core/dual.ts";
import { shunt } from "../../../src/core/elements/make.ts";
import { compile } from "../../../src/core/formula/evaluate.ts";
import type { FormulaTree } from "../../../src/core/formula/tree.ts";
import { readings, sweepReadings } from "../../../src/core/readings.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { logSpaced, sweepFrequencies } from "../../../src/core/response/grid.ts";
import { landmarks } from "../../../src/core/response/landmarks.ts";
import { Sampler } from "../../../src/core/response/sampled.ts";
import { buildStage } from "../../../src/core/stages/build.ts";
import type { PartValues } from "../../../src/core/stages/kind.ts";

// Asymptotes in logarithms, which never leave double precision: a term that outweighs the others by a hundred decades
// is the response to the last digit. Closed forms of physics' list of stage kinds.
const db = (log10: number): number => 20 * log10;
const log10Omega = (freqHz: number): number => Math.log10(2 * Math.PI) + Math.log10(freqHz);
const tau = 100e-6;

const chainOf = (...stages: readonly (readonly [string, PartValues])[]): Chain =>
  makeChain({ stages: stages.map(([kind, values]) => buildStage(kind, values)) });

const rc = ["rc-lowpass", { R: 1000, C: 100e-9 }] as const;
const cr = ["rc-highpass", { R: 1000, C: 100e-9 }] as const;
const butterworth = (order: number, shape = "lowpass") =>
  ["filter", { shape, family: "butterworth", order, corner: 1000 }] as const;

describe("readAt far beyond the range of a double", () => {
  it.each<readonly [string, Chain, number, number]>([
    ["RC, 1/ωRC", chainOf(rc), 1e200, -db(log10Omega(1e200) + Math.log10(tau))],
    [
      "two RC, which load each other: 1/(ωRC)²",
      chainOf(rc, rc),
      1e200,
      -2 * db(log10Omega(1e200) + Math.log10(tau)),
    ],
    ["CR, ωRC", chainOf(cr), 1e-200, db(log10Omega(1e-200) + Math.log10(tau))],
    ["four CR, (ωRC)⁴", chainOf(cr, cr, cr, cr), 1e-150, 4 * db(log10Omega(1e-150) + Math.log10(tau))],
    [
      "parts of 1e308 each",
      chainOf(["rc-lowpass", { R: 1e308, C: 1e308 }]),
      1e100,
      -db(log10Omega(1e100) + 616),
    ],
    ["parts of 1e-308 each", chainOf(["rc-highpass", { R: 1e-308, C: 1e-308 }]), 1, db(log10Omega(1) - 616)],
    ["a low-pass of order 30, x⁻³⁰", chainOf(butterworth(30)), 1e300, -30 * db(297)],
    ["a high-pass of order 30, x³⁰", chainOf(butterworth(30, "highpass")), 1e-300, -30 * db(303)],
    ["a section of Q 1, x⁻²", chainOf(["lowpass-2", { f0: 1000, Q: 1 }]), 1e170, -2 * db(167)],
    ["fifty integrators, x⁻⁵⁰", chainOf(...Array(50).fill(["integrator", { f0: 1e-9 }])), 1e12, -50 * db(21)],
    [
      "amplifiers of 1e300 in a row",
      chainOf(["gain", { gain: 1e300 }], ["gain", { gain: 1e300 }]),
      1,
      db(600),
    ],
  ])("%s", (_, chain, freqHz, gainDb) => {
    const reading = readAt(chain, freqHz);
    expect(Math.abs(reading.gainDb - gainDb)).toBeLessThan(1e-12 * Math.abs(gainDb));
    const shares = reading.shares.reduce((sum, share) => sum + share.gainDb, 0);
    expect(Math.abs(shares - gainDb)).toBeLessThan(1e-12 * Math.abs(gainDb));
  });

  it("keeps phase and slope: two RC are −180° and −40 dB per decade", () => {
    const { phaseDeg, slopeDbPerDecade } = readAt(chainOf(rc, rc), 1e250);
    expect(Math.abs(phaseDeg)).toBeCloseTo(180, 10);
    expect(slopeDbPerDecade).toBeCloseTo(-40, 10);
  });

  it("keeps the group delay, τ/(ωτ)², as far down as a double goes", () => {
    const { groupDelayS } = readAt(chainOf(rc), 1e140);
    expect(groupDelayS * (2 * Math.PI * 1e140) * (2 * Math.PI * 1e140) * tau).toBeCloseTo(1, 10);
  });

  it("goes on down a long lossy line: loss rises with √f", () => {
    const line = ["line", { Z0: 50, length: 300, velocity: 0.66, loss: 50, lossAt: 1e5 }] as const;
    const matched = makeChain({
      source: { num: [50], den: [1], omega0: 1 },
      stages: [buildStage(...line)],
      load: { num: [50], den: [1], omega0: 1 },
      against: "insertion",
    });
    // 150 dB at 100 kHz, so 15 000 dB at 1 GHz.
    expect(readAt(matched, 1e9).gainDb).toBeCloseTo(-15_000, 7);
  });

  it("still tells a null from that: a lossless trap at its resonance", () => {
    // 1/(2π√(LC)) with √(LC) = 1/(2π·1000) s; the part values are powers of two times one another.
    const L = 1 / (2 * Math.PI * 1000);
    const trap = { name: "trap", kind: "shunt", elements: [shunt({ L, C: L })] };
    const chain = makeChain({ source: { num: [50], den: [1], omega0: 1 }, stages: [trap] });
    expect(readAt(chain, 1000).gainDb).toBe(-Infinity);
    expect(readAt(chain, 1000).ratio).toBe(0);
  });
});

describe("readings(chain, …) beyond a double", () => {
  it("has no ratio where that is not zero and yet below the least double", () => {
    const [{ ratio, gainDb }] = readings(
      chainOf(rc, rc),
      { fromHz: 1, toHz: 1e3, perDecade: 1 },
      [1e200],
    ).readings;
    expect(ratio).toBeNull();
    expect(gainDb).toBeLessThan(-7000);
  });
});

describe("a formula far out", () => {
  const s: FormulaTree = { op: "s" };
  const number = (value: number): FormulaTree => ({ op: "number", value });
  const over = (left: FormulaTree, right: FormulaTree): FormulaTree => ({ op: "divide", left, right });
  const call = (name: "exp" | "sinh" | "sqrt" | "tanh", of: FormulaTree): FormulaTree => ({
    op: "call",
    name,
    of,
  });
  const times = (left: FormulaTree, right: FormulaTree): FormulaTree => ({ op: "multiply", left, right });

  it.each<readonly [string, FormulaTree, number, number]>([
    ["exp(−4000) is −4000 nepers", call("exp", number(-4000)), 1, -4000 * (20 / Math.LN10)],
    ["sinh(s)/s is 1 where s is next to nothing", over(call("sinh", s), s), 1e-12, 0],
    ["sinh(s)/s is 1 below the least double", over(call("sinh", times(s, s)), times(s, s)), 1e-200, 0],
    [
      "1/√(s⁴) is ω⁻²",
      over(number(1), call("sqrt", { op: "power", base: s, exponent: 4 })),
      1e200,
      -400 * 20,
    ],
    ["tanh(1000) is 1", call("tanh", number(1000)), 1, 0],
  ])("%s", (_, tree, omega, gainDb) => {
    expect(Math.abs(levelDb(compile(tree, {})(omega)) - gainDb)).toBeLessThan(
      1e-12 * Math.max(1, Math.abs(gainDb)),
    );
  });
});

describe("the sampled response beyond a double", () => {
  it("is the exact one, and not a null", () => {
    const chain = chainOf(rc, butterworth(8));
    const { freqHz, gainDb, phaseDeg } = new Sampler(Float64Array.of(1e3, 1e20, 1e60, 1e120, 1e200)).response(
      chain,
    );
    freqHz.forEach((freq, k) => {
      const exact = readAt(chain, freq);
      expect(Math.abs(gainDb[k] - exact.gainDb)).toBeLessThan(1e-9 * Math.abs(exact.gainDb));
      expect(phaseDeg[k]).toBeCloseTo(exact.phaseDeg, 6);
    });
  });
});

describe("frequencies whose ratio is beyond a double", () => {
  const sweep = { fromHz: 1e-310, toHz: 1e307, perDecade: 4 };

  it("are spaced evenly all the same", () => {
    const freqHz = sweepFrequencies(sweep);
    expect(freqHz).toHaveLength(617 * 4 + 1);
    for (const [k, freq] of freqHz.entries()) expect(Math.log10(freq)).toBeCloseTo(-310 + k / 4, 9);
    expect([...logSpaced(1e-310, 1e307, 3)].map((freq) => Math.log10(freq))[1]).toBeCloseTo(-1.5, 9);
  });

  it("are read, swept and searched", () => {
    const chain = chainOf(rc);
    const found = readings(chain, sweep, [1e-310, 1e307]).readings;
    expect(found.map(({ gainDb }) => gainDb)).toEqual([0, readAt(chain, 1e307).gainDb]);
    expect(found[1].phaseUnwrappedDeg).toBeCloseTo(-90, 9);
    expect(sweepReadings(chain, sweep).readings).toHaveLength(617 * 4 + 1);
    // Half power at 1/(2πRC), and nothing else of note.
    expect(landmarks(chain, sweep.fromHz, sweep.toHz).map(({ what }) => what)).toEqual(["half power"]);
  });
});
