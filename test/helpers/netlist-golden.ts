import golden from "../reference/golden-ladders.json" with { type: "json" };
import { type Complex, complex } from "./nodal-complex.ts";
import type { Component, Netlist } from "./nodal-components.ts";

/** A chain of golden-ladders.json: computed outside this project, its netlist beside its numbers. */
export interface GoldenRow {
  readonly id: string;
  readonly outputNode: string;
  readonly netlist: Netlist;
  readonly readings: readonly GoldenReading[];
}

export interface GoldenReading {
  readonly f_hz: number;
  readonly gain_db: number;
  readonly phase_deg_wrapped: number;
  readonly voltages: ReadonlyMap<string, Complex>;
}

export const goldenRows: readonly GoldenRow[] = golden.rows.map((row) => ({
  id: row.id,
  outputNode: row.output_node,
  netlist: row.netlist.map((entry) => component(entry as unknown as TwoEnded | Amplifying)),
  readings: row.f_hz.map((f_hz, index) => ({
    f_hz,
    gain_db: row.gain_db[index],
    phase_deg_wrapped: row.phase_deg_wrapped[index],
    voltages: new Map(
      Object.entries(row.nodes as Record<string, { re: number[]; im: number[] }>).map(
        ([node, { re, im }]) => [node, complex(re[index], im[index])],
      ),
    ),
  })),
}));

/** The file's tolerance: 1e-8 dB, 1e-6 dB in notches deeper than −100 dB; 1e-7°; node voltages 1e-9 of the largest. */
export const goldenTolerance = {
  gainDb: (expectedDb: number) => (expectedDb < -100 ? 1e-6 : 1e-8),
  phaseDeg: 1e-7,
  voltage: 1e-9,
};

type TwoEnded = readonly [name: string, from: string, to: string, value: number];
type Amplifying = readonly [name: string, out: string, inputs: readonly [string, string], pole: Pole | null];
type Pole = readonly [a0: number, gbwHz: number];

function component(entry: TwoEnded | Amplifying): Component {
  return entry[0].startsWith("U") ? opamp(entry as Amplifying) : twoEnded(entry as TwoEnded);
}

function twoEnded([name, from, to, value]: TwoEnded): Component {
  const ends = [from, to] as const;
  if (name.startsWith("R")) return { type: "R", name, ends, ohm: value };
  if (name.startsWith("L")) return { type: "L", name, ends, henry: value };
  if (name.startsWith("C")) return { type: "C", name, ends, farad: value };
  if (name.startsWith("V")) return { type: "V", name, ends, volt: value };
  throw new Error(`no component for "${name}"`);
}

function opamp([name, out, [plus, minus], pole]: Amplifying): Component {
  const [a0, gbwHz] = pole ?? [Infinity, Infinity];
  return { type: "opamp", name, out, plus, minus, a0, gbwHz };
}
