import { describe, expect, it } from "vitest";
import { type Chain, makeChain } from "../../src/core/chain.ts";
import { branchImpedance } from "../../src/core/elements/branch.ts";
import { readAt } from "../../src/core/response/exact.ts";
import { crossings, extremes, gainPoints } from "../../src/core/response/features.ts";
import { phaseCrossings } from "../../src/core/response/phase-crossings.ts";
import { chainRoots } from "../../src/core/roots/groups.ts";
import { buildStage } from "../../src/core/stages/build.ts";
import type { PartValues } from "../../src/core/stages/kind.ts";
import { expectAngle, expectClose } from "../helpers/nodal-close.ts";
import facts from "../reference/first-order-facts.json" with { type: "json" };

// first-order-facts.json: closed forms of linear circuit theory. Its tolerance is 1e-9 in dB and degrees, which is its
// last digit, and 1e-10 relative.
const absolute = 1e-9;
const relative = 1e-10;

type Row = Readonly<Record<string, number>>;
const rowsOf = (name: string) => facts.rows.filter((row) => row.name === name) as unknown as readonly Row[];
const factOf = (name: string): number => rowsOf(name)[0].value;

const R = 1000;
const C = 100e-9;
const cornerHz = 1 / (2 * Math.PI * R * C);
const halfPowerDb = factOf("gain_at_corner");

type Stage = readonly [kind: string, values: PartValues];
const chainOf = (stages: readonly Stage[], rest: Partial<Chain> = {}): Chain => ({
  ...makeChain({ stages: stages.map(([kind, values]) => buildStage(kind, values)) }),
  ...rest,
});
const repeated = (stage: Stage, count: number): Chain => chainOf(Array<Stage>(count).fill(stage));
const rc: Stage = ["rc-lowpass", { R, C }];
const cr: Stage = ["rc-highpass", { R, C }];

const crossingsOf = (chain: Chain, levelDb = halfPowerDb): readonly number[] =>
  crossings(chain, gainPoints(chain, cornerHz * 1e-5, cornerHz * 1e5), levelDb);

function expectRelative(actual: number, expected: number, what: string): void {
  expectClose(actual, expected, relative * Math.abs(expected), what);
}

function expectPoint(chain: Chain, freqHz: number, gainDb: number, phaseDeg: number): void {
  const reading = readAt(chain, freqHz);
  expectClose(reading.gainDb, gainDb, absolute, `gain in dB at ${freqHz} Hz`);
  expectAngle(reading.phaseDeg, phaseDeg, absolute, `phase at ${freqHz} Hz`);
}

describe("a single pole", () => {
  it.each(rowsOf("single_pole_low_pass"))("at $x_over_corner times its corner", (row) => {
    const freqHz = row.x_over_corner * cornerHz;
    for (const chain of [chainOf([rc]), chainOf([["lowpass-1", { f0: cornerHz }]])])
      expectPoint(chain, freqHz, row.gain_db, row.phase_deg);
    for (const chain of [chainOf([cr]), chainOf([["highpass-1", { f0: cornerHz }]])])
      expectPoint(chain, freqHz, row.high_pass_gain_db, row.high_pass_phase_deg);
  });

  it.each(rowsOf("identical_buffered_poles_f3db_over_single_corner"))(
    "$n of them, buffered",
    ({ n, value }) => {
      const [freqHz] = crossingsOf(repeated(["lowpass-1", { f0: cornerHz }], n));
      expectRelative(freqHz / cornerHz, value, "half-power frequency over the corner");
    },
  );

  it.each(rowsOf("loaded_first_order_corners"))("between $Rs and $RL ohm", (row) => {
    const between = (kind: "series" | "shunt", parts: PartValues) =>
      chainOf([[kind, parts]], {
        sourceImpedance: branchImpedance({ R: row.Rs, joined: "series" }),
        loadImpedance: branchImpedance({ R: row.RL, joined: "parallel" }),
      });
    const corners: readonly (readonly [Chain, number, number])[] = [
      [between("shunt", { C: row.C }), row.shunt_C_low_pass_fc, 1e-6],
      [between("series", { C: row.C }), row.series_C_high_pass_fc, 1e6],
      [between("series", { L: row.L }), row.series_L_low_pass_fc, 1e-6],
      [between("shunt", { L: row.L }), row.shunt_L_high_pass_fc, 1e6],
    ];
    for (const [chain, expected, passes] of corners) {
      expectClose(
        readAt(chain, expected * passes).gainDb,
        row.midband_gain_db,
        absolute,
        "gain in the pass band",
      );
      const midband = 20 * Math.log10(row.RL / (row.Rs + row.RL));
      const points = gainPoints(chain, expected / 1e3, expected * 1e3);
      const found = crossings(chain, points, midband - 10 * Math.log10(2));
      expect(found).toHaveLength(1);
      expectRelative(found[0], expected, "corner");
    }
  });
});

