import { idealTransformer, series, shunt } from "../../elements/make.ts";
import { defineKind, inductance, optional, orZero, plain, resistance } from "../kind.ts";

interface TransformerValues {
  readonly ratio: number;
  readonly Lm?: number;
  readonly Lk?: number;
  readonly Rp?: number;
  readonly Rs?: number;
}

/** Transformer with magnetising and leakage inductance and winding resistances. */
export const transformer = defineKind<TransformerValues>({
  kind: "transformer",
  group: "passive",
  summary: "transformer with its magnetising and leakage inductance",
  circuit: "Rp and Lk in series, Lm across the primary, ratio = secondary/primary turns, Rs in series",
  formula: "ratio·sLm/(Rp + s(Lk + Lm))",
  source: "tee equivalent of a transformer referred to its primary; any power text",
  parts: [
    plain("ratio", "secondary over primary turns", { initial: "1" }),
    optional(inductance("Lm", "magnetising inductance across the primary", { initial: "100m" })),
    optional(inductance("Lk", "leakage inductance at the primary", { initial: "100u" })),
    optional(orZero(resistance("Rp", "primary winding resistance"))),
    optional(orZero(resistance("Rs", "secondary winding resistance"))),
  ],
  elements: ({ ratio, Lm, Lk = 0, Rp = 0, Rs = 0 }) => [
    series({ R: Rp, L: Lk }),
    ...(Lm === undefined ? [] : [shunt({ L: Lm })]),
    idealTransformer(ratio),
    series({ R: Rs }),
  ],
});
