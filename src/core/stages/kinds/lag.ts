import { series, shunt } from "../../elements/make.ts";
import { capacitance, defineKind, resistance } from "../kind.ts";

/** Series resistor, then resistor and capacitor in series to common. */
export const lag = defineKind<{ R1: number; R2: number; C: number }>({
  kind: "lag",
  group: "passive",
  summary: "phase lag: a low-pass that levels out",
  circuit: "R1 in series, R2 + C in shunt",
  formula: "(1 + sR2C)/(1 + s(R1 + R2)C)",
  source: "Kirchhoff's laws",
  parts: [
    resistance("R1", "series resistor", { initial: "9k" }),
    resistance("R2", "shunt resistor", { initial: "1k" }),
    capacitance("C", "shunt capacitor", { initial: "100n" }),
  ],
  elements: ({ R1, R2, C }) => [series({ R: R1 }), shunt({ R: R2, C })],
});
