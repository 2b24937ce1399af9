import type { Element } from "../../elements/element.ts";
import { series, shunt } from "../../elements/make.ts";
import { ladderValues } from "../../filters/ladder-values.ts";
import type { FilterFamily } from "../../filters/spec.ts";
import {
  choice,
  defineKind,
  frequency,
  lossDb,
  optional,
  plain,
  resistance,
  suggested,
  whole,
} from "../kind.ts";

interface LadderStageValues {
  readonly shape: "lowpass" | "highpass";
  readonly family: FilterFamily;
  readonly order: number;
  readonly corner: number;
  readonly Z0: number;
  readonly first: "L" | "C";
  readonly ripple?: number;
  readonly QL?: number;
}

/** LC ladder from the published element values. */
export const ladder = defineKind<LadderStageValues>({
  kind: "ladder",
  group: "passive",
  summary: "LC ladder of a named family, made for Z0 at its source",
  circuit: "branches in series and in shunt by turns, the first in series (first: L) or in shunt (first: C)",
  formula:
    "low-pass L = g·Z0/2πcorner, C = g/(2πcorner·Z0); high-pass C = 1/(g·2πcorner·Z0), L = Z0/(g·2πcorner)",
  source: "Matthaei, Young and Jones, Microwave Filters (1964), section 4.05",
  parts: [
    choice("shape", "which frequencies pass", ["lowpass", "highpass"], "lowpass"),
    choice("family", "approximation", ["butterworth", "chebyshev", "bessel"], "butterworth"),
    plain("order", "number of branches", { range: whole(1, 30), initial: "5" }),
    frequency("corner", "corner; for chebyshev the ripple edge", { initial: "1M" }),
    resistance("Z0", "resistance of the source it is made for", { initial: "50" }),
    choice("first", "first branch: in series (L) or in shunt (C)", ["L", "C"], "L"),
    suggested(lossDb("ripple", "pass-band ripple of chebyshev"), "0.5"),
    optional(plain("QL", "unloaded Q of each inductor at the corner")),
  ],
  check: ({ family, order, ripple }) => {
    const values = ladderValues({ family, order, rippleDb: ripple });
    return values.ok ? undefined : values.problem;
  },
  elements: (values) => branches(values),
});

function branches({
  shape,
  family,
  order,
  corner,
  Z0,
  first,
  ripple,
  QL,
}: LadderStageValues): readonly Element[] {
  const values = ladderValues({ family, order, rippleDb: ripple });
  if (!values.ok) throw new RangeError(`${values.problem.found}; allowed: ${values.problem.allowed}`);
  const omega = 2 * Math.PI * corner;
  const winding = (L: number): number => (QL === undefined ? 0 : (omega * L) / QL);
  return values.value.g.map((g, k) => {
    const inSeries = (k % 2 === 0) === (first === "L");
    const inductive = inSeries === (shape === "lowpass");
    // Low-pass values are g itself, high-pass ones its inverse, in both cases scaled to Z0 and the corner.
    const normalised = shape === "lowpass" ? g : 1 / g;
    const L = (normalised * Z0) / omega;
    const parts = inductive ? { R: winding(L), L } : { C: normalised / (omega * Z0) };
    return inSeries ? series(parts) : shunt(parts);
  });
}
