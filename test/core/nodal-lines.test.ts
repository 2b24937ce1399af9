import { describe, expect, it } from "vitest";
import { type FileChain, nodalGain, readNodes } from "../helpers/netlists.ts";
import { currentOf, solve, voltageAt } from "../helpers/nodal.ts";
import { expectClose, expectComplex, expectPolar } from "../helpers/nodal-close.ts";
import {
  type Complex,
  complex,
  gainDb,
  magnitude,
  over,
  squareRoot,
  times,
} from "../helpers/nodal-complex.ts";
import type { Component, Wave } from "../helpers/nodal-components.ts";
import lines from "../reference/lines.json" with { type: "json" };

// The line and pad of the tests' network solver against lines.json: 1e-9 relative, and the last printed digit (1e-9)
// of its columns in dB and degrees.
const relative = 1e-9;

type Row = Readonly<Record<string, number | string>>;
const named = (name: string) =>
  (lines.rows as unknown as readonly Row[])
    .filter((row) => row.name === name)
    .map((row, index) => [index, row as Readonly<Record<string, number>>] as const);

const matchless = (z0: number, wavelengths: number): Wave => {
  return () => ({ z0: complex(z0), gammaLength: complex(0, 2 * Math.PI * wavelengths) });
};

/** Impedance into a line that ends in `load` ohm. */
function lookingInto(wave: Wave, load: Complex): Complex {
  const omega = 1;
  const solution = solve(
    [
      { type: "V", name: "V1", ends: ["near", "0"], volt: 1 },
      { type: "line", name: "line", near: "near", far: "far", wave },
      ...impedance(load, omega),
    ],
    omega / (2 * Math.PI),
  );
  return over(voltageAt(solution, "near"), currentOf(solution, "line.near"));
}

function impedance({ re, im }: Complex, omega: number): Component[] {
  const reactance: Component =
    im < 0
      ? { type: "C", name: "X", ends: ["joint", "0"], farad: -1 / (omega * im) }
      : { type: "L", name: "X", ends: ["joint", "0"], henry: im / omega };
  return [{ type: "R", name: "RL", ends: ["far", "joint"], ohm: re }, reactance];
}

describe("uniform lines", () => {
  const terminated = ["terminated_line", "quarter_wave", "half_wave"].flatMap(named);
  it.each(terminated)("transform their load, row %i", (_, row) => {
    const seen = lookingInto(matchless(row.z0_ohm, row.length_wavelengths), complex(row.zl_re, row.zl_im));
    const expected = complex(row.zin_re, row.zin_im);
    expectComplex(seen, expected, relative * magnitude(expected), "input impedance");
  });

  it.each(named("quarter_wave_transformer_sweep"))("are quarter-wave transformers, row %i", (_, row) => {
    const seen = lookingInto(matchless(row.z1_ohm, row.f_over_f0 / 4), complex(100));
    const expected = complex(row.zin_re, row.zin_im);
    expectComplex(seen, expected, relative * magnitude(expected), "input impedance");
  });

  it.each(named("lossless_stub"))("are stubs when open, as a stage of a chain, row %i", (_, row) => {
    const parts = { Z0: row.z0_ohm, length: row.length_m, velocity: row.velocity_m_s / 299_792_458 };
    const chain: FileChain = { source: { R: 50 }, stages: [{ kind: "line", parts }] };
    const { voltage, current } = readNodes(chain, row.f_hz).nodes[0];
    const expected = complex(0, row.open_reactance_ohm);
    expectComplex(over(voltage, current), expected, relative * magnitude(expected), "input impedance");
  });

  it.each(named("lossless_stub"))("are stubs when shorted, row %i", (_, row) => {
    const wavelengths = (row.length_m * row.f_hz) / row.velocity_m_s;
    const seen = lookingInto(matchless(row.z0_ohm, wavelengths), complex(0));
    const expected = complex(0, row.short_reactance_ohm);
    expectComplex(seen, expected, relative * magnitude(expected), "input impedance");
  });

  it.each(named("rlgc_line_between_resistances"))("lose and delay, row %i", (_, row) => {
    const wave: Wave = (freqHz) => {
      const omega = 2 * Math.PI * freqHz;
      const series = complex(row.r_per_m, omega * row.l_per_m);
      const shunt = complex(row.g_per_m, omega * row.c_per_m);
      const gamma = squareRoot(times(series, shunt));
      return { z0: squareRoot(over(series, shunt)), gammaLength: times(gamma, complex(row.length_m)) };
    };
    const solution = solve(
      [
        { type: "V", name: "V1", ends: ["s", "0"], volt: 1 },
        { type: "R", name: "RS", ends: ["s", "near"], ohm: row.zs_ohm },
        { type: "line", name: "line", near: "near", far: "far", wave },
        { type: "R", name: "RL", ends: ["far", "0"], ohm: row.zl_ohm },
      ],
      row.f_hz,
    );
    const sample = { f_hz: row.f_hz, gain_db: row.gain_db, phase_deg_wrapped: row.phase_deg_wrapped };
    expectPolar(voltageAt(solution, "far"), sample, 1e-9, 1e-9);
    const seen = over(voltageAt(solution, "near"), currentOf(solution, "line.near"));
    const expected = complex(row.zin_re, row.zin_im);
    expectComplex(seen, expected, relative * magnitude(expected), "input impedance");
  });

  it.each(named("skin_effect_sqrt_scaling"))(
    "lose with the root of frequency when matched, row %i",
    (_, row) => {
      const parts = {
        Z0: 50,
        length: 100,
        velocity: 0.66,
        loss: row.reference_db,
        lossAt: row.reference_f_hz,
      };
      const chain: FileChain = { source: { R: 50 }, stages: [{ kind: "line", parts }], load: { R: 50 } };
      const lossDb = -gainDb(nodalGain(chain, row.f_hz, "insertion"));
      expectClose(lossDb, row.loss_db, relative * row.loss_db, "loss in dB");
    },
  );
});

describe("pads", () => {
  it.each(named("matched_pads"))("lose what they say and match, row %i", (_, row) => {
    const pad = { kind: "pad", parts: { loss: row.attenuation_db, Z0: row.z_ohm } };
    const matched: FileChain = { source: { R: row.z_ohm }, stages: [pad], load: { R: row.z_ohm } };
    expectClose(gainDb(nodalGain(matched, 1000, "insertion")), -row.attenuation_db, 1e-9, "gain in dB");
    const open = readNodes({ ...matched, load: {} }, 1000).nodes[0];
    // Open at its end, the pad is one arm and the leg in series.
    const resistance = row.tee_series_ohm + row.tee_shunt_ohm;
    expectComplex(over(open.voltage, open.current), complex(resistance), relative * resistance, "open pad");
  });
});

it("has every row of lines.json that is about a circuit", () => {
  const used = [
    "terminated_line",
    "quarter_wave",
    "half_wave",
    "quarter_wave_transformer_sweep",
    "lossless_stub",
  ];
  const more = ["rlgc_line_between_resistances", "skin_effect_sqrt_scaling", "matched_pads"];
  for (const name of [...used, ...more]) expect(named(name).length, name).toBeGreaterThan(0);
});
