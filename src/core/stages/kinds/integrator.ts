import { isolating } from "../../elements/make.ts";
import { rational } from "../../rational.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, frequency } from "../kind.ts";

/** Ideal integrator. */
export const integrator = defineKind<PortValues & { f0: number }>({
  kind: "integrator",
  group: "ideal",
  summary: "ideal integrator, unity at f0",
  circuit: "ideal",
  formula: "1/x, x = s/2πf0",
  source: "definition",
  parts: [frequency("f0", "frequency of unity gain", { initial: "1k" }), ...idealPorts],
  elements: ({ f0, ...ports }) => [isolating(rational([1], [0, 1], 2 * Math.PI * f0), ports)],
});
