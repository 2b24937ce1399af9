import { type LadderParts, ladderBranches } from "./netlist-ladder.ts";
import {
  branch,
  type Circuit,
  capacitor,
  inductor,
  inSeries,
  type Maker,
  type Numbers,
  optional,
  type Place,
  resistor,
  wire,
} from "./netlist-parts.ts";
import { type Complex, complex } from "./nodal-complex.ts";
import type { Component } from "./nodal-components.ts";

/** Two branches as an ell: one in the line, one behind it to common. */
const ell =
  (series: (parts: Numbers) => Maker[], shunt: (parts: Numbers) => Maker[]): Circuit =>
  (parts, { input, output, prefix }) => [
    ...inSeries([input, output], `${prefix}.line`, series(parts)),
    ...inSeries([output, "0"], `${prefix}.shunt`, shunt(parts)),
  ];

const coil = (parts: Numbers): Maker[] => [inductor(parts.L), resistor(parts.Rw ?? 0)];

/** The passive kinds. */
export const passiveCircuits: Readonly<Record<string, Circuit>> = {
  series: (parts, { input, output, prefix }) => branch(parts, [input, output], prefix, "series"),
  shunt: (parts, { input, output, prefix }) => [
    wire(`${prefix}.wire`, [input, output]),
    ...branch(parts, [output, "0"], prefix, "series"),
  ],
  "rc-lowpass": ell(
    ({ R }) => [resistor(R)],
    ({ C }) => [capacitor(C)],
  ),
  "rc-highpass": ell(
    ({ C }) => [capacitor(C)],
    ({ R }) => [resistor(R)],
  ),
  "rl-lowpass": ell(coil, ({ R }) => [resistor(R)]),
  "rl-highpass": ell(({ R }) => [resistor(R)], coil),
  "lc-lowpass": ell(coil, ({ C, Rc }) => [capacitor(C), resistor(Rc ?? 0)]),
  "lc-highpass": ell(({ C }) => [capacitor(C)], coil),
  divider: ell(
    ({ R1 }) => [resistor(R1)],
    ({ R2 }) => [resistor(R2)],
  ),
  lag: ell(
    ({ R1 }) => [resistor(R1)],
    ({ R2, C }) => [resistor(R2), capacitor(C)],
  ),
  lead: ({ R1, C1, R2, C2 }, { input, output, prefix }) => [
    resistor(R1)(`${prefix}.R1`, [input, output]),
    capacitor(C1)(`${prefix}.C1`, [input, output]),
    resistor(R2)(`${prefix}.R2`, [output, "0"]),
    ...optional(C2, (farad) => capacitor(farad)(`${prefix}.C2`, [output, "0"])),
  ],
  "twin-t": ({ R1, R2, R3, C1, C2, C3 }, { input, output, prefix }) => [
    ...tee([resistor(R1), capacitor(C3), resistor(R2)], input, output, `${prefix}.resistive`),
    ...tee([capacitor(C1), resistor(R3), capacitor(C2)], input, output, `${prefix}.capacitive`),
  ],
  pad,
  ladder,
  line,
  transformer,
};

function tee([arm, leg, otherArm]: Maker[], input: string, output: string, prefix: string): Component[] {
  const middle = `${prefix}.middle`;
  return [
    arm(`${prefix}.arm`, [input, middle]),
    leg(`${prefix}.leg`, [middle, "0"]),
    otherArm(`${prefix}.otherArm`, [middle, output]),
  ];
}

/** Matched symmetric tee, k = 10^(loss/20): arms Z0·(k − 1)/(k + 1), leg 2·Z0·k/(k² − 1); held against lines.json. */
function pad({ loss, Z0 }: Numbers, { input, output, prefix }: Place): Component[] {
  const k = 10 ** (loss / 20);
  const arm = resistor((Z0 * (k - 1)) / (k + 1));
  return tee([arm, resistor((2 * Z0 * k) / (k * k - 1)), arm], input, output, prefix);
}

function ladder(parts: Numbers, { input, output, prefix }: Place): Component[] {
  const branches = ladderBranches(parts as unknown as LadderParts);
  const nodeAfter = (index: number) => (index === branches.length - 1 ? output : `${prefix}.after${index}`);
  return branches.flatMap(({ place, part }, index) => {
    const before = index === 0 ? input : nodeAfter(index - 1);
    const makers = "farad" in part ? [capacitor(part.farad)] : [inductor(part.henry), resistor(part.lossOhm)];
    if (place === "series") return inSeries([before, nodeAfter(index)], `${prefix}.${index}`, makers);
    return [
      wire(`${prefix}.wire${index}`, [before, nodeAfter(index)]),
      ...inSeries([nodeAfter(index), "0"], `${prefix}.${index}`, makers),
    ];
  });
}

/** Speed of light in m/s, exact (SI). */
const lightSpeed = 299_792_458;

/** Loss in dB per 100 m at lossAt, rising with √f; 1 Np = 20/ln 10 dB. */
function line(parts: Numbers, { input, output, prefix }: Place): Component[] {
  const delayS = parts.length / (parts.velocity * lightSpeed);
  const lossNeper = (((parts.loss ?? 0) * parts.length) / 100) * (Math.LN10 / 20);
  const rise = (freqHz: number) => (lossNeper === 0 ? 0 : Math.sqrt(freqHz / parts.lossAt));
  const wave = (freqHz: number): { z0: Complex; gammaLength: Complex } => ({
    z0: complex(parts.Z0),
    gammaLength: complex(lossNeper * rise(freqHz), 2 * Math.PI * freqHz * delayS),
  });
  return [{ type: "line", name: prefix, near: input, far: output, wave }];
}

/** Rp and Lk in series, then Lm across, the ideal transformer, Rs in series with the secondary. */
function transformer({ ratio, Lm, Lk, Rp, Rs }: Numbers, { input, output, prefix }: Place): Component[] {
  const [primary, secondary] = [`${prefix}.primary`, `${prefix}.secondary`];
  return [
    ...inSeries([input, primary], `${prefix}.in`, [resistor(Rp ?? 0), inductor(Lk ?? 0)]),
    ...optional(Lm, (henry) => inductor(henry)(`${prefix}.Lm`, [primary, "0"])),
    { type: "transformer", name: `${prefix}.ideal`, ends: [primary, "0"], to: [secondary, "0"], ratio },
    resistor(Rs ?? 0)(`${prefix}.Rs`, [secondary, output]),
  ];
}
