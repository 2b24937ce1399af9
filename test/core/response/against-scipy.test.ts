import { describe, expect, it } from "vitest";
import { type Chain, makeChain } from "../../../src/core/chain.ts";
import type { FilterSpec } from "../../../src/core/filters/transform.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { unwrappedAt } from "../../../src/core/response/phase.ts";
import { Sampler } from "../../../src/core/response/sampled.ts";
import { buildStage } from "../../../src/core/stages/build.ts";
import type { PartValues } from "../../../src/core/stages/kind.ts";
import { expectAngle, expectClose } from "../../helpers/nodal-close.ts";
import { goldenFilters, goldenSpecs } from "../filters/golden-filters.ts";

// golden-scipy.json: gain within 1e-7 dB, below −120 dB within 1e-6 dB (the file allows 1e-5 there), phase within 1e-7°,
// group delay within 1e-9 of its largest value.
const toleranceDb = (expectedDb: number): number => (expectedDb < -120 ? 1e-6 : 1e-7);
const toleranceDeg = 1e-7;

const given = (values: Readonly<Record<string, PartValues[string] | undefined>>): PartValues =>
  Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as PartValues;

function filterChain({ shape, family, order, rippleDb, stopDb, cornerHz, lowHz, highHz }: FilterSpec): Chain {
  const parts = given({
    shape,
    family,
    order,
    ripple: rippleDb,
    stop: stopDb,
    corner: cornerHz,
    low: lowHz,
    high: highHz,
  });
  return makeChain({ stages: [buildStage("filter", parts)] });
}

describe.each(goldenFilters.map((row) => [row.call, row] as const))("a filter stage as %s", (_, row) => {
  const chain = filterChain(goldenSpecs[row.id]);
  const freqsHz = Float64Array.from(row.f_hz);

  it("reads gain, phase and group delay", () => {
    const longest = Math.max(...row.group_delay_s.map(Math.abs));
    for (const [k, freqHz] of freqsHz.entries()) {
      const reading = readAt(chain, freqHz);
      expectClose(reading.gainDb, row.gain_db[k], toleranceDb(row.gain_db[k]), `gain at ${freqHz} Hz`);
      expectAngle(reading.phaseDeg, row.phase_deg_unwrapped[k], toleranceDeg, `phase at ${freqHz} Hz`);
      expectClose(reading.groupDelayS, row.group_delay_s[k], 1e-9 * longest, `delay at ${freqHz} Hz`);
    }
  });

  it("samples gain and phase", () => {
    const { gainDb, phaseDeg } = new Sampler(freqsHz).response(chain);
    for (const [k, freqHz] of freqsHz.entries()) {
      expectClose(gainDb[k], row.gain_db[k], toleranceDb(row.gain_db[k]), `gain at ${freqHz} Hz`);
      expectAngle(phaseDeg[k], row.phase_deg_unwrapped[k], toleranceDeg, `phase at ${freqHz} Hz`);
    }
  });

  // SciPy unwraps along its own few frequencies and does not know on which side of a null a step lies: whole turns are
  // compared only where no step of its own exceeds half a turn.
  it("follows the phase along the sweep", () => {
    const sweep = { fromHz: row.f_hz[0], toHz: row.f_hz[row.f_hz.length - 1], perDecade: 50 };
    const phases = unwrappedAt(chain, sweep, row.f_hz);
    const steps = row.phase_deg_unwrapped.map(
      (phase, k) => phase - (row.phase_deg_unwrapped[k - 1] ?? phase),
    );
    const followed = steps.findIndex((step) => Math.abs(step) > 120);
    const count = followed < 0 ? steps.length : followed;
    expect(count).toBeGreaterThan(5);
    for (let k = 1; k < count; k++) {
      const turned = row.phase_deg_unwrapped[k] - row.phase_deg_unwrapped[0];
      expectClose(phases[k] - phases[0], turned, 1e-6, `phase since the start at ${row.f_hz[k]} Hz`);
    }
  });
});

it("reaches 200 dB down", () => {
  expect(Math.min(...goldenFilters.flatMap(({ gain_db }) => gain_db))).toBeLessThan(-200);
});
