import { describe, expect, it } from "vitest";
import { checkLimit } from "../../../src/core/limits/check.ts";
import { checkFolding, idealSignalToNoiseDb } from "../../../src/core/limits/folding.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { readChainText } from "../../../src/document/read.ts";
import type { ChainDocument, StageDocument } from "../../../src/document/types.ts";

const SWEEP = { fromHz: 1, toHz: 1e6, perDecade: 50 };
const NO_CONTEXT = {
  formula: undefined,
  table: () => ({ ok: false, problem: { found: "", allowed: "" } }) as const,
};

function chainOf(stages: readonly StageDocument[], rest: Partial<ChainDocument> = {}) {
  const text = JSON.stringify({ format: "halfpower-chain", version: 1, ...rest, stages });
  const read = readChainText(text, "test", NO_CONTEXT);
  if (!read.ok) throw new Error(JSON.stringify(read.problem));
  return read.value.resolved.chain;
}

/** |H|² = 1/(1+x²), x = f/fc, fc = 1/(2π·1 kΩ·100 nF) = 1591.549430918953 Hz: Kirchhoff's laws. */
const rc = chainOf([{ kind: "rc-lowpass", parts: { R: "1k", C: "100n" } }]);
const FC = 1 / (2 * Math.PI * 1e3 * 100e-9);
const rcDb = (freqHz: number) => -10 * Math.log10(1 + (freqHz / FC) ** 2);

describe("checkLimit(chain, limit, sweep)", () => {
  it("finds the worst of a falling response at the end of the range", () => {
    const verdict = checkLimit(rc, { quantity: "gain", fromHz: 10, toHz: 1000, atLeast: -1 }, SWEEP);
    expect(verdict.pass).toBe(false);
    expect(verdict.worstFreqHz).toBe(1000);
    expect(verdict.worstValue).toBeCloseTo(rcDb(1000), 9);
    expect(verdict.margin).toBeCloseTo(rcDb(1000) + 1, 9);
  });

  it("counts gain from a frequency where it is relative", () => {
    const limit = { quantity: "gain", fromHz: 10, toHz: 1000, atLeast: -2, atMost: 0.5, reHz: 500 } as const;
    const verdict = checkLimit(rc, limit, SWEEP);
    // Upwards 0.5 − 0.4108 is nearer than downwards −1.0343 + 2.
    expect(verdict.margin).toBeCloseTo(0.5 - (rcDb(10) - rcDb(500)), 9);
    expect(verdict.worstFreqHz).toBe(10);
    expect(verdict.pass).toBe(true);
  });

  it("fails at the exact frequency of a notch a thousand times narrower than the grid", () => {
    // Forty points a decade are 5.9 % apart; Q = 20 000 makes the notch 0.05 Hz wide at 1 kHz, a thousandth of that.
    const chain = chainOf([{ kind: "notch-2", parts: { f0: "1001.234", Q: 20000 } }]);
    const verdict = checkLimit(chain, { quantity: "gain", fromHz: 100, toHz: 10000, atLeast: -3 }, SWEEP);
    expect(verdict.pass).toBe(false);
    expect(verdict.worstFreqHz).toBeCloseTo(1001.234, 9);
    expect(verdict.worstValue).toBe(-Infinity);
    expect(verdict.margin).toBe(-Infinity);
  });

  it("finds the peak of a resonance between grid points", () => {
    // Second-order low-pass: peak at f0·√(1−1/2Q²) of Q/√(1−1/4Q²); any control text.
    const q = 50;
    const chain = chainOf([{ kind: "lowpass-2", parts: { f0: "1234.5", Q: q } }]);
    const verdict = checkLimit(chain, { quantity: "gain", fromHz: 10, toHz: 1e5, atMost: 20 }, SWEEP);
    expect(verdict.worstFreqHz / (1234.5 * Math.sqrt(1 - 1 / (2 * q * q)))).toBeCloseTo(1, 6);
    expect(verdict.worstValue).toBeCloseTo(20 * Math.log10(q / Math.sqrt(1 - 1 / (4 * q * q))), 9);
  });

  it("bounds continuous phase and group delay", () => {
    // Four equal isolated poles: −4·atan(x), delay 4·τ/(1+x²) with τ = 1/ω0.
    const pole = { kind: "lowpass-1", parts: { f0: "1k" } };
    const chain = chainOf([pole, pole, pole, pole]);
    const phase = checkLimit(chain, { quantity: "phase", fromHz: 10, toHz: 5000, atLeast: -300 }, SWEEP);
    expect(phase.worstFreqHz).toBe(5000);
    expect(phase.worstValue).toBeCloseTo((-4 * Math.atan(5) * 180) / Math.PI, 6);
    const delay = checkLimit(chain, { quantity: "delay", fromHz: 100, toHz: 1000, atMost: 600e-6 }, SWEEP);
    expect(delay.worstFreqHz).toBe(100);
    expect(delay.worstValue).toBeCloseTo(4 / (2 * Math.PI * 1000 * (1 + 0.01)), 12);
    expect(delay.pass).toBe(false);
  });

  it("takes a null for no offence against an upper bound", () => {
    const chain = chainOf([{ kind: "notch-2", parts: { f0: "50", Q: 1 } }]);
    const verdict = checkLimit(chain, { quantity: "gain", fromHz: 49, toHz: 51, atMost: 1 }, SWEEP);
    expect(verdict.pass).toBe(true);
    expect(Number.isFinite(verdict.margin)).toBe(true);
  });
});

describe("checkFolding(chain, sampling, sweepToHz)", () => {
  it("agrees with a 12-bit, 8 kS/s example worked by hand", () => {
    // Needed: 6.02·12 + 1.76 = 74 dB. Six poles at 1 kHz, band 1 kHz: the first image begins at 7 kHz, x = 7:
    // 6·10·log10(1 + 49) = 101.94 dB below 0 Hz; the greatest gain in the band is that at 0 Hz.
    const pole = { kind: "lowpass-1", parts: { f0: "1k" } };
    const chain = chainOf(Array<StageDocument>(6).fill(pole));
    const needed = idealSignalToNoiseDb(12);
    expect(needed).toBeCloseTo(74, 9);
    const folding = checkFolding(chain, { rateHz: 8000, bandHz: 1000, neededDb: needed }, 1e6);
    expect(folding.worstFreqHz).toBeCloseTo(7000, 6);
    expect(folding.attenuationDb).toBeCloseTo(60 * Math.log10(50), 5);
    expect(folding.pass).toBe(true);
  });

  it("finds a resonance within a far image", () => {
    const chain = chainOf([
      { kind: "lowpass-1", parts: { f0: "10" } },
      { kind: "bandpass-2", parts: { f0: "80200", Q: 4000 } },
    ]);
    const folding = checkFolding(chain, { rateHz: 8000, bandHz: 1000, neededDb: 40, referenceHz: 500 }, 1e6);
    expect(folding.worstFreqHz / 80200).toBeCloseTo(1, 6);
    expect(folding.attenuationDb).toBeCloseTo(readAt(chain, 500).gainDb - readAt(chain, 80200).gainDb, 6);
  });

  it("is not passed by a sampled stage, whose images are as strong as the band", () => {
    const chain = chainOf([{ kind: "moving-average", parts: { length: 4, rate: "8k" } }]);
    const folding = checkFolding(chain, { rateHz: 8000, bandHz: 100, neededDb: 60 }, 1e5);
    expect(folding.attenuationDb).toBeCloseTo(0, 4);
    expect(folding.pass).toBe(false);
  });
});
