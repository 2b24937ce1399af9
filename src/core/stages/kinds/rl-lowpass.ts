import { series, shunt } from "../../elements/make.ts";
import { defineKind, inductance, optional, orZero, resistance } from "../kind.ts";

/** Series inductor with its winding resistance, then a resistor to common. */
export const rlLowpass = defineKind<{ L: number; R: number; Rw?: number }>({
  kind: "rl-lowpass",
  group: "passive",
  summary: "first-order low-pass of one inductor and one resistor",
  circuit: "L with winding resistance Rw in series, R in shunt",
  formula: "R/(R + Rw + sL)",
  source: "Kirchhoff's laws",
  parts: [
    inductance("L", "series inductor", { initial: "10m" }),
    resistance("R", "shunt resistor", { initial: "1k" }),
    optional(orZero(resistance("Rw", "winding resistance of L"))),
  ],
  elements: ({ L, R, Rw = 0 }) => [series({ R: Rw, L }), shunt({ R })],
});
