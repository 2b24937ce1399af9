import { isolating } from "../../elements/make.ts";
import { FILTER_FAMILIES, FILTER_SHAPES, HIGHEST_ORDER } from "../../filters/spec.ts";
import { checkFilterValues, type FilterValues, filterSections } from "../filter-parts.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { choice, defineKind, frequency, lossDb, optional, plain, suggested, whole } from "../kind.ts";

/** A whole filter of a named family, computed from its order and edges. */
export const filter = defineKind<FilterValues & PortValues>({
  kind: "filter",
  group: "ideal",
  summary: "whole filter of a named family",
  circuit: "ideal, by family, order and edges",
  formula: "gain·Π(s − zeros)/Π(s − poles); corner: −3.01 dB, for chebyshev and elliptic the ripple edge",
  source:
    "Butterworth 1930; Cauer 1958; Thomson 1949; elliptic by Landen's transformation, Orfanidis, Lecture Notes on Elliptic Filter Design (2006)",
  parts: [
    choice("shape", "which frequencies pass", FILTER_SHAPES, "lowpass"),
    choice("family", "approximation", FILTER_FAMILIES, "butterworth"),
    plain("order", "order of the low-pass prototype", { range: whole(1, HIGHEST_ORDER), initial: "4" }),
    optional(frequency("corner", "corner of a lowpass or highpass", { initial: "1k" })),
    suggested(frequency("low", "lower corner of a bandpass or bandstop"), "500"),
    suggested(frequency("high", "upper corner of a bandpass or bandstop"), "2k"),
    suggested(lossDb("ripple", "pass-band ripple of chebyshev and elliptic"), "0.5"),
    suggested(lossDb("stop", "least stop-band loss of inverse-chebyshev and elliptic"), "60"),
    ...idealPorts,
  ],
  check: checkFilterValues,
  elements: ({ Rin, Rout, ...design }) => [isolating(filterSections(design), { Rin, Rout })],
});
