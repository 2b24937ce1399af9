import { isolating } from "../../elements/make.ts";
import { add, multiply } from "../../polynomial.ts";
import { rational } from "../../rational.ts";
import { capacitance, defineKind, gain as gainPart, optional, resistance } from "../kind.ts";
import { gbwPart, inverseOpenLoopGain } from "../op-amp.ts";

interface SallenKeyValues {
  readonly C1: number;
  readonly C2: number;
  readonly R1: number;
  readonly R2: number;
  readonly gain?: number;
  readonly gbw?: number;
}

/** Sallen–Key high-pass section of gain K, the current it draws included. */
export const sallenKeyHighpass = defineKind<SallenKeyValues>({
  kind: "sallen-key-highpass",
  group: "active",
  summary: "Sallen–Key second-order high-pass section",
  circuit:
    "C1, C2 in series to the + input; R1 from the middle node to the output, R2 from the + input to common",
  formula: "K·s²R1R2C1C2/(1 + s[R1(C1 + C2) + R2C2(1 − K)] + s²R1R2C1C2); with gbw 1/K becomes 1/K + 1/A",
  source: "Sallen and Key, IRE Trans. CT-2 (1955); Op Amps for Everyone, ch. 16",
  parts: [
    capacitance("C1", "capacitor at the input", { initial: "10n" }),
    capacitance("C2", "capacitor to the + input", { initial: "10n" }),
    resistance("R1", "resistor to the output", { initial: "11k" }),
    resistance("R2", "resistor to common", { initial: "22k" }),
    optional(gainPart("gain", "gain K of the amplifier", { fallback: 1 })),
    gbwPart,
  ],
  elements: ({ C1, C2, R1, R2, gain = 1, gbw }) => {
    const plusInput = add([1 / gain], inverseOpenLoopGain(gbw));
    const ladder = [1, C2 * R2 + C1 * R1 + C2 * R1, C1 * C2 * R1 * R2];
    const D = add(multiply(plusInput, ladder), [0, -C2 * R2]);
    // D less what the middle node holds back, with that multiplied out: coefficients that must be zero are, and none
    // is left of rounding to bend the response far out.
    const drawn = add(multiply(plusInput, [1, C2 * R1]), multiply(add(plusInput, [-1]), [0, C2 * R2]));
    return [
      {
        ...isolating(rational([0, 0, C1 * C2 * R1 * R2], D)),
        inputAdmittance: rational(multiply([0, C1], drawn), D),
      },
    ];
  },
});
