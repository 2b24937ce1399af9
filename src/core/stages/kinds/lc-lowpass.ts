import { series, shunt } from "../../elements/make.ts";
import { capacitance, defineKind, inductance, optional, orZero, resistance } from "../kind.ts";

/** Series inductor, shunt capacitor, each with its series resistance: second-order low-pass. */
export const lcLowpass = defineKind<{ L: number; C: number; Rw?: number; Rc?: number }>({
  kind: "lc-lowpass",
  group: "passive",
  summary: "second-order low-pass of one inductor and one capacitor",
  circuit: "L with Rw in series, C with its series resistance Rc in shunt",
  formula: "(1 + sRcC)/(1 + s(Rw + Rc)C + s²LC)",
  source: "Kirchhoff's laws",
  parts: [
    inductance("L", "series inductor", { initial: "10m" }),
    capacitance("C", "shunt capacitor", { initial: "100n" }),
    optional(orZero(resistance("Rw", "winding resistance of L"))),
    optional(orZero(resistance("Rc", "series resistance of C"))),
  ],
  elements: ({ L, C, Rw = 0, Rc = 0 }) => [series({ R: Rw, L }), shunt({ R: Rc, C })],
});
