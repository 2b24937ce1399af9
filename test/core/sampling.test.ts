import { describe, expect, it } from "vitest";
import { type Chain, makeChain } from "../../src/core/chain.ts";
import { foldHz } from "../../src/core/fold.ts";
import { checkFolding } from "../../src/core/limits/folding.ts";
import { readAt } from "../../src/core/response/exact.ts";
import { crossings, gainPoints } from "../../src/core/response/features.ts";
import { Sampler } from "../../src/core/response/sampled.ts";
import { buildStage } from "../../src/core/stages/build.ts";
import type { PartValues } from "../../src/core/stages/kind.ts";
import { expectAngle, expectClose } from "../helpers/nodal-close.ts";
import sampling from "../reference/sampling.json" with { type: "json" };

// sampling.json: closed forms (Shannon; Oppenheim and Schafer; Hogenauer 1981). Its tolerance: 1e-8 in dB and degrees,
// frequencies 1e-9 relative.
const absolute = 1e-8;
const relative = 1e-9;
const halfPowerDb = 10 * Math.log10(1 / 2);

type Row = Readonly<Record<string, number>>;
const rowsOf = (name: string) =>
  sampling.rows.filter((row) => row.name === name) as unknown as readonly Row[];

const rate = 48_000;
const chainOf = (kind: string, values: PartValues): Chain =>
  makeChain({ stages: [buildStage(kind, values)] });

/** The exact reading, with which the sampled response must agree. */
function readBoth(chain: Chain, freqHz: number) {
  const reading = readAt(chain, freqHz);
  const { gainDb, phaseDeg } = new Sampler(Float64Array.of(freqHz)).response(chain);
  expectClose(gainDb[0], reading.gainDb, absolute, `sampled gain at ${freqHz} Hz`);
  expectAngle(phaseDeg[0], reading.phaseDeg, absolute, `sampled phase at ${freqHz} Hz`);
  return reading;
}

describe("a hold", () => {
  const hold = chainOf("hold", { rate });

  it.each(rowsOf("zero_order_hold"))("at $f_over_fs of its rate", (row) => {
    const reading = readBoth(hold, row.f_over_fs * rate);
    expectClose(reading.gainDb, row.gain_db, absolute, "gain in dB");
    expectAngle(reading.phaseDeg, row.phase_deg_wrapped, absolute, "phase");
    expectClose(reading.groupDelayS * rate, row.delay_over_T, relative, "delay in samples");
  });

  // Straight lines between the samples: two holds in a row, but for a sample of delay.
  it.each(rowsOf("zero_order_hold"))("twice at $f_over_fs of its rate", (row) => {
    const twice = makeChain({ stages: [buildStage("hold", { rate }), buildStage("hold", { rate })] });
    const { gainDb } = readBoth(twice, row.f_over_fs * rate);
    expectClose(gainDb, row.first_order_interpolator_db, absolute, "gain in dB");
  });

  // Held for half the time: the hold of twice the rate, of half its strength.
  it.each(rowsOf("return_to_zero_half_hold"))("for half the time at $f_over_fs of the rate", (row) => {
    const { gainDb } = readBoth(chainOf("hold", { rate: 2 * rate }), row.f_over_fs * rate);
    expectClose(gainDb, row.gain_db_re_own_dc, absolute, "gain in dB");
    expectClose(gainDb - 20 * Math.log10(2), row.gain_db_re_full_hold_dc, absolute, "against a full hold");
  });

  it.each([
    ...rowsOf("zero_order_hold_3db_point").map((row) => row.f_over_fs),
    ...rowsOf("aperture_half_power_product").map((row) => row.f3db_times_aperture),
  ])("has half power at %d of its rate", (expected) => {
    const [freqHz] = crossings(hold, gainPoints(hold, rate / 100, rate), halfPowerDb);
    expectClose(freqHz / rate, expected, relative * expected, "half-power point");
  });

  it.each(rowsOf("averaging_aperture"))("is what an aperture of $aperture_s s does at $f_hz Hz", (row) => {
    const { gainDb } = readBoth(chainOf("hold", { rate: 1 / row.aperture_s }), row.f_hz);
    expectClose(gainDb, row.gain_db, absolute, "gain in dB");
  });
});

