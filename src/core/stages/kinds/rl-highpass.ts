import { series, shunt } from "../../elements/make.ts";
import { defineKind, inductance, optional, orZero, resistance } from "../kind.ts";

/** Series resistor, then an inductor with its winding resistance to common. */
export const rlHighpass = defineKind<{ R: number; L: number; Rw?: number }>({
  kind: "rl-highpass",
  group: "passive",
  summary: "first-order high-pass of one resistor and one inductor",
  circuit: "R in series, L with winding resistance Rw in shunt",
  formula: "(Rw + sL)/(R + Rw + sL)",
  source: "Kirchhoff's laws",
  parts: [
    resistance("R", "series resistor", { initial: "1k" }),
    inductance("L", "shunt inductor", { initial: "10m" }),
    optional(orZero(resistance("Rw", "winding resistance of L"))),
  ],
  elements: ({ R, L, Rw = 0 }) => [series({ R }), shunt({ R: Rw, L })],
});
