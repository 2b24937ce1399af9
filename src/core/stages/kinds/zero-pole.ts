import { isolating } from "../../elements/make.ts";
import { rational } from "../../rational.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, frequency } from "../kind.ts";

/** One zero and one pole: a shelf, or a time-constant pair. */
export const zeroPole = defineKind<PortValues & { zero: number; pole: number }>({
  kind: "zero-pole",
  group: "ideal",
  summary: "one zero and one pole, unity at DC",
  circuit: "ideal, by corners",
  formula: "(1 + s/2πzero)/(1 + s/2πpole)",
  source: "definition",
  parts: [
    frequency("zero", "frequency of the zero", { initial: "100" }),
    frequency("pole", "frequency of the pole", { initial: "1k" }),
    ...idealPorts,
  ],
  elements: ({ zero, pole, ...ports }) => [
    isolating(rational([1, pole / zero], [1, 1], 2 * Math.PI * pole), ports),
  ],
});
