import {
  type Circuit,
  capacitor,
  inSeries,
  type Maker,
  type Numbers,
  optional,
  type Place,
  parallelRC,
  resistor,
  seriesRC,
} from "./netlist-parts.ts";
import type { Component } from "./nodal-components.ts";

/** The kinds that isolate. */
export const activeCircuits: Readonly<Record<string, Circuit>> = {
  amplifier,
  inverting: ({ Rg, Rf, Cg, Cf, gbw }, place) => [
    ...inSeries([place.input, `${place.prefix}.minus`], `${place.prefix}.Zg`, seriesRC(Rg, Cg)),
    ...parallelRC(Rf, Cf, [place.output, `${place.prefix}.minus`], `${place.prefix}.Zf`),
    opamp(place, "0", `${place.prefix}.minus`, gbw),
  ],
  noninverting: ({ Rg, Rf, Cg, Cf, gbw, Rin, Cin }, place) => [
    ...inSeries([`${place.prefix}.minus`, "0"], `${place.prefix}.Zg`, seriesRC(Rg, Cg)),
    ...parallelRC(Rf, Cf, [place.output, `${place.prefix}.minus`], `${place.prefix}.Zf`),
    ...parallelRC(Rin, Cin, [place.input, "0"], `${place.prefix}.in`),
    opamp(place, place.input, `${place.prefix}.minus`, gbw),
  ],
  "sallen-key-lowpass": ({ R1, R2, C1, C2, gain, gbw }, place) =>
    sallenKey([resistor(R1), resistor(R2), capacitor(C1), capacitor(C2)], gain ?? 1, gbw, place),
  "sallen-key-highpass": ({ R1, R2, C1, C2, gain, gbw }, place) =>
    sallenKey([capacitor(C1), capacitor(C2), resistor(R1), resistor(R2)], gain ?? 1, gbw, place),
  "mfb-lowpass": ({ R1, R2, R3, C1, C2, gbw }, place) =>
    multipleFeedback([resistor(R1), resistor(R2), resistor(R3), capacitor(C1), capacitor(C2)], gbw, place),
  "mfb-bandpass": ({ R1, R2, R3, C1, C2, gbw }, place) =>
    multipleFeedback([resistor(R1), capacitor(C1), capacitor(C2), resistor(R2), resistor(R3)], gbw, place),
};

/** The pole is a real one: 1 Ω into a capacitor between two ideal controlled sources. */
function amplifier(parts: Numbers, { input, output, prefix }: Place): Component[] {
  const [driven, held, port] = [`${prefix}.driven`, `${prefix}.held`, `${prefix}.port`];
  return [
    ...parallelRC(parts.Rin, parts.Cin, [input, "0"], `${prefix}.in`),
    follower(`${prefix}.gain`, input, driven, parts.gain),
    resistor(1)(`${prefix}.R`, [driven, held]),
    ...optional(parts.bandwidth, (freqHz) =>
      capacitor(1 / (2 * Math.PI * freqHz))(`${prefix}.C`, [held, "0"]),
    ),
    follower(`${prefix}.buffer`, held, port, 1),
    resistor(parts.Rout ?? 0)(`${prefix}.Rout`, [port, output]),
  ];
}

const follower = (name: string, sense: string, out: string, gain: number): Component => ({
  type: "vcvs",
  name,
  ends: [out, "0"],
  sense: [sense, "0"],
  gain,
});

/** Without gbw a nullor. */
function opamp(
  { output, prefix, a0 }: Place,
  plus: string,
  minus: string,
  gbw: number | undefined,
): Component {
  const [dcGain, gbwHz] = gbw === undefined ? [Infinity, Infinity] : [a0, gbw];
  return { type: "opamp", name: `${prefix}.U`, out: output, plus, minus, a0: dcGain, gbwHz };
}

/** Makers: input to middle, middle to + input, middle to output, + input to common. */
function sallenKey(makers: Maker[], gain: number, gbw: number | undefined, place: Place): Component[] {
  const { input, output, prefix } = place;
  const [middle, plus, minus] = [`${prefix}.middle`, `${prefix}.plus`, `${prefix}.minus`];
  return [
    makers[0](`${prefix}.in`, [input, middle]),
    makers[1](`${prefix}.across`, [middle, plus]),
    makers[2](`${prefix}.back`, [middle, output]),
    makers[3](`${prefix}.down`, [plus, "0"]),
    ...gainSetting(gain, output, minus, prefix),
    opamp(place, plus, minus, gbw),
  ];
}

/** Feeds V(out)/gain to the − input: a resistive divider; below unity, where there is none, a controlled source. */
function gainSetting(gain: number, output: string, minus: string, prefix: string): Component[] {
  if (gain < 1) return [follower(`${prefix}.feedback`, output, minus, 1 / gain)];
  return [
    resistor((gain - 1) * 1000)(`${prefix}.Rf`, [output, minus]),
    resistor(1000)(`${prefix}.Rg`, [minus, "0"]),
  ];
}

/** Makers: input to middle, middle to output, middle to − input, middle to common, output to − input. */
function multipleFeedback(makers: Maker[], gbw: number | undefined, place: Place): Component[] {
  const { input, output, prefix } = place;
  const [middle, minus] = [`${prefix}.middle`, `${prefix}.minus`];
  return [
    makers[0](`${prefix}.in`, [input, middle]),
    makers[1](`${prefix}.back`, [middle, output]),
    makers[2](`${prefix}.across`, [middle, minus]),
    makers[3](`${prefix}.down`, [middle, "0"]),
    makers[4](`${prefix}.feedback`, [output, minus]),
    opamp(place, "0", minus, gbw),
  ];
}
