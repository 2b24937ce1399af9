import { series, shunt } from "../../elements/make.ts";
import { fromDb } from "../../units/decibel.ts";
import { defineKind, lossDb, orZero, resistance } from "../kind.ts";

/** Symmetric tee attenuator for equal resistances at both ends. */
export const pad = defineKind<{ loss: number; Z0: number }>({
  kind: "pad",
  group: "passive",
  summary: "symmetric tee attenuator",
  circuit: "Z0(K−1)/(K+1) in series, 2·Z0·K/(K²−1) in shunt, Z0(K−1)/(K+1) in series, K = 10^(loss/20)",
  formula: "between Z0 and Z0: −loss, insertion",
  source: "symmetric T attenuator; Reference Data for Radio Engineers, attenuators (from memory)",
  parts: [
    orZero(lossDb("loss", "insertion loss between Z0 and Z0", { initial: "6 dB" })),
    resistance("Z0", "resistance it is made for", { initial: "50" }),
  ],
  elements: ({ loss, Z0 }) => {
    if (loss === 0) return [];
    const K = fromDb(loss);
    const arm = series({ R: (Z0 * (K - 1)) / (K + 1) });
    return [arm, shunt({ R: (2 * Z0 * K) / ((K - 1) * (K + 1)) }), arm];
  },
});
