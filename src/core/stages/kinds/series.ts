import { series } from "../../elements/make.ts";
import { type BranchValues, branchParts, checkBranch } from "../branch-parts.ts";
import { defineKind } from "../kind.ts";

/** One branch of R, L, C in the line. */
export const seriesBranch = defineKind<BranchValues>({
  kind: "series",
  group: "passive",
  summary: "one branch of R, L, C in the line",
  circuit: "the branch in the line",
  formula: "open: 1; into Z: Z/(Z + Zbranch)",
  source: "Kirchhoff's laws",
  parts: branchParts({ R: "1k" }),
  check: checkBranch,
  elements: (values) => [series(values)],
});
