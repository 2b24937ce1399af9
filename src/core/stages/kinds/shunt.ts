import { shunt } from "../../elements/make.ts";
import { type BranchValues, branchParts, checkBranch } from "../branch-parts.ts";
import { defineKind } from "../kind.ts";

/** One branch of R, L, C from line to common. */
export const shuntBranch = defineKind<BranchValues>({
  kind: "shunt",
  group: "passive",
  summary: "one branch of R, L, C from line to common",
  circuit: "the branch from line to common",
  formula: "from zero impedance: 1; behind Zs: Zbranch/(Zs + Zbranch)",
  source: "Kirchhoff's laws",
  parts: branchParts({ C: "100n" }),
  check: checkBranch,
  elements: (values) => [shunt(values)],
});
