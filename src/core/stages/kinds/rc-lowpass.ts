import { series, shunt } from "../../elements/make.ts";
import { capacitance, defineKind, resistance } from "../kind.ts";

/** Series resistor, then a capacitor to common: first-order low-pass, corner 1/(2πRC). */
export const rcLowpass = defineKind<{ R: number; C: number }>({
  kind: "rc-lowpass",
  group: "passive",
  summary: "first-order low-pass of one resistor and one capacitor",
  circuit: "R in series, C in shunt",
  formula: "1/(1 + sRC)",
  source: "Kirchhoff's laws",
  parts: [
    resistance("R", "series resistor", { initial: "1k" }),
    capacitance("C", "shunt capacitor", { initial: "100n" }),
  ],
  elements: ({ R, C }) => [series({ R }), shunt({ C })],
});
