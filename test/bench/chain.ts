import { type Chain, type ChainStage, makeChain } from "../../src/core/chain.ts";
import { rational } from "../../src/core/rational.ts";
import { logSpaced } from "../../src/core/response/grid.ts";
import { buildStage } from "../../src/core/stages/build.ts";

/** Twelve LC sections that load each other, as plain numbers, so that every contender starts from the same. */
export interface Section {
  readonly L: number;
  readonly Rw: number;
  readonly C: number;
  readonly Rc: number;
}

export const SOURCE_OHM = 50;
export const LOAD_OHM = 600;

export const SECTIONS: readonly Section[] = Array.from({ length: 12 }, (_, k) => ({
  L: 1e-3 * (1 + 0.1 * k),
  Rw: 2 + 0.1 * k,
  C: 1e-7 / (1 + 0.05 * k),
  Rc: 0.1 + 0.01 * k,
}));

export const FREQS_HZ = logSpaced(10, 1e6, 1000);

const stageOf = (section: Section, k: number): ChainStage =>
  buildStage("lc-lowpass", { ...section }, `section ${k + 1}`);

export const STAGES: readonly ChainStage[] = SECTIONS.map(stageOf);

/** All sections made anew, so that nothing is known of them. */
export const freshStages = (): readonly ChainStage[] => SECTIONS.map(stageOf);

export const chainOf = (stages: readonly ChainStage[]): Chain =>
  makeChain({ source: rational([SOURCE_OHM]), stages, load: rational([LOAD_OHM]) });

/** The middle section with another capacitor. */
export const editedStages = (factor: number): readonly ChainStage[] =>
  STAGES.map((stage, k) => (k === 6 ? stageOf({ ...SECTIONS[6], C: SECTIONS[6].C * factor }, 6) : stage));

/** How the others multiply the chain: whole 2×2 matrices, or only the pair of voltage and current. */
export type Form = "matrices" | "pair";
