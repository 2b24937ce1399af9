import { type Against, type Chain, makeChain } from "../../src/core/chain.ts";
import { branchImpedance } from "../../src/core/elements/branch.ts";
import type { Rational } from "../../src/core/rational.ts";
import { buildStage } from "../../src/core/stages/build.ts";
import type { Branch } from "./netlist-parts.ts";
import type { FileChain } from "./netlists.ts";

/** The same chain as the engine takes it: the one bridge between the nodal helpers and the code under test. */
export function engineChain(chain: FileChain, against: Against): Chain {
  const stages = chain.stages.filter((stage) => stage.off !== true);
  return makeChain({
    source: impedance(chain.source ?? {}, "series"),
    stages: stages.map(({ kind, parts, name }) => buildStage(kind, parts, name)),
    load: isOpen(chain.load) ? undefined : impedance(chain.load!, "parallel"),
    against,
  });
}

const isOpen = (load: Branch | undefined): boolean =>
  load === undefined || [load.R, load.L, load.C].every((part) => part === undefined);

function impedance({ R, L, C, joined }: Branch, usual: "series" | "parallel"): Rational {
  return branchImpedance({
    R,
    L,
    C,
    joined: joined === undefined ? usual : joined === "series" ? "series" : "parallel",
  });
}
