import { series, shunt } from "../../elements/make.ts";
import { capacitance, defineKind, optional, resistance } from "../kind.ts";

/** Divider with a capacitor across the upper arm (and one across the lower): lead, or the compensated divider. */
export const lead = defineKind<{ R1: number; C1: number; R2: number; C2?: number }>({
  kind: "lead",
  group: "passive",
  summary: "phase lead, or a compensated divider when C2 is given",
  circuit: "R1‖C1 in series, R2‖C2 in shunt",
  formula: "R2(1 + sR1C1)/(R1 + R2 + sR1R2(C1 + C2))",
  source: "Kirchhoff's laws",
  parts: [
    resistance("R1", "series resistor", { initial: "9k" }),
    capacitance("C1", "capacitor across R1", { initial: "10n" }),
    resistance("R2", "shunt resistor", { initial: "1k" }),
    optional(capacitance("C2", "capacitor across R2")),
  ],
  elements: ({ R1, C1, R2, C2 }) => [
    series({ R: R1, C: C1, joined: "parallel" }),
    shunt({ R: R2, C: C2, joined: "parallel" }),
  ],
});