interface LadderRow {
  readonly n: number;
  readonly poles_in_units_of_1_over_RC: readonly number[];
  readonly f3db_times_2piRC_low_pass: number;
  readonly f3db_times_2piRC_high_pass: number;
  readonly samples_low_pass: readonly {
    readonly x: number;
    readonly gain_db: number;
    readonly phase_deg: number;
  }[];
}

describe("equal RC sections that load each other", () => {
  const rows = rowsOf("unbuffered_equal_rc_ladder") as unknown as readonly LadderRow[];

  it.each(rows)("$n of them", (row) => {
    const lowpass = repeated(rc, row.n);
    for (const { x, gain_db, phase_deg } of row.samples_low_pass)
      expectPoint(lowpass, x * cornerHz, gain_db, phase_deg);
    expectRelative(crossingsOf(lowpass)[0] / cornerHz, row.f3db_times_2piRC_low_pass, "low-pass");
    expectRelative(
      crossingsOf(repeated(cr, row.n))[0] / cornerHz,
      row.f3db_times_2piRC_high_pass,
      "high-pass",
    );
    expectPoles(lowpass, row.poles_in_units_of_1_over_RC);
  });

  it("two of them: half power and poles in closed form", () => {
    const two = repeated(rc, 2);
    expectRelative(
      crossingsOf(two)[0] / cornerHz,
      factOf("two_unbuffered_rc_f3db_closed_form"),
      "half power",
    );
    expectPoles(two, [factOf("two_unbuffered_rc_pole_slow"), factOf("two_unbuffered_rc_pole_fast")]);
  });

  function expectPoles(chain: Chain, expected: readonly number[]): void {
    const poles = chainRoots(chain, 1 / (R * C)).poles.map(({ re, im }) => {
      expect(im).toBe(0);
      return re * R * C;
    });
    expect(poles).toHaveLength(expected.length);
    poles.sort((a, b) => b - a);
    for (const [k, pole] of poles.entries()) expectRelative(pole, expected[k], `pole ${k}`);
  }
});

describe("chains that turn the phase by half a turn", () => {
  it.each([
    ["phase_shift_ladder_high_pass_f180_times_2piRC", repeated(cr, 3)],
    ["phase_shift_ladder_low_pass_f180_times_2piRC", repeated(rc, 3)],
    ["phase_shift_three_buffered_f180_times_2piRC", repeated(["lowpass-1", { f0: cornerHz }], 3)],
    ["phase_shift_four_section_low_pass_f180_times_2piRC", repeated(rc, 4)],
  ])("%s", (name, chain) => {
    const [row] = rowsOf(name);
    const found = phaseCrossings(chain, cornerHz / 100, cornerHz * 100, 180);
    expect(found).toHaveLength(1);
    expectRelative(found[0] / cornerHz, row.value, "frequency times 2πRC");
    const { gainDb } = readAt(chain, found[0]);
    expectClose(gainDb, row.gain_db, absolute, "gain in dB there");
    expectRelative(10 ** (-gainDb / 20), row.attenuation, "attenuation there as a ratio");
  });

  it("and one that turns it back to none: series and parallel RC", () => {
    const wien = chainOf([
      ["series", { R, C, joined: "series" }],
      ["shunt", { R, C, joined: "parallel" }],
    ]);
    const [row] = rowsOf("wien_gain_at_centre");
    const [freqHz] = phaseCrossings(wien, cornerHz / 100, cornerHz * 100, row.phase_deg);
    expectRelative(freqHz / cornerHz, 1, "centre");
    expectRelative(readAt(wien, freqHz).ratio, row.value, "ratio at the centre");
    const [lower, upper] = crossingsOf(wien, 20 * Math.log10(1 / 3) - 10 * Math.log10(2));
    expectRelative(cornerHz / (upper - lower), row.q, "Q by its half-power points");
  });
});

