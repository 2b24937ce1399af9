import { isolating } from "../../elements/make.ts";
import { rational } from "../../rational.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, gain as gainPart } from "../kind.ts";

/** A constant, at every frequency. */
export const gain = defineKind<PortValues & { gain: number }>({
  kind: "gain",
  group: "ideal",
  summary: "constant gain",
  circuit: "ideal",
  formula: "gain",
  source: "definition",
  parts: [gainPart("gain", "voltage gain, a ratio or in dB", { initial: "10" }), ...idealPorts],
  elements: ({ gain: value, ...ports }) => [isolating(rational([value]), ports)],
});
