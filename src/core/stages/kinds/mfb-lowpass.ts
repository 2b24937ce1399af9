import { isolating } from "../../elements/make.ts";
import { add, multiply, scale } from "../../polynomial.ts";
import { rational } from "../../rational.ts";
import { capacitance, defineKind, resistance } from "../kind.ts";
import { gbwPart, inverseOpenLoopGain } from "../op-amp.ts";

interface MfbLowpassValues {
  readonly R1: number;
  readonly R2: number;
  readonly R3: number;
  readonly C1: number;
  readonly C2: number;
  readonly gbw?: number;
}

/** Multiple-feedback low-pass section, the current it draws included. */
export const mfbLowpass = defineKind<MfbLowpassValues>({
  kind: "mfb-lowpass",
  group: "active",
  summary: "multiple-feedback second-order low-pass section, inverting",
  circuit:
    "R1 in, R2 from the output to the middle node, R3 from there to the − input, C1 from there to common, C2 from the output to the − input",
  formula: "−(R2/R1)/(1 + sC2(R2 + R3 + R2R3/R1) + s²R2R3C1C2)",
  source: "Op Amps for Everyone, ch. 16, multiple-feedback topology; one-pole op amp",
  parts: [
    resistance("R1", "resistor at the input", { initial: "10k" }),
    resistance("R2", "resistor from the output to the middle node", { initial: "10k" }),
    resistance("R3", "resistor to the − input", { initial: "4.7k" }),
    capacitance("C1", "capacitor from the middle node to common", { initial: "47n" }),
    capacitance("C2", "capacitor from the output to the − input", { initial: "4.7n" }),
    gbwPart,
  ],
  elements: ({ R1, R2, R3, C1, C2, gbw }) => {
    const inverseA = inverseOpenLoopGain(gbw);
    // Middle node = −Vout·middle, V1 = −Vout·D, by Kirchhoff's law at both nodes.
    const middle = add(multiply(inverseA, [1, C2 * R3]), [0, C2 * R3]);
    const conductance = [1 / R1 + 1 / R2 + 1 / R3, C1];
    const D = scale(add(multiply(middle, conductance), [1 / R2], scale(inverseA, -1 / R3)), R1);
    return [
      {
        ...isolating(rational([-1], D)),
        inputAdmittance: rational(add(D, scale(middle, -1)), scale(D, R1)),
      },
    ];
  },
});