describe("a balanced twin-T, unloaded", () => {
  const twinT = chainOf([["twin-t", { R1: R, R2: R, R3: R / 2, C1: C, C2: C, C3: 2 * C }]]);

  it.each(rowsOf("twin_t_unloaded"))("at $x of its notch", ({ x, gain_db, phase_deg }) => {
    expectPoint(twinT, x * cornerHz, gain_db, phase_deg);
  });

  it("has its half-power points and its Q", () => {
    const [lower, upper] = crossingsOf(twinT);
    expectRelative(lower / cornerHz, factOf("twin_t_lower_3db_over_notch"), "lower half power");
    expectRelative(upper / cornerHz, factOf("twin_t_upper_3db_over_notch"), "upper half power");
    expectRelative(cornerHz / (upper - lower), factOf("twin_t_q"), "Q");
  });
});

describe("second-order sections", () => {
  it.each(rowsOf("second_order_low_pass"))("a low-pass of Q $q", (row) => {
    const chain = chainOf([["lowpass-2", { f0: cornerHz, Q: row.q }]]);
    expectPoint(chain, cornerHz, row.gain_at_f0_db, row.phase_at_f0_deg);
    const found = crossingsOf(chain);
    expectRelative(found[found.length - 1] / cornerHz, row.f3db_over_f0, "half power over f0");
    const peaks = extremes(chain, gainPoints(chain, cornerHz / 100, cornerHz * 100));
    expect(peaks).toHaveLength("peak_gain_db" in row ? 1 : 0);
    if (peaks.length === 0) return;
    expectRelative(peaks[0].freqHz / cornerHz, row.peak_frequency_over_f0, "peak over f0");
    expectClose(peaks[0].gainDb, row.peak_gain_db, absolute, "gain at the peak");
  });

  it.each(rowsOf("second_order_band_pass_edges"))("a band-pass of Q $q at $f0 Hz", (row) => {
    const chain = chainOf([["bandpass-2", { f0: row.f0, Q: row.q }]]);
    const [lower, upper] = crossingsOf(chain);
    expectRelative(lower, row.lower_3db, "lower edge");
    expectRelative(upper, row.upper_3db, "upper edge");
  });
});

it("has every row of the file that is about frequency", () => {
  // Step response and noise bandwidth: what is computed there has tests of its own.
  const other = /^(rise_time|step_at|settling_to|enbw_|identical_buffered_poles_enbw)/;
  const names = new Set(facts.rows.map(({ name }) => name).filter((name) => !other.test(name)));
  expect([...names].sort()).toEqual([
    "gain_at_corner",
    "identical_buffered_poles_f3db_over_single_corner",
    "loaded_first_order_corners",
    "phase_shift_four_section_low_pass_f180_times_2piRC",
    "phase_shift_ladder_high_pass_f180_times_2piRC",
    "phase_shift_ladder_low_pass_f180_times_2piRC",
    "phase_shift_three_buffered_f180_times_2piRC",
    "second_order_band_pass_edges",
    "second_order_low_pass",
    "single_pole_low_pass",
    "twin_t_lower_3db_over_notch",
    "twin_t_q",
    "twin_t_unloaded",
    "twin_t_upper_3db_over_notch",
    "two_unbuffered_rc_f3db_closed_form",
    "two_unbuffered_rc_pole_fast",
    "two_unbuffered_rc_pole_slow",
    "unbuffered_equal_rc_ladder",
    "wien_gain_at_centre",
  ]);
});
