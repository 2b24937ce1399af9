import { series, shunt } from "../../elements/make.ts";
import { capacitance, defineKind, inductance, optional, orZero, resistance } from "../kind.ts";

/** Series capacitor, then an inductor with its winding resistance to common: second-order high-pass. */
export const lcHighpass = defineKind<{ C: number; L: number; Rw?: number }>({
  kind: "lc-highpass",
  group: "passive",
  summary: "second-order high-pass of one capacitor and one inductor",
  circuit: "C in series, L with Rw in shunt",
  formula: "(sRwC + s²LC)/(1 + sRwC + s²LC)",
  source: "Kirchhoff's laws",
  parts: [
    capacitance("C", "series capacitor", { initial: "100n" }),
    inductance("L", "shunt inductor", { initial: "10m" }),
    optional(orZero(resistance("Rw", "winding resistance of L"))),
  ],
  elements: ({ C, L, Rw = 0 }) => [series({ C }), shunt({ R: Rw, L })],
});
