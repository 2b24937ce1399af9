import { describe, expect, it } from "vitest";
import { type FileChain, type FileStage, readNodes } from "../helpers/netlists.ts";
import { solve, voltageAt } from "../helpers/nodal.ts";
import { expectPolar, type PolarSample } from "../helpers/nodal-close.ts";
import type { Complex } from "../helpers/nodal-complex.ts";
import type { Netlist } from "../helpers/nodal-components.ts";
import opamp from "../reference/opamp.json" with { type: "json" };

// Circuits of `chainNetlist` against opamp.json; tolerance of that file: samples 1e-8 dB and 1e-8°.
const toleranceDb = 1e-8;
const toleranceDeg = 1e-8;

interface Row {
  readonly kind: string;
  readonly parts?: Readonly<Record<string, number>>;
  readonly sections?: readonly Readonly<Record<string, number>>[];
  readonly gain?: number;
  readonly a0?: number;
  readonly gbw_hz?: number;
  readonly samples: readonly PolarSample[];
}

const rows = opamp.rows as unknown as readonly Row[];
const ofKind = (kind: string) =>
  rows.filter((row) => row.kind === kind).map((row, index) => [index, row] as const);

function expectSamples(row: Row, response: (freqHz: number) => Complex): void {
  expect(row.samples.length).toBeGreaterThan(4);
  for (const sample of row.samples) expectPolar(response(sample.f_hz), sample, toleranceDb, toleranceDeg);
}

function responseOf(stages: readonly FileStage[], a0 = Infinity): (freqHz: number) => Complex {
  const chain: FileChain = { stages };
  return (freqHz) => readNodes(chain, freqHz, { a0 }).nodes[stages.length].voltage;
}

const lowPass = (parts: Readonly<Record<string, number>>, gbw?: number): FileStage => ({
  kind: "sallen-key-lowpass",
  parts: {
    R1: parts.R1,
    R2: parts.R2,
    C1: parts.C1_junction_to_output,
    C2: parts.C2_input_to_ground,
    gain: parts.K ?? 1,
    ...(gbw === undefined ? {} : { gbw }),
  },
});

describe("ideal op amps", () => {
  it.each(ofKind("sallen_key_low_pass"))("Sallen–Key low-pass, row %i", (_, row) => {
    expectSamples(row, responseOf([lowPass(row.parts!)]));
  });

  it.each(ofKind("sallen_key_high_pass"))("Sallen–Key high-pass, row %i", (_, row) => {
    const { C1, C2, R1_junction_to_output: R1, R2_input_to_ground: R2, K } = row.parts!;
    expectSamples(row, responseOf([{ kind: "sallen-key-highpass", parts: { C1, C2, R1, R2, gain: K } }]));
  });

  it.each(ofKind("mfb_low_pass"))("multiple-feedback low-pass, row %i", (_, { parts: p, ...row }) => {
    const parts = {
      R1: p!.R1_input,
      R2: p!.R2_junction_to_output,
      R3: p!.R3_junction_to_minus,
      C1: p!.C2_junction_to_ground,
      C2: p!.C1_minus_to_output,
    };
    expectSamples(row, responseOf([{ kind: "mfb-lowpass", parts }]));
  });

  it.each(ofKind("mfb_band_pass"))("multiple-feedback band-pass, row %i", (_, { parts: p, ...row }) => {
    const parts = {
      R1: p!.R1_input,
      R2: p!.R3_junction_to_ground,
      R3: p!.R2_minus_to_output,
      C1: p!.C_both,
      C2: p!.C_both,
    };
    expectSamples(row, responseOf([{ kind: "mfb-bandpass", parts }]));
  });

  it.each(ofKind("unity_gain_sallen_key_design"))("Sallen–Key sections in a row, row %i", (_, row) => {
    expectSamples(row, responseOf(row.sections!.map((section) => lowPass(section))));
  });
});

describe("op amps with one pole", () => {
  it.each(ofKind("sallen_key_low_pass_finite_gbw"))("Sallen–Key low-pass, row %i", (_, row) => {
    expectSamples(row, responseOf([lowPass(row.parts!, row.gbw_hz)], row.a0));
  });

  it.each(ofKind("finite_gbw_inverting"))("inverting, row %i", (_, row) => {
    const parts = { Rg: 1000, Rf: -1000 * row.gain!, gbw: row.gbw_hz! };
    expectSamples(row, responseOf([{ kind: "inverting", parts }], row.a0));
  });

  it.each(ofKind("finite_gbw_noninverting"))("non-inverting, row %i", (_, row) => {
    if (row.gain === 1)
      return expectSamples(row, (freqHz) => voltageAt(solve(unityFollower(row), freqHz), "out"));
    const parts = { Rg: 1000, Rf: 1000 * (row.gain! - 1), gbw: row.gbw_hz! };
    expectSamples(row, responseOf([{ kind: "noninverting", parts }], row.a0));
  });
});

const unityFollower = ({ a0, gbw_hz }: Row): Netlist => [
  { type: "V", name: "V1", ends: ["in", "0"], volt: 1 },
  { type: "opamp", name: "U1", out: "out", plus: "in", minus: "out", a0: a0!, gbwHz: gbw_hz! },
];
