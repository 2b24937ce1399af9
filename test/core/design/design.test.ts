import { describe, expect, it } from "vitest";
import { compareFamilies } from "../../../src/core/design/figures.ts";
import { leastDesign } from "../../../src/core/design/least-order.ts";
import { realise } from "../../../src/core/design/realise/realise.ts";
import type { PartsBin } from "../../../src/core/design/realise/types.ts";
import { type Requirement, requirementProblem } from "../../../src/core/design/requirement.ts";
import { FILTER_FAMILIES, type FilterFamily } from "../../../src/core/filters/spec.ts";
import type { FilterSpec } from "../../../src/core/filters/transform.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { nearestInSeries } from "../../../src/core/units/e-series.ts";
import { filterStage, realisedStage } from "../../../src/document/designed.ts";
import { readChainText } from "../../../src/document/read.ts";
import type { StageDocument } from "../../../src/document/types.ts";

const NOTHING = {
  formula: undefined,
  table: () => ({ ok: false, problem: { found: "", allowed: "" } }) as const,
};

function chainOf(stages: readonly StageDocument[], rest: object = {}) {
  const read = readChainText(
    JSON.stringify({ format: "halfpower-chain", version: 1, ...rest, stages }),
    "test",
    NOTHING,
  );
  if (!read.ok) throw new Error(JSON.stringify(read.problem));
  return read.value.resolved.chain;
}

const lossDb = (spec: FilterSpec, freqHz: number) => -readAt(chainOf([filterStage(spec)]), freqHz).gainDb;

function designed(family: FilterFamily, requirement: Requirement): FilterSpec {
  const spec = leastDesign(family, requirement);
  if (!spec.ok) throw new Error(spec.problem.found);
  return spec.value;
}

/** Seeded, so that a failure can be run again: a multiplicative congruential generator, Park and Miller (1988). */
function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

const between = (random: () => number, low: number, high: number) => low * (high / low) ** random();

function requirementFrom(random: () => number): Requirement {
  const passHz = between(random, 1, 1e5);
  return {
    passHz,
    passLossDb: between(random, 0.05, 3),
    stopHz: passHz * between(random, 1.3, 12),
    stopLossDb: between(random, 20, 100),
  };
}

describe("leastDesign(family, requirement)", () => {
  it.each([
    // 1 dB at 1, 40 dB at 2: d = √((10^4 − 1)/(10^0.1 − 1)) = 196.52; ln d/ln 2 = 7.62, acosh d/acosh 2 = 4.54.
    ["butterworth", 8],
    ["chebyshev", 5],
    ["inverse-chebyshev", 5],
    // K(1/2)·K'(1/d)/(K'(1/2)·K(1/d)) = 3.4 by Abramowitz and Stegun, table 17.1, and K' of a small modulus ln(4/k).
    ["elliptic", 4],
  ] as const)(
    "%s: 1 dB at 1 kHz and 40 dB at 2 kHz take order %i, by the closed form worked by hand",
    (family, order) => {
      expect(designed(family, { passHz: 1e3, passLossDb: 1, stopHz: 2e3, stopLossDb: 40 }).order).toBe(order);
    },
  );

  it("takes an order that comes out whole", () => {
    // Butterworth of order 3 loses 3.0103 dB at 1 and 10·log10(1 + 10^6) dB at 10.
    const requirement = {
      passHz: 1,
      passLossDb: 10 * Math.log10(2),
      stopHz: 10,
      stopLossDb: 10 * Math.log10(1 + 1e6),
    };
    const spec = designed("butterworth", requirement);
    expect(spec.order).toBe(3);
    expect(spec.cornerHz).toBeCloseTo(1, 12);
  });

  it("meets both edges with the least order, for 100 random requirements and every family", () => {
    const random = generator(20261201);
    const counts = new Map<FilterFamily, number>();
    for (let k = 0; k < 100; k++) {
      const requirement = requirementFrom(random);
      for (const family of FILTER_FAMILIES) {
        const spec = leastDesign(family, requirement);
        if (!spec.ok) continue;
        counts.set(family, (counts.get(family) ?? 0) + 1);
        const { passHz, passLossDb, stopHz, stopLossDb } = requirement;
        expect(lossDb(spec.value, passHz)).toBeLessThanOrEqual(passLossDb + 1e-6);
        expect(lossDb(spec.value, stopHz)).toBeGreaterThanOrEqual(stopLossDb - 1e-6);
        expectOneLessToFail(spec.value, requirement);
      }
    }
    for (const family of FILTER_FAMILIES)
      expect(counts.get(family)).toBeGreaterThan(family === "bessel" ? 20 : 60);
  });

  it("refuses what no order does, and says why", () => {
    const steep = { passHz: 1e3, passLossDb: 0.1, stopHz: 1.01e3, stopLossDb: 100 };
    const butterworth = leastDesign("butterworth", steep);
    expect(butterworth.ok || butterworth.problem.found).toMatch(/butterworth: order \d+ would be needed/);
    const bessel = leastDesign("bessel", { ...steep, stopHz: 3e3 });
    expect(bessel.ok || bessel.problem.found).toContain("bessel: no order");
  });

  it.each([
    [{ passHz: 2, passLossDb: 1, stopHz: 1, stopLossDb: 40 }, "stopHz"],
    [{ passHz: 1, passLossDb: 1, stopHz: 1, stopLossDb: 40 }, "stopHz"],
    [{ passHz: 1, passLossDb: 0, stopHz: 2, stopLossDb: 40 }, "passLossDb"],
    [{ passHz: 1, passLossDb: 3, stopHz: 2, stopLossDb: 3 }, "stopLossDb"],
    [{ passHz: 1, passLossDb: 3, stopHz: 2, stopLossDb: 1000 }, "stopLossDb"],
  ])("%o makes no sense because of %s", (requirement, about) => {
    expect(requirementProblem(requirement)?.about).toBe(about);
  });
});

