import { describe, expect, it } from "vitest";
import { type Chain, makeChain } from "../../../src/core/chain.ts";
import { crossings, extremes, gainPoints, greatestGain } from "../../../src/core/response/features.ts";
import { HALF_POWER_DB, landmarks } from "../../../src/core/response/landmarks.ts";
import { buildStage } from "../../../src/core/stages/build.ts";
import type { PartValues } from "../../../src/core/stages/kind.ts";

const chainOf = (...stages: readonly (readonly [string, PartValues])[]): Chain =>
  makeChain({ stages: stages.map(([kind, values]) => buildStage(kind, values)) });

// |H| = |sin(πMr)/(M·sin(πr))|^N with r = f/rate (Hogenauer 1981) has the period of the rate and is even about its
// multiples, so each of them has the two half-power points of the pass band beside it. The pass band's own comes from
// halving the closed form's interval.
describe.each([
  [3, 8],
  [3, 64],
  [1, 16],
  [5, 1000],
])("half-power points of a decimator of order %i and ratio %i at 1 MS/s up to 1 GHz", (order, ratio) => {
  const rate = 1e6;
  const decimator = chainOf(["sinc-decimator", { order, ratio, rate }]);

  function passBandEdgeHz(): number {
    const level = (r: number) =>
      20 * order * Math.log10(Math.sin(Math.PI * ratio * r) / (ratio * Math.sin(Math.PI * r)));
    let [low, high] = [1e-12, 1 / ratio];
    for (let k = 0; k < 100; k++) {
      const middle = (low + high) / 2;
      if (level(middle) > HALF_POWER_DB) low = middle;
      else high = middle;
    }
    return low * rate;
  }

  it("lie beside every multiple of the rate, none left out", () => {
    const edge = passBandEdgeHz();
    const found = crossings(decimator, gainPoints(decimator, 1, 1e9), HALF_POWER_DB);
    expect(found.length).toBe(400);
    const expected = found.map((_, k) => rate * Math.ceil(k / 2) + (k % 2 === 0 ? edge : -edge));
    found.forEach((freqHz, k) => {
      expect(Math.abs(freqHz - expected[k])).toBeLessThan(1e-6 * edge);
    });
  });
});

describe("a bounded search", () => {
  it("looks for no more than 400 extremes, those of lowest frequency", () => {
    const average = chainOf(["moving-average", { length: 1000, rate: 1e6 }]);
    const found = extremes(average, gainPoints(average, 1, 1e9));
    expect(found).toHaveLength(400);
    // Nulls at multiples of rate/length, one top between each two.
    found.forEach(({ freqHz, what }, k) => {
      expect(what).toBe(k % 2 === 0 ? "null" : "peak");
      if (what === "null") expect(Math.abs(freqHz / (1000 * (k / 2 + 1)) - 1)).toBeLessThan(1e-12);
    });
  });

  it("finds a resonance above thousands of nulls, of a line and of a decimator", () => {
    // The marks beside roots come first. Peak of 1/(1 − x² + jx/Q): at √(1 − 1/2Q²), Q/√(1 − 1/4Q²) (closed form).
    const Q = 2000;
    const chain = chainOf(
      ["sinc-decimator", { order: 1, ratio: 10, rate: 1e3 }],
      ["line", { Z0: 50, length: 1e6, velocity: 0.66 }],
      ["lowpass-2", { f0: 0.777e9, Q }],
    );
    const alone = chainOf(["lowpass-2", { f0: 0.777e9, Q }]);
    const peakHz = 0.777e9 * Math.sqrt(1 - 1 / (2 * Q * Q));
    const inside = (range: { readonly freqHz: number }) => Math.abs(range.freqHz / peakHz - 1) < 1 / Q;
    expect(gainPoints(chain, 1, 1e9).filter(inside).length).toBeGreaterThan(4);
    const top = greatestGain(alone, gainPoints(alone, 1, 1e9))!;
    expect(Math.abs(top.gainDb - 20 * Math.log10(Q / Math.sqrt(1 - 1 / (4 * Q * Q))))).toBeLessThan(1e-9);
  });
});

describe("landmarks(chain, fromHz, toHz)", () => {
  // Closed forms: |H|² = (1 − x²)²/((1 − x²)² + x²/Q²), half power where 1 − x² = ±x/Q.
  it("of a notch: its null and the half-power points on either side", () => {
    const [f0, Q] = [1000, 5];
    const found = landmarks(chainOf(["notch-2", { f0, Q }]), 1e-4, 1e10);
    const root = Math.sqrt(1 + 1 / (4 * Q * Q));
    const expected = [
      ["half power", f0 * (root - 1 / (2 * Q))],
      ["null", f0],
      ["half power", f0 * (root + 1 / (2 * Q))],
    ] as const;
    const named = found.filter(({ what }) => what === "half power" || what === "null");
    expect(named.map(({ what }) => what)).toEqual(expected.map(([what]) => what));
    named.forEach(({ freqHz }, k) => {
      expect(Math.abs(freqHz / expected[k][1] - 1)).toBeLessThan(1e-9);
    });
  });
});

describe("crossings(chain, points, levelDb)", () => {
  const unity = chainOf(["gain", { gain: 1 }]);
  const falling = chainOf(["integrator", { f0: 1000 }]);

  it("has none where the gain stays at the level", () => {
    expect(crossings(unity, gainPoints(unity, 1, 1e6), 0)).toEqual([]);
    expect(landmarks(unity, 1, 1e6)).toEqual([]);
    // 0 dB but for rounding up to about 10 Hz, then falling: 1/√(1 + x²).
    const lowpass = chainOf(["lowpass-1", { f0: 1e9 }]);
    expect(crossings(lowpass, gainPoints(lowpass, 1, 1e9), 0)).toEqual([]);
  });

  it("has one where the gain starts or ends at the level", () => {
    // 1/x is 0 dB at its corner.
    expect(crossings(falling, gainPoints(falling, 1000, 1e5), 0)).toEqual([1000]);
    expect(crossings(falling, gainPoints(falling, 10, 1000), 0)).toEqual([1000]);
    expect(crossings(falling, gainPoints(falling, 10, 1e5), 0)[0]).toBeCloseTo(1000, 9);
  });

  it("has none where the gain only touches the level", () => {
    // x/Q over 1 + x/Q + x² is 1 at its centre, and less beside it.
    const band = chainOf(["bandpass-2", { f0: 1000, Q: 3 }]);
    expect(crossings(band, gainPoints(band, 10, 1e5), 0)).toEqual([]);
  });
});
