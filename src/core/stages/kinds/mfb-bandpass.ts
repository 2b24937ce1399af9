import { isolating } from "../../elements/make.ts";
import { add, multiply, scale } from "../../polynomial.ts";
import { rational } from "../../rational.ts";
import { capacitance, defineKind, resistance } from "../kind.ts";
import { gbwPart, inverseOpenLoopGain } from "../op-amp.ts";

interface MfbBandpassValues {
  readonly R1: number;
  readonly R2: number;
  readonly R3: number;
  readonly C1: number;
  readonly C2: number;
  readonly gbw?: number;
}

/** Multiple-feedback band-pass section, the current it draws included. */
export const mfbBandpass = defineKind<MfbBandpassValues>({
  kind: "mfb-bandpass",
  group: "active",
  summary: "multiple-feedback band-pass section, inverting",
  circuit:
    "R1 in, R2 from the middle node to common, C1 from there to the output, C2 from there to the − input, R3 from the output to the − input",
  formula: "−(sC2R3/R1)/(1/R1 + 1/R2 + s(C1 + C2) + s²C1C2R3)",
  source: "Op Amps for Everyone, ch. 16, multiple-feedback topology; one-pole op amp",
  parts: [
    resistance("R1", "resistor at the input", { initial: "7.5k" }),
    resistance("R2", "resistor from the middle node to common", { initial: "82" }),
    resistance("R3", "resistor from the output to the − input", { initial: "33k" }),
    capacitance("C1", "capacitor from the middle node to the output", { initial: "100n" }),
    capacitance("C2", "capacitor from the middle node to the − input", { initial: "100n" }),
    gbwPart,
  ],
  elements: ({ R1, R2, R3, C1, C2, gbw }) => {
    const inverseA = inverseOpenLoopGain(gbw);
    const tau = [0, C2 * R3];
    // Middle node = −Vout·middle/τ, V1·τ = −Vout·D, by Kirchhoff's law at both nodes.
    const middle = add(multiply(inverseA, tau), [1], inverseA);
    const currents = add(
      multiply(middle, [1 / R1 + 1 / R2, C1]),
      multiply(tau, [0, C1]),
      multiply(add([1], inverseA), [0, C2]),
    );
    const D = scale(currents, R1);
    return [
      {
        ...isolating(rational(scale(tau, -1), D)),
        inputAdmittance: rational(add(D, scale(middle, -1)), scale(D, R1)),
      },
    ];
  },
});
