import { irrational } from "../../elements/make.ts";
import { defineKind, sampleRate } from "../kind.ts";
import { linearPhase, sinc } from "../periodic.ts";

/** Zero-order hold of a converter's output, scaled to one at DC. */
export const hold = defineKind<{ rate: number }>({
  kind: "hold",
  group: "sampled",
  summary: "zero-order hold",
  circuit: "behind the converter",
  formula: "(1 − z⁻¹)·rate/s, z = e^(s/rate)",
  source: "Oppenheim and Schafer, Discrete-Time Signal Processing, ch. 4",
  parts: [sampleRate("rate", "sample rate", { initial: "20k" })],
  elements: ({ rate }) => [
    irrational(
      linearPhase({ rate, delayS: 0.5 / rate, power: 1, size: sinc, nullsHz: rate, repeats: false }),
    ),
  ],
});
