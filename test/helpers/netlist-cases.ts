import type { FileChain, FileStage } from "./netlists.ts";

/** For every passive and active kind, a usual set of parts: all that it can have, and only those that it must. */
export const stageCases: readonly FileStage[] = [
  { kind: "series", parts: { R: 470, joined: "series" } },
  { kind: "series", parts: { R: 33, L: 2.2e-3, C: 47e-9, joined: "series" } },
  { kind: "series", parts: { R: 10e3, L: 10e-3, C: 10e-9, joined: "parallel" } },
  { kind: "shunt", parts: { C: 2.2e-9, joined: "parallel" } },
  { kind: "shunt", parts: { R: 5.6, L: 1e-3, C: 100e-9, joined: "series" } },
  { kind: "shunt", parts: { R: 22e3, L: 4.7e-3, C: 22e-9, joined: "parallel" } },
  { kind: "rc-lowpass", parts: { R: 1e3, C: 4.7e-9 } },
  { kind: "rc-highpass", parts: { C: 1e-6, R: 10e3 } },
  { kind: "rl-lowpass", parts: { L: 10e-3, R: 1e3 } },
  { kind: "rl-lowpass", parts: { L: 10e-3, R: 1e3, Rw: 12 } },
  { kind: "rl-highpass", parts: { R: 220, L: 1e-3 } },
  { kind: "rl-highpass", parts: { R: 220, L: 1e-3, Rw: 1.5 } },
  { kind: "lc-lowpass", parts: { L: 1e-3, C: 100e-9 } },
  { kind: "lc-lowpass", parts: { L: 1e-3, C: 100e-9, Rw: 0, Rc: 0 } },
  { kind: "lc-lowpass", parts: { L: 1e-3, C: 100e-9, Rw: 2.2, Rc: 0.3 } },
  { kind: "lc-highpass", parts: { C: 47e-9, L: 4.7e-3 } },
  { kind: "lc-highpass", parts: { C: 47e-9, L: 4.7e-3, Rw: 8 } },
  { kind: "divider", parts: { R1: 9e3, R2: 1e3 } },
  { kind: "lead", parts: { R1: 10e3, C1: 10e-9, R2: 1e3 } },
  { kind: "lead", parts: { R1: 9e6, C1: 12e-12, R2: 1e6, C2: 108e-12 } },
  { kind: "lag", parts: { R1: 10e3, R2: 1e3, C: 100e-9 } },
  { kind: "twin-t", parts: { R1: 31.8e3, R2: 33e3, R3: 15.4e3, C1: 100e-9, C2: 97e-9, C3: 210e-9 } },
  { kind: "pad", parts: { loss: 10, Z0: 600 } },
  {
    kind: "ladder",
    parts: { shape: "lowpass", family: "butterworth", order: 5, corner: 20e3, Z0: 600, first: "L" },
  },
  {
    kind: "ladder",
    parts: {
      shape: "lowpass",
      family: "chebyshev",
      order: 4,
      corner: 20e3,
      Z0: 50,
      first: "C",
      ripple: 0.5,
      QL: 80,
    },
  },
  {
    kind: "ladder",
    parts: { shape: "highpass", family: "butterworth", order: 6, corner: 300, Z0: 600, first: "C", QL: 25 },
  },
  {
    kind: "ladder",
    parts: { shape: "highpass", family: "chebyshev", order: 7, corner: 1e3, Z0: 75, first: "L", ripple: 0.1 },
  },
  {
    kind: "ladder",
    parts: {
      shape: "lowpass",
      family: "butterworth",
      order: 30,
      corner: 100e3,
      Z0: 600,
      first: "L",
      QL: 200,
    },
  },
  { kind: "line", parts: { Z0: 50, length: 25, velocity: 0.66 } },
  { kind: "line", parts: { Z0: 75, length: 120, velocity: 0.82, loss: 6, lossAt: 100e6 } },
  { kind: "transformer", parts: { ratio: 0.1 } },
  { kind: "transformer", parts: { ratio: 10, Lm: 2, Lk: 3e-3, Rp: 45, Rs: 900 } },
  { kind: "amplifier", parts: { gain: -20 } },
  { kind: "amplifier", parts: { gain: 100, bandwidth: 50e3, Rin: 10e6, Cin: 15e-12, Rout: 50 } },
  { kind: "inverting", parts: { Rg: 1e3, Rf: 47e3 } },
  { kind: "inverting", parts: { Rg: 1e3, Rf: 47e3, Cg: 10e-6, Cf: 100e-12, gbw: 3e6 } },
  { kind: "noninverting", parts: { Rf: 9e3, Rg: 1e3 } },
  {
    kind: "noninverting",
    parts: { Rf: 9e3, Rg: 1e3, Cf: 220e-12, Cg: 4.7e-6, gbw: 1e6, Rin: 1e6, Cin: 12e-12 },
  },
  { kind: "sallen-key-lowpass", parts: { R1: 10e3, R2: 10e3, C1: 22e-9, C2: 10e-9 } },
  { kind: "sallen-key-lowpass", parts: { R1: 8.2e3, R2: 12e3, C1: 10e-9, C2: 10e-9, gain: 2.2, gbw: 1e6 } },
  { kind: "sallen-key-highpass", parts: { C1: 22e-9, C2: 22e-9, R1: 4.7e3, R2: 10e3 } },
  { kind: "sallen-key-highpass", parts: { C1: 10e-9, C2: 15e-9, R1: 10e3, R2: 12e3, gain: 1.8, gbw: 1e6 } },
  { kind: "mfb-lowpass", parts: { R1: 10e3, R2: 10e3, R3: 4.7e3, C1: 47e-9, C2: 4.7e-9 } },
  { kind: "mfb-lowpass", parts: { R1: 3.3e3, R2: 6.8e3, R3: 2.2e3, C1: 22e-9, C2: 2.2e-9, gbw: 3e6 } },
  { kind: "mfb-bandpass", parts: { R1: 7960, R2: 80.4, R3: 31.8e3, C1: 100e-9, C2: 100e-9 } },
  { kind: "mfb-bandpass", parts: { R1: 10e3, R2: 1e3, R3: 200e3, C1: 10e-9, C2: 12e-9, gbw: 1e6 } },
];

