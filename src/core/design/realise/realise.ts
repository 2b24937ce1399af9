import type { FilterSpec } from "../../filters/transform.ts";
import type { Result } from "../../result.ts";
import type { Requirement } from "../requirement.ts";
import { realiseActive } from "./active.ts";
import { realiseLadder } from "./passive.ts";
import { multipleFeedback, sallenKey } from "./section-kinds.ts";
import type { PartsBin, Realisation } from "./types.ts";

export const CIRCUITS = ["sallen-key", "mfb", "ladder"] as const;
export type Circuit = (typeof CIRCUITS)[number];

/** A designed filter made of real parts, and how far it departs from the ideal one. */
export function realise(
  spec: FilterSpec,
  requirement: Requirement,
  circuit: Circuit,
  bin: PartsBin,
): Result<Realisation> {
  switch (circuit) {
    case "sallen-key":
      return realiseActive(spec, requirement, sallenKey, bin);
    case "mfb":
      return realiseActive(spec, requirement, multipleFeedback, bin);
    case "ladder":
      return realiseLadder(spec, requirement, bin);
  }
}
