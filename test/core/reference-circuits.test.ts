import { describe, expect, it } from "vitest";
import { type Against, type Chain, makeChain } from "../../src/core/chain.ts";
import { branchImpedance } from "../../src/core/elements/branch.ts";
import { readAt } from "../../src/core/response/exact.ts";
import { chainRoots } from "../../src/core/roots/groups.ts";
import { buildStage } from "../../src/core/stages/build.ts";
import type { PartValues } from "../../src/core/stages/kind.ts";
import { expectAngle, expectClose, expectComplex } from "../helpers/nodal-close.ts";
import { type Complex, complex, magnitude, minus } from "../helpers/nodal-complex.ts";
import lines from "../reference/lines.json" with { type: "json" };
import opamp from "../reference/opamp.json" with { type: "json" };

// The engine itself against lines.json (1e-9 relative) and opamp.json (samples 1e-8 in dB and degrees; f0, Q and gain
// 1e-10 relative). Both are also what the tests' own network solver is held against, in nodal-*.test.ts.
const relative = 1e-9;
const lightSpeed = 299_792_458;

type Row = Readonly<Record<string, number>>;
const linesOf = (name: string) => lines.rows.filter((row) => row.name === name) as unknown as readonly Row[];

/** A branch of a resistance and a reactance in series at one frequency. */
function branchOf(re: number, im: number, freqHz: number) {
  const omega = 2 * Math.PI * freqHz;
  const reactance = im < 0 ? { C: -1 / (omega * im) } : im > 0 ? { L: im / omega } : {};
  return branchImpedance({ R: re, ...reactance, joined: "series" });
}

interface Around {
  readonly sourceOhm?: number;
  readonly load?: Chain["loadImpedance"];
  readonly against?: Against;
}

const chainOf = (kind: string, parts: PartValues, { sourceOhm = 0, load, against }: Around = {}): Chain =>
  makeChain({
    source: branchImpedance({ R: sourceOhm, joined: "series" }),
    stages: [buildStage(kind, parts)],
    load,
    against,
  });

/** A line of so many wavelengths at a frequency. */
const lineOf = (Z0: number, wavelengths: number, freqHz: number): PartValues => ({
  Z0,
  length: (wavelengths * 0.66 * lightSpeed) / freqHz,
  velocity: 0.66,
});

describe("a line stage", () => {
  const freqHz = 1e6;

  it.each(["terminated_line", "quarter_wave", "half_wave"].flatMap(linesOf))(
    "of $z0_ohm ohm and $length_wavelengths wavelengths transforms $zl_re + j $zl_im ohm",
    (row) => {
      const parts = lineOf(row.z0_ohm, row.length_wavelengths, freqHz);
      const chain = chainOf("line", parts, { load: branchOf(row.zl_re, row.zl_im, freqHz) });
      const expected = complex(row.zin_re, row.zin_im);
      const [seen] = readAt(chain, freqHz).impedanceOhm;
      expectComplex(seen, expected, relative * magnitude(expected), "input impedance");
    },
  );

  it.each(linesOf("quarter_wave_transformer_sweep").filter((row) => row.f_over_f0 > 0))(
    "is a quarter-wave transformer at $f_over_f0 of its frequency",
    (row) => {
      const chain = chainOf("line", lineOf(row.z1_ohm, 0.25, freqHz), { load: branchOf(100, 0, freqHz) });
      const expected = complex(row.zin_re, row.zin_im);
      const [seen] = readAt(chain, row.f_over_f0 * freqHz).impedanceOhm;
      expectComplex(seen, expected, relative * magnitude(expected), "input impedance");
    },
  );

  it.each(linesOf("lossless_stub"))("is a stub at $f_hz Hz, open and all but shorted", (row) => {
    const parts = { Z0: row.z0_ohm, length: row.length_m, velocity: row.velocity_m_s / lightSpeed };
    const reactance = (load: Around["load"]) =>
      readAt(chainOf("line", parts, { load }), row.f_hz).impedanceOhm[0].im;
    expectClose(
      reactance(undefined),
      row.open_reactance_ohm,
      relative * Math.abs(row.open_reactance_ohm),
      "open",
    );
    const shorted = reactance(branchOf(1e-12, 0, row.f_hz));
    expectClose(shorted, row.short_reactance_ohm, relative * Math.abs(row.short_reactance_ohm), "shorted");
  });

  it.each(linesOf("skin_effect_sqrt_scaling"))("loses $loss_db dB at $f_hz Hz", (row) => {
    const parts = { Z0: 50, length: 100, velocity: 0.66, loss: row.reference_db, lossAt: row.reference_f_hz };
    const chain = chainOf("line", parts, { sourceOhm: 50, load: branchOf(50, 0, 1), against: "insertion" });
    expectClose(-readAt(chain, row.f_hz).gainDb, row.loss_db, relative * row.loss_db, "loss in dB");
  });
});

