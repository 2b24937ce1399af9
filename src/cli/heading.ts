import type { Against } from "../core/chain.ts";
import type { ResolvedChain } from "../document/resolve.ts";

const AGAINST: Readonly<Record<Against, string>> = {
  emf: "the EMF of the source",
  input: "the voltage at the chain's input",
  insertion: "what the load would get without the chain",
};

export const UNTITLED = "untitled chain";

/** Title, what gain is counted against, and what to bear in mind; in Unicode. */
export const heading = ({ title, against, cautions }: ResolvedChain): readonly string[] => [
  title || UNTITLED,
  `gain against ${AGAINST[against]}`,
  ...cautions.map((caution) => `caution: ${caution}`),
];
