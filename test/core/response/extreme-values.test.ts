import { describe, expect, it } from "vitest";
import type { Chain } from "../../../src/core/chain.ts";
import { makeChain } from "../../../src/core/chain.ts";
import { levelDb } from "../../../src/core/dual.ts";
import { compile } from "../../../src/core/formula/evaluate.ts";
import { readings } from "../../../src/core/readings.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { Sampler } from "../../../src/core/response/sampled.ts";
import { buildStage } from "../../../src/core/stages/build.ts";
import { stageCases, surroundings } from "../../helpers/netlist-cases.ts";
import { engineChain } from "../../helpers/netlist-engine.ts";
import { type FileStage, readNodes } from "../../helpers/netlists.ts";
import { expectClose } from "../../helpers/nodal-close.ts";
import { gainDb } from "../../helpers/nodal-complex.ts";
import { closedForms } from "../stages/closed-forms.ts";

// Far from all its corners a circuit of lumped parts falls or rises by a whole multiple of 20 dB per decade, its phase
// is the same multiple of 90°, or half a turn from it (Bode, Network Analysis and Feedback Amplifier Design, 1945).
// So a nodal analysis many decades beyond the last corner tells the gain at the ends of a double.
const outer = [
  { nodalHz: 1e15, farHz: [1e100, 1e200, 1e300] },
  { nodalHz: 1e-8, farHz: [1e-100, 1e-200, 1e-300] },
];
const sweep = { fromHz: 1, toHz: 1e6, perDecade: 1 };
// Of order 30 the nodal analysis itself leaves the range of a double; far-out.test.ts has one.
const lumped = stageCases.filter(({ kind, parts }) => kind !== "line" && parts.order !== 30);

describe.each(lumped.map((stage) => [stage.kind, JSON.stringify(stage.parts), stage] as const))(
  "%s %s",
  (_kind, _parts, stage) => {
    it.each(outer)("beyond $nodalHz Hz follows its asymptote", ({ nodalHz, farHz }) => {
      for (const around of surroundings) expectAsymptote({ ...around, stages: [stage] }, nodalHz, farHz);
    });
  },
);

function expectAsymptote(
  chain: Parameters<typeof readNodes>[0],
  nodalHz: number,
  farHz: readonly number[],
): void {
  const nodalDb = (freqHz: number) => gainDb(readNodes(chain, freqHz).nodes.at(-1)!.voltage);
  const slope = 20 * Math.round((nodalDb(nodalHz * Math.sqrt(10)) - nodalDb(nodalHz / Math.sqrt(10))) / 20);
  for (const freqHz of farHz) {
    const { gainDb: db, phaseDeg, slopeDbPerDecade } = readAt(engineChain(chain, "emf"), freqHz);
    const expectedDb = nodalDb(nodalHz) + slope * Math.log10(freqHz / nodalHz);
    expectClose(db, expectedDb, 1e-6, `gain in dB at ${freqHz} Hz`);
    expectClose(slopeDbPerDecade, slope, 1e-9, `slope at ${freqHz} Hz`);
    const turns = (phaseDeg - (90 * slope) / 20) / 180;
    expectClose(turns, Math.round(turns), 1e-9, `half turns from the asymptote's phase at ${freqHz} Hz`);
  }
}

describe("every kind, also beyond anything that is built", () => {
  const freqsHz = [5e-324, 1e-308, 1e-200, 1e-100, 1e100, 1e200, 1e307, Number.MAX_VALUE];
  const factors = [1e-300, 1e-150, 1e150, 1e300];

  /** The parts that are sizes of real things, all larger or smaller by one factor. */
  const stretched = ({ kind, parts }: FileStage, factor: number): FileStage => ({
    kind,
    parts: Object.fromEntries(
      Object.entries(parts).map(([name, value]) => [
        name,
        typeof value === "number" && /^([RLC]\w?|f0|gbw)$/.test(name) ? value * factor : value,
      ]),
    ),
  });
  const circuits = stageCases.flatMap((stage) => factors.map((factor) => stretched(stage, factor)));

  it.each(
    [...stageCases, ...circuits].map((stage) => [stage.kind, JSON.stringify(stage.parts), stage] as const),
  )("%s %s has a value or none, and no number that is none", (_kind, _parts, stage) => {
    for (const around of surroundings) expectValues(engineChain({ ...around, stages: [stage] }, "emf"));
  });

  it.each(closedForms.map(({ kind, parts }) => [kind, parts] as const))(
    "%s has a value or none, and no number that is none",
    (kind, parts) => expectValues(makeChain({ stages: [buildStage(kind, parts)] })),
  );

  function expectValues(chain: Chain): void {
    for (const freqHz of freqsHz) {
      // Phase is counted from the frequency itself: the walk there from afar has its tests elsewhere.
      const found = readings(chain, { ...sweep, fromHz: freqHz }, [freqHz]);
      expect(found.readings.length + found.withoutValueHz.length).toBe(1);
      for (const { shares, ...reading } of found.readings) {
        const numbers = [...Object.values(reading), ...shares!.map((share) => share.gainDb)];
        expect(numbers.filter((number) => number !== null && !Number.isFinite(number))).toEqual([]);
        // Where there is no gain in dB nothing comes out at all.
        expect(reading.ratio === 0).toBe(reading.gainDb === null);
      }
    }
  }
});

describe("a delay, a line and what is sampled", () => {
  // A frequency is known to 53 bits; beyond some 1e10 radians of turning nothing is left of them for the phase.
  const turning = [
    ...closedForms.filter(({ kind }) =>
      ["delay", "hold", "moving-average", "sinc-decimator", "biquad"].includes(kind),
    ),
    ...stageCases.filter(({ kind }) => kind === "line"),
  ];

  it.each(turning.map(({ kind, parts }) => [kind, JSON.stringify(parts), parts] as const))(
    "%s %s has no value where rounding alone would make one",
    (kind, _, parts) => {
      const chain = makeChain({ stages: [buildStage(kind, parts)] });
      const farHz = [1e30, 1e100, 1e300];
      expect(readings(chain, sweep, farHz)).toEqual({ readings: [], withoutValueHz: farHz });
      expect([...new Sampler(Float64Array.from(farHz)).response(chain).gainDb]).toEqual([NaN, NaN, NaN]);
    },
  );

  it("a formula neither: exp(−s·T), sinh and cosh of s·T", () => {
    for (const name of ["exp", "sinh", "cosh"] as const) {
      const at = compile({ op: "call", name, of: { op: "s" } }, {});
      expect(levelDb(at(1e9))).not.toBeNaN();
      expect(levelDb(at(1e30))).toBeNaN();
    }
  });
});
