import { irrational } from "../../elements/make.ts";
import { defineKind, plain, sampleRate, whole } from "../kind.ts";
import { dirichlet, linearPhase } from "../periodic.ts";

/** Cascade of moving averages over the decimation ratio, as in a sigma–delta converter. */
export const sincDecimator = defineKind<{ order: number; ratio: number; rate: number }>({
  kind: "sinc-decimator",
  group: "sampled",
  summary: "sinc filter of a decimating converter",
  circuit: "behind the converter; rate is that of the input samples",
  formula: "((1 − z^−ratio)/(ratio·(1 − z⁻¹)))^order, z = e^(s/rate)",
  source: "Hogenauer, IEEE Trans. ASSP-29 (1981)",
  parts: [
    plain("order", "number of averages in a row", { range: whole(1, 30), initial: "3" }),
    plain("ratio", "input samples per output sample", { range: whole(1, 1_000_000), initial: "64" }),
    sampleRate("rate", "input sample rate", { initial: "1.28M" }),
  ],
  elements: ({ order, ratio, rate }) => [
    irrational(
      linearPhase({
        rate,
        delayS: (order * (ratio - 1)) / (2 * rate),
        power: order,
        size: (turns) => dirichlet(turns, ratio),
        nullsHz: rate / ratio,
        repeats: true,
      }),
    ),
  ],
});
