import { series, shunt } from "../../elements/make.ts";
import { capacitance, defineKind, resistance } from "../kind.ts";

/** Series capacitor, then a resistor to common: first-order high-pass, corner 1/(2πRC). */
export const rcHighpass = defineKind<{ R: number; C: number }>({
  kind: "rc-highpass",
  group: "passive",
  summary: "first-order high-pass, the coupling capacitor",
  circuit: "C in series, R in shunt",
  formula: "sRC/(1 + sRC)",
  source: "Kirchhoff's laws",
  parts: [
    capacitance("C", "series capacitor", { initial: "100n" }),
    resistance("R", "shunt resistor", { initial: "1k" }),
  ],
  elements: ({ R, C }) => [series({ C }), shunt({ R })],
});
