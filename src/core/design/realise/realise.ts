import type { FilterSpec } from "../../filters/transform.ts";
import type { Result } from "../../result.ts";
import type { Requirement } from "../requirement.ts";
import { activeSteps } from "./active.ts";
import { ladderSteps } from "./passive.ts";
import { multipleFeedback, sallenKey } from "./section-kinds.ts";
import { allSteps, type PartsBin, type Realisation, type Steps } from "./types.ts";

export const CIRCUITS = ["sallen-key", "mfb", "ladder"] as const;
export type Circuit = (typeof CIRCUITS)[number];

/** A designed filter made of real parts, and how far it departs from the ideal one. */
export const realise = (
  spec: FilterSpec,
  requirement: Requirement,
  circuit: Circuit,
  bin: PartsBin,
): Result<Realisation> => allSteps(realiseSteps(spec, requirement, circuit, bin));

/** The same in steps. */
export function realiseSteps(
  spec: FilterSpec,
  requirement: Requirement,
  circuit: Circuit,
  bin: PartsBin,
): Steps {
  switch (circuit) {
    case "sallen-key":
      return activeSteps(spec, requirement, sallenKey, bin);
    case "mfb":
      return activeSteps(spec, requirement, multipleFeedback, bin);
    case "ladder":
      return ladderSteps(spec, requirement, bin);
  }
}
