import { isolating } from "../../elements/make.ts";
import { rational } from "../../rational.ts";
import {
  capacitance,
  currentNoise,
  defineKind,
  frequency,
  gain as gainPart,
  optional,
  orZero,
  resistance,
  voltageNoise,
} from "../kind.ts";

interface AmplifierValues {
  readonly gain: number;
  readonly bandwidth?: number;
  readonly Rin?: number;
  readonly Cin?: number;
  readonly Rout?: number;
  readonly en?: number;
  readonly in?: number;
}

/** Amplifier with one pole, its input and output resistance and its noise. */
export const amplifier = defineKind<AmplifierValues>({
  kind: "amplifier",
  group: "active",
  summary: "amplifier with bandwidth, ports and noise",
  circuit: "Rin‖Cin at the input, Rout at the output",
  formula: "gain/(1 + s/2πbandwidth)",
  source: "one-pole amplifier model; any electronics text",
  parts: [
    gainPart("gain", "voltage gain, a ratio or in dB", { initial: "40 dB" }),
    optional(frequency("bandwidth", "half-power bandwidth", { initial: "50k" })),
    optional(resistance("Rin", "input resistance", { initial: "10M" })),
    optional(orZero(capacitance("Cin", "input capacitance"))),
    optional(orZero(resistance("Rout", "output resistance", { initial: "50" }))),
    optional(voltageNoise("en", "input noise voltage")),
    optional(currentNoise("in", "input noise current")),
  ],
  elements: ({ gain, bandwidth, en = 0, in: inputCurrent = 0, ...ports }) => {
    const transfer =
      bandwidth === undefined ? rational([gain]) : rational([gain], [1, 1], 2 * Math.PI * bandwidth);
    return [{ ...isolating(transfer, ports), noise: { voltage: en, current: inputCurrent } }];
  },
});
