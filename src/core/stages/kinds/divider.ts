import { series, shunt } from "../../elements/make.ts";
import { defineKind, resistance } from "../kind.ts";

/** Resistive divider. */
export const divider = defineKind<{ R1: number; R2: number }>({
  kind: "divider",
  group: "passive",
  summary: "resistive divider",
  circuit: "R1 in series, R2 in shunt",
  formula: "R2/(R1 + R2)",
  source: "Kirchhoff's laws",
  parts: [
    resistance("R1", "series resistor", { initial: "9k" }),
    resistance("R2", "shunt resistor", { initial: "1k" }),
  ],
  elements: ({ R1, R2 }) => [series({ R: R1 }), shunt({ R: R2 })],
});
