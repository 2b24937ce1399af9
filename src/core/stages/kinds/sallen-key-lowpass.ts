import { isolating } from "../../elements/make.ts";
import { add, multiply, scale } from "../../polynomial.ts";
import { rational } from "../../rational.ts";
import { capacitance, defineKind, gain as gainPart, optional, resistance } from "../kind.ts";
import { gbwPart, inverseOpenLoopGain } from "../op-amp.ts";

interface SallenKeyValues {
  readonly R1: number;
  readonly R2: number;
  readonly C1: number;
  readonly C2: number;
  readonly gain?: number;
  readonly gbw?: number;
}

/** Sallen–Key low-pass section of gain K, the current it draws included. */
export const sallenKeyLowpass = defineKind<SallenKeyValues>({
  kind: "sallen-key-lowpass",
  group: "active",
  summary: "Sallen–Key second-order low-pass section",
  circuit:
    "R1, R2 in series to the + input; C1 from the middle node to the output, C2 from the + input to common",
  formula: "K/(1 + s[C2(R1 + R2) + C1R1(1 − K)] + s²R1R2C1C2); with gbw 1/K becomes 1/K + 1/A",
  source: "Sallen and Key, IRE Trans. CT-2 (1955); Op Amps for Everyone, ch. 16",
  parts: [
    resistance("R1", "resistor at the input", { initial: "10k" }),
    resistance("R2", "resistor to the + input", { initial: "10k" }),
    capacitance("C1", "capacitor to the output", { initial: "22n" }),
    capacitance("C2", "capacitor to common", { initial: "10n" }),
    optional(gainPart("gain", "gain K of the amplifier", { fallback: 1 })),
    gbwPart,
  ],
  elements: ({ R1, R2, C1, C2, gain = 1, gbw }) => {
    const plusInput = add([1 / gain], inverseOpenLoopGain(gbw));
    const ladder = [1, C2 * (R1 + R2) + C1 * R1, R1 * R2 * C1 * C2];
    const D = add(multiply(plusInput, ladder), [0, -C1 * R1]);
    const middle = multiply(plusInput, [1, C2 * R2]);
    return [
      {
        ...isolating(rational([1], D)),
        inputAdmittance: rational(add(D, scale(middle, -1)), scale(D, R1)),
      },
    ];
  },
});