/** With one order less, still right on the pass edge, the stop edge is missed. */
function expectOneLessToFail(spec: FilterSpec, requirement: Requirement): void {
  if (spec.order === 1) return;
  const order = spec.order - 1;
  const { passHz, passLossDb, stopHz, stopLossDb } = requirement;
  if (spec.family === "elliptic") {
    // Where the next lower order reaches its stop loss: beyond the stop edge, found on the response itself.
    const less = { ...spec, order };
    expect(lossDb(less, stopHz)).toBeLessThan(stopLossDb);
    return;
  }
  // Scaled so that the loss at the pass edge is the one allowed, by bisection on the response.
  let [low, high] = [passHz / 100, passHz * 100];
  for (let k = 0; k < 200; k++) {
    const cornerHz = Math.sqrt(low * high);
    if (lossDb({ ...spec, order, cornerHz }, passHz) > passLossDb) low = cornerHz;
    else high = cornerHz;
  }
  expect(lossDb({ ...spec, order, cornerHz: high }, stopHz)).toBeLessThan(stopLossDb + 1e-9);
}

describe("compareFamilies(requirement)", () => {
  it("sets the families side by side with figures from closed forms", () => {
    const answers = compareFamilies({ passHz: 1e3, passLossDb: 3.0103, stopHz: 1e4, stopLossDb: 39 });
    const butterworth = answers.find(({ family }) => family === "butterworth")?.figures;
    if (!butterworth?.ok) throw new Error("no Butterworth");
    // Order 2: Q = 1/√2; overshoot exp(−π) = 4.3214 %; loss at ten corners 10·log10(1 + 10^4).
    expect(butterworth.value.spec.order).toBe(2);
    expect(butterworth.value.highestQ).toBeCloseTo(Math.SQRT1_2, 9);
    expect(butterworth.value.overshootPercent).toBeCloseTo(100 * Math.exp(-Math.PI), 6);
    expect(butterworth.value.lossAtStopDb).toBeCloseTo(10 * Math.log10(1 + 1e4), 3);
    expect(butterworth.value.rippleDb).toBeCloseTo(3.0103, 3);
    const bessel = answers.find(({ family }) => family === "bessel")?.figures;
    if (!bessel?.ok) throw new Error("no Bessel");
    expect(bessel.value.overshootPercent).toBeLessThan(1);
    expect(bessel.value.delayVariationS).toBeLessThan(butterworth.value.delayVariationS);
  });
});

const BIN: PartsBin = { resistors: "E96", capacitors: "E12", resistanceOhm: 10_000 };