describe("a mean of samples", () => {
  it.each(rowsOf("moving_average"))("of $m at $f_over_fs of the rate", (row) => {
    const reading = readBoth(chainOf("moving-average", { length: row.m, rate }), row.f_over_fs * rate);
    expectClose(reading.gainDb, row.gain_db, absolute, "gain in dB");
    expectAngle(reading.phaseDeg, row.phase_deg_wrapped, absolute, "phase");
    expectClose(reading.groupDelayS * rate, row.delay_samples, relative * row.m, "delay in samples");
  });

  // The same by its defining sum, as digital sections: (1 + z⁻¹ + z⁻²)/3 is the mean of three.
  it.each(rowsOf("moving_average").filter(({ m }) => m === 3))("of 3 as a biquad at $f_over_fs", (row) => {
    const third = 1 / 3;
    const biquad = chainOf("biquad", { b0: third, b1: third, b2: third, a1: 0, a2: 0, rate });
    const reading = readBoth(biquad, row.f_over_fs * rate);
    expectClose(reading.gainDb, row.gain_db, absolute, "gain in dB");
    expectAngle(reading.phaseDeg, row.phase_deg_wrapped, absolute, "phase");
    expectClose(reading.groupDelayS * rate, row.delay_samples, relative * row.m, "delay in samples");
  });
});

describe("a decimator", () => {
  const decimator = ({ n, m }: Row): Chain =>
    chainOf("sinc-decimator", { order: n, ratio: m, rate: m * rate });

  it.each(rowsOf("sinc_n_decimator"))("of order $n and ratio $m at $f_over_output_rate", (row) => {
    const { gainDb } = readBoth(decimator(row), row.f_over_output_rate * rate);
    expectClose(gainDb, row.gain_db, absolute, "gain in dB");
  });

  it.each(rowsOf("sinc_n_decimator"))(
    "of order $n and ratio $m lets fold onto $f_over_output_rate",
    (row) => {
      const chain = decimator(row);
      const landing = (multiple: number, sign: number) => (multiple + sign * row.f_over_output_rate) * rate;
      const images = Array.from({ length: row.m / 2 }, (_, k) => [
        landing(k + 1, -1),
        landing(k + 1, 1),
      ]).flat();
      const worst = Math.max(...images.map((freqHz) => readBoth(chain, freqHz).gainDb));
      expectClose(worst, row.worst_alias_into_f_db, absolute, "greatest gain of an image in dB");
      for (const freqHz of images) {
        const folded = foldHz(freqHz, rate);
        const expected = foldHz(row.f_over_output_rate * rate, rate);
        expectClose(folded, expected, relative * rate, `where ${freqHz} Hz folds to`);
      }
    },
  );
});

describe("folding", () => {
  it.each(rowsOf("alias_fold"))("$f_in_hz Hz at $fs_hz samples/s", ({ f_in_hz, fs_hz, f_out_hz }) => {
    expectClose(foldHz(f_in_hz, fs_hz), f_out_hz, relative * f_in_hz, "where it lands");
  });

  it.each(rowsOf("butterworth_anti_alias"))("behind a filter of order $n at $fs_hz samples/s", (row) => {
    const chain = chainOf("filter", {
      shape: "lowpass",
      family: "butterworth",
      order: row.n,
      corner: row.f3db_hz,
    });
    const aliasHz = row.fs_hz - row.f3db_hz;
    expectClose(foldHz(aliasHz, row.fs_hz), row.f3db_hz, relative * aliasHz, "where the lowest alias lands");
    const expected = row.attenuation_of_lowest_alias_onto_f3db_db;
    expectClose(-readBoth(chain, aliasHz).gainDb, expected, absolute, "its attenuation in dB");
    const folding = checkFolding(
      chain,
      { rateHz: row.fs_hz, bandHz: row.f3db_hz, neededDb: 0, referenceHz: row.f3db_hz * 1e-6 },
      row.fs_hz,
    );
    expectClose(
      folding.worstFreqHz,
      aliasHz,
      relative * aliasHz,
      "the worst of all that folds into the band",
    );
    expectClose(folding.attenuationDb, expected, absolute, "and its attenuation in dB");
  });
});

it("has every row of the file", () => {
  expect([...new Set(sampling.rows.map(({ name }) => name))]).toEqual([
    "zero_order_hold",
    "return_to_zero_half_hold",
    "moving_average",
    "sinc_n_decimator",
    "alias_fold",
    "averaging_aperture",
    "zero_order_hold_3db_point",
    "aperture_half_power_product",
    "butterworth_anti_alias",
  ]);
});
