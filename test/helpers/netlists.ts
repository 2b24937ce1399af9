import { type Branch, branch, type Parts } from "./netlist-parts.ts";
import { stageComponents } from "./netlist-stages.ts";
import { currentOf, solve, voltageAt } from "./nodal.ts";
import { type Complex, over } from "./nodal-complex.ts";
import type { Component, Netlist } from "./nodal-components.ts";

/** A chain as its file has it, every quantity a plain SI number. */
export interface FileChain {
  readonly source?: Branch & { readonly emf?: number };
  readonly stages: readonly FileStage[];
  readonly load?: Branch;
}

export interface FileStage {
  readonly kind: string;
  readonly name?: string;
  readonly off?: boolean;
  readonly parts: Parts;
}

export interface ChainNetlist {
  readonly netlist: Netlist;
  /** The chain's input, then the node behind every stage in the line; the last one is the load's. */
  readonly nodes: readonly string[];
  /** Of each node, the 0 V source that carries the current on into the next stage or the load. */
  readonly meters: readonly string[];
}

/** The whole chain as one network. `a0` is the DC gain of those op amps that have a `gbw`. */
export function chainNetlist(chain: FileChain, { a0 = Infinity }: { a0?: number } = {}): ChainNetlist {
  const stages = chain.stages.filter((stage) => stage.off !== true);
  const nodes = Array.from({ length: stages.length + 1 }, (_, index) => `node${index}`);
  const onward = nodes.map((node) => `${node}.onward`);
  const meters = nodes.map((node) => `${node}.meter`);
  const source = chain.source ?? {};
  const netlist: Component[] = [
    { type: "V", name: "emf", ends: ["source", "0"], volt: source.emf ?? 1 },
    ...branch(source, ["source", nodes[0]], "sourceBranch", "series"),
    ...meters.map(
      (name, index): Component => ({ type: "V", name, ends: [nodes[index], onward[index]], volt: 0 }),
    ),
    ...stages.flatMap(({ kind, parts }, index) =>
      stageComponents(kind, parts, {
        input: onward[index],
        output: nodes[index + 1],
        prefix: `stage${index}`,
        a0,
      }),
    ),
    ...branch(chain.load ?? {}, [onward[stages.length], "0"], "load", "parallel"),
  ];
  return { netlist, nodes, meters };
}

export interface NodeReading {
  readonly voltage: Complex;
  /** Current on into the next stage or the load. */
  readonly current: Complex;
}

export interface ChainReading {
  readonly emf: Complex;
  /** The chain's input, then behind every stage. */
  readonly nodes: readonly NodeReading[];
}

export function readNodes(chain: FileChain, freqHz: number, options: { a0?: number } = {}): ChainReading {
  const { netlist, nodes, meters } = chainNetlist(chain, options);
  const solution = solve(netlist, freqHz);
  return {
    emf: voltageAt(solution, "source"),
    nodes: nodes.map((node, index) => ({
      voltage: voltageAt(solution, node),
      current: currentOf(solution, meters[index]),
    })),
  };
}

export type Against = "emf" | "input" | "insertion";

/** V(load) over the EMF, over V(input), or over what the load gets straight from the source. */
export function nodalGain(chain: FileChain, freqHz: number, against: Against = "emf"): Complex {
  const reading = readNodes(chain, freqHz);
  return over(outputOf(reading), referenceOf(reading, chain, freqHz, against));
}

/** The three gains of a chain already read. */
export function gainsOf(reading: ChainReading, chain: FileChain, freqHz: number): Record<Against, Complex> {
  const gain = (against: Against) => over(outputOf(reading), referenceOf(reading, chain, freqHz, against));
  return { emf: gain("emf"), input: gain("input"), insertion: gain("insertion") };
}

const outputOf = ({ nodes }: ChainReading): Complex => nodes[nodes.length - 1].voltage;

function referenceOf(reading: ChainReading, chain: FileChain, freqHz: number, against: Against): Complex {
  if (against === "emf") return reading.emf;
  if (against === "input") return reading.nodes[0].voltage;
  return readNodes({ ...chain, stages: [] }, freqHz).nodes[0].voltage;
}
