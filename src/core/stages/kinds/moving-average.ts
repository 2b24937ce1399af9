import { irrational } from "../../elements/make.ts";
import { defineKind, plain, sampleRate, whole } from "../kind.ts";
import { dirichlet, linearPhase } from "../periodic.ts";

/** Mean of the last `length` samples. */
export const movingAverage = defineKind<{ length: number; rate: number }>({
  kind: "moving-average",
  group: "sampled",
  summary: "mean of the last samples",
  circuit: "behind the converter",
  formula: "(1 + z⁻¹ + … + z^(1−length))/length, z = e^(s/rate)",
  source: "Oppenheim and Schafer, Discrete-Time Signal Processing, ch. 2",
  parts: [
    plain("length", "number of samples", { range: whole(1, 1_000_000), initial: "8" }),
    sampleRate("rate", "sample rate", { initial: "20k" }),
  ],
  elements: ({ length, rate }) => [
    irrational(
      linearPhase({
        rate,
        delayS: (length - 1) / (2 * rate),
        power: 1,
        size: (turns) => dirichlet(turns, length),
        nullsHz: rate / length,
        repeats: true,
      }),
    ),
  ],
});