describe("a pad", () => {
  it.each(linesOf("matched_pads"))("of $attenuation_db dB and $z_ohm ohm", (row) => {
    const parts = { loss: row.attenuation_db, Z0: row.z_ohm };
    const load = branchOf(row.z_ohm, 0, 1);
    const matched = readAt(chainOf("pad", parts, { sourceOhm: row.z_ohm, load, against: "insertion" }), 1000);
    expectClose(-matched.gainDb, row.attenuation_db, relative, "loss in dB");
    expectClose(matched.impedanceOhm[0].re, row.z_ohm, relative * row.z_ohm, "input resistance");
    const open = row.tee_series_ohm + row.tee_shunt_ohm;
    expectClose(
      readAt(chainOf("pad", parts), 1000).impedanceOhm[0].re,
      open,
      relative * open,
      "open at its end",
    );
  });
});

interface OpampRow {
  readonly kind: string;
  readonly parts: Row;
  readonly f0_hz: number;
  readonly q: number;
  readonly gain: number;
  readonly sections: readonly Row[];
  readonly samples: readonly {
    readonly f_hz: number;
    readonly gain_db: number;
    readonly phase_deg_wrapped: number;
  }[];
}

const opampsOf = (kind: string) =>
  opamp.rows.filter((row) => row.kind === kind) as unknown as readonly OpampRow[];

function expectSamples(chain: Chain, { samples }: OpampRow): void {
  expect(samples.length).toBeGreaterThan(4);
  for (const { f_hz, gain_db, phase_deg_wrapped } of samples) {
    const reading = readAt(chain, f_hz);
    expectClose(reading.gainDb, gain_db, 1e-8, `gain in dB at ${f_hz} Hz`);
    expectAngle(reading.phaseDeg, phase_deg_wrapped, 1e-8, `phase at ${f_hz} Hz`);
  }
}

/** Without those that a zero cancels, as the input admittance's do behind an ideal source. */
function polesLeft(chain: Chain, omega: number): readonly Complex[] {
  const { zeros, poles } = chainRoots(chain, omega);
  const left = [...poles];
  for (const zero of zeros) {
    const same = left.findIndex((pole) => magnitude(minus(pole, zero)) < 1e-9 * omega);
    if (same >= 0) left.splice(same, 1);
  }
  return left;
}

/** One pair of poles: its frequency, and its Q as half the frequency over the distance from the axis. */
function expectPair(chain: Chain, { f0_hz, q }: OpampRow): void {
  const poles = polesLeft(chain, 2 * Math.PI * f0_hz);
  expect(poles).toHaveLength(2);
  const omega = Math.sqrt(poles[0].re * poles[1].re - poles[0].im * poles[1].im);
  expectClose(omega / (2 * Math.PI), f0_hz, 1e-10 * f0_hz, "f0");
  expectClose(omega / -(poles[0].re + poles[1].re), q, 1e-9 * Math.abs(q), "Q");
}

const lowPass = (parts: Row): PartValues => ({
  R1: parts.R1,
  R2: parts.R2,
  C1: parts.C1_junction_to_output,
  C2: parts.C2_input_to_ground,
  gain: parts.K ?? 1,
});

describe("sections around an ideal op amp", () => {
  it.each(opampsOf("sallen_key_low_pass"))("Sallen–Key low-pass at $f0_hz Hz", (row) => {
    const chain = chainOf("sallen-key-lowpass", lowPass(row.parts));
    expectSamples(chain, row);
    expectPair(chain, row);
    expectClose(readAt(chain, row.f0_hz * 1e-8).ratio, row.gain, 1e-10 * row.gain, "gain at DC");
  });

  it.each(opampsOf("sallen_key_high_pass"))("Sallen–Key high-pass at $f0_hz Hz", (row) => {
    const { C1, C2, R1_junction_to_output: R1, R2_input_to_ground: R2, K: gain } = row.parts;
    const chain = chainOf("sallen-key-highpass", { C1, C2, R1, R2, gain });
    expectSamples(chain, row);
    expectPair(chain, row);
    expectClose(readAt(chain, row.f0_hz * 1e8).ratio, row.gain, 1e-10 * row.gain, "gain far above");
  });

  it.each(opampsOf("mfb_low_pass"))("multiple-feedback low-pass at $f0_hz Hz", (row) => {
    const { R1_input: R1, R2_junction_to_output: R2, R3_junction_to_minus: R3, ...others } = row.parts;
    const { C2_junction_to_ground: C1, C1_minus_to_output: C2 } = others;
    const chain = chainOf("mfb-lowpass", { R1, R2, R3, C1, C2 });
    expectSamples(chain, row);
    expectPair(chain, row);
  });

  it.each(opampsOf("mfb_band_pass"))("multiple-feedback band-pass at $f0_hz Hz", (row) => {
    const { R1_input: R1, R3_junction_to_ground: R2, R2_minus_to_output: R3, C_both: C } = row.parts;
    const chain = chainOf("mfb-bandpass", { R1, R2, R3, C1: C, C2: C });
    expectSamples(chain, row);
    expectPair(chain, row);
    expectClose(readAt(chain, row.f0_hz).ratio, Math.abs(row.gain), 1e-9 * Math.abs(row.gain), "gain at f0");
  });

  it.each(opampsOf("unity_gain_sallen_key_design"))("designs of Sallen–Key sections in a row", (row) => {
    const stages = row.sections.map((section) => buildStage("sallen-key-lowpass", lowPass(section)));
    expectSamples(makeChain({ stages }), row);
  });
});
