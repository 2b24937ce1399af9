import { isolating } from "../../elements/make.ts";
import { rational } from "../../rational.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, frequency } from "../kind.ts";

/** Ideal differentiator. */
export const differentiator = defineKind<PortValues & { f0: number }>({
  kind: "differentiator",
  group: "ideal",
  summary: "ideal differentiator, unity at f0",
  circuit: "ideal",
  formula: "x, x = s/2πf0",
  source: "definition",
  parts: [frequency("f0", "frequency of unity gain", { initial: "1k" }), ...idealPorts],
  elements: ({ f0, ...ports }) => [isolating(rational([0, 1], [1], 2 * Math.PI * f0), ports)],
});
