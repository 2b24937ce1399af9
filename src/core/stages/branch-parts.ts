import type { Problem } from "../result.ts";
import {
  type ChoiceSpec,
  capacitance,
  choice,
  inductance,
  type NumberSpec,
  optional,
  type PartSpec,
  resistance,
} from "./kind.ts";

/** Values of a branch stage, also those of source and load. */
export interface BranchValues {
  readonly R?: number;
  readonly L?: number;
  readonly C?: number;
  readonly joined?: "series" | "parallel";
}

/** R, L, C and how they are joined, with the texts that the chooser starts with. */
export function branchParts(initial: { readonly R?: string; readonly C?: string }): readonly PartSpec[] {
  const start = (text: string | undefined) => (text === undefined ? {} : { initial: text });
  const joined: ChoiceSpec = {
    ...choice("joined", "how R, L and C stand together", ["series", "parallel"], "series"),
    optional: true,
  };
  const parts: readonly NumberSpec[] = [
    resistance("R", "resistance", start(initial.R)),
    inductance("L", "inductance"),
    capacitance("C", "capacitance", start(initial.C)),
  ];
  return [...parts.map(optional), joined];
}

/** A branch needs a part, and with more than one it must be said how they are joined. */
export function checkBranch({ R, L, C, joined }: BranchValues): (Problem & { part: string }) | undefined {
  const count = [R, L, C].filter((part) => part !== undefined).length;
  if (count === 0) return { part: "R", found: "none of R, L, C is given", allowed: "at least one of them" };
  if (count > 1 && joined === undefined) {
    return { part: "joined", found: "it is missing", allowed: '"series" or "parallel"' };
  }
  return undefined;
}