/** Sources and loads of every shape: resistive, R + L, R‖C; open, R, R‖C, R + C. */
export const surroundings: readonly Omit<FileChain, "stages">[] = [
  {},
  { source: { R: 350 }, load: { R: 10e3 } },
  { source: { R: 120, L: 5e-3 }, load: { R: 1e6, C: 30e-12 } },
  { source: { R: 10e3, C: 1e-9, joined: "parallel" }, load: { R: 2.2e3, C: 47e-9, joined: "series" } },
  { source: { R: 50 }, load: {} },
];

const ofKind = (kind: string, last = false): FileStage => {
  const found = stageCases.filter((stage) => stage.kind === kind);
  return found[last ? found.length - 1 : 0];
};

/** Chains of several stages: passive through and through, cut by active stages, both. */
export const mixedCases: Readonly<Record<string, readonly FileStage[]>> = {
  "passive kinds that load each other": [
    ofKind("rc-lowpass"),
    ofKind("twin-t"),
    ofKind("lead", true),
    ofKind("divider"),
    ofKind("lag"),
  ],
  "a bridge, its cable and its amplifier": [
    ofKind("line", true),
    ofKind("rc-lowpass"),
    ofKind("amplifier", true),
    ofKind("sallen-key-lowpass", true),
    ofKind("rc-highpass"),
  ],
  "a transformer into a ladder": [
    ofKind("transformer", true),
    ofKind("pad"),
    ofKind("ladder"),
    ofKind("shunt"),
  ],
  "active stages that draw current from passive ones": [
    ofKind("lc-lowpass", true),
    ofKind("mfb-lowpass", true),
    ofKind("series", true),
    ofKind("inverting", true),
    ofKind("rl-highpass", true),
    ofKind("noninverting", true),
  ],
  "sections in a row": [
    ofKind("sallen-key-highpass", true),
    ofKind("mfb-bandpass"),
    ofKind("lc-highpass", true),
    ofKind("rl-lowpass", true),
  ],
};