describe("realise(spec, requirement, circuit, bin)", () => {
  it.each(["sallen-key", "mfb", "ladder"] as const)(
    "%s: for 100 random requirements only series values, and within 0.5 dB of the ideal up to the stop edge",
    (circuit) => {
      const random = generator(4711);
      let count = 0;
      for (let k = 0; k < 100; k++) {
        const requirement = requirementFrom(random);
        for (const family of ["butterworth", "chebyshev", "bessel"] as const) {
          const spec = leastDesign(family, requirement);
          if (!spec.ok) continue;
          const figures = highestQ(spec.value);
          if (figures > 5) continue;
          const bin = circuit === "ladder" ? { ...BIN, resistanceOhm: 50 } : BIN;
          const made = realise(spec.value, requirement, circuit, bin);
          if (!made.ok) throw new Error(made.problem.found);
          count += 1;
          for (const stage of made.value.stages) expectSeriesValues(stage.values, circuit);
          const departure = departureDb(spec.value, made.value, requirement);
          expect(departure).toBeLessThanOrEqual(0.5);
          expect(Math.abs(departure - made.value.stopErrorDb)).toBeLessThan(0.1);
        }
      }
      expect(count).toBeGreaterThan(80);
    },
    120_000,
  );

  it("allows for the op amp's gain-bandwidth product", () => {
    const requirement = { passHz: 1e4, passLossDb: 0.5, stopHz: 5e4, stopLossDb: 50 };
    const spec = designed("chebyshev", requirement);
    const made = realise(spec, requirement, "sallen-key", { ...BIN, gbwHz: 3e6 });
    if (!made.ok) throw new Error(made.problem.found);
    expect(departureDb(spec, made.value, requirement)).toBeLessThan(0.3);
    // The same parts with ideal op amps are further off: what was allowed for is there.
    const ideal = made.value.stages.map(({ values: { gbw: _, bandwidth: __, ...values }, ...stage }) => ({
      ...stage,
      values,
    }));
    const apart = departureDb(spec, { ...made.value, stages: ideal }, requirement);
    expect(apart).toBeGreaterThan(departureDb(spec, made.value, requirement));
    const slow = realise(spec, requirement, "sallen-key", { ...BIN, gbwHz: 3e5 });
    expect(slow.ok && slow.value.warnings.join(" ")).toContain("gain-bandwidth");
  });

  it("refuses families whose nulls the sections do not have", () => {
    const requirement = { passHz: 1e3, passLossDb: 0.5, stopHz: 3e3, stopLossDb: 50 };
    for (const circuit of ["sallen-key", "mfb", "ladder"] as const) {
      const made = realise(designed("elliptic", requirement), requirement, circuit, BIN);
      expect(made.ok).toBe(false);
    }
  });
});

function highestQ(spec: FilterSpec): number {
  // Q of the sharpest pair, by the angle of the pole: Butterworth 1/(2·sin(π/2n)), Matthaei et al. (1964).
  if (spec.family === "butterworth") return 1 / (2 * Math.sin(Math.PI / (2 * spec.order)));
  if (spec.family === "bessel") return 1;
  const a = Math.asinh(1 / Math.sqrt(10 ** ((spec.rippleDb as number) / 10) - 1)) / spec.order;
  const [re, im] = [
    Math.sinh(a) * Math.sin(Math.PI / (2 * spec.order)),
    Math.cosh(a) * Math.cos(Math.PI / (2 * spec.order)),
  ];
  return Math.hypot(re, im) / (2 * re);
}

function expectSeriesValues(values: Readonly<Record<string, number>>, circuit: string): void {
  for (const [name, value] of Object.entries(values)) {
    if (name === "gain") continue;
    const series = circuit === "ladder" || name.startsWith("R") ? "E96" : "E12";
    expect(value / (nearestInSeries(value, series) as number)).toBeCloseTo(1, 12);
  }
}

/** Greatest departure in dB on a grid of its own, level apart for a ladder, which divides the voltage. */
function departureDb(
  spec: FilterSpec,
  made: {
    readonly stages: readonly Parameters<typeof realisedStage>[0][];
    readonly sourceOhm?: number;
    readonly loadOhm?: number;
  },
  { passHz, stopHz }: Requirement,
): number {
  const ends =
    made.sourceOhm === undefined ? {} : { source: { R: made.sourceOhm }, load: { R: made.loadOhm } };
  const real = chainOf(made.stages.map(realisedStage), ends);
  const ideal = chainOf([filterStage(spec)]);
  const at = (freqHz: number) => readAt(real, freqHz).gainDb - readAt(ideal, freqHz).gainDb;
  const level = made.sourceOhm === undefined ? 0 : at(passHz / 10);
  let worst = 0;
  for (let k = 0; k <= 97; k++) {
    const freqHz = (passHz / 10) * ((10 * stopHz) / passHz) ** (k / 97);
    worst = Math.max(worst, Math.abs(at(freqHz) - level));
  }
  return worst;
}
