import type { Element } from "./elements/element.ts";
import { type Rational, rational } from "./rational.ts";

/** What the gain is counted against; see `response/exact.ts`. */
export type Against = "emf" | "input" | "insertion";

export interface ChainStage {
  readonly name: string;
  readonly kind: string;
  /** From its input to its output. */
  readonly elements: readonly Element[];
}

/** A chain as the engine takes it: every value checked, stages that are out of the line left out. */
export interface Chain {
  readonly sourceImpedance: Rational;
  readonly stages: readonly ChainStage[];
  /** Absent when the output is left open. */
  readonly loadImpedance: Rational | undefined;
  readonly against: Against;
}

export interface ChainInput {
  readonly source?: Rational | undefined;
  readonly stages: readonly ChainStage[];
  readonly load?: Rational | undefined;
  readonly against?: Against | undefined;
}

/** A chain behind an ideal source, into an open output, counted against the EMF, unless said otherwise. */
export function makeChain(input: ChainInput): Chain {
  return {
    sourceImpedance: input.source ?? rational([0]),
    stages: input.stages,
    loadImpedance: input.load,
    against: input.against ?? "emf",
  };
}
