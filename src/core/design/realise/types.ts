import type { Result } from "../../result.ts";
import type { SeriesName } from "../../units/e-series.ts";

/** What real parts are chosen from, and around which impedance. */
export interface PartsBin {
  readonly resistors: SeriesName;
  readonly capacitors: SeriesName;
  /** Resistors of active sections, or the source of a ladder. */
  readonly resistanceOhm: number;
  /** Gain-bandwidth product of the op amps; without it they are ideal. */
  readonly gbwHz?: number;
}

/** A stage with part values in SI units. */
export interface RealisedStage {
  readonly kind: string;
  readonly name: string;
  readonly values: Readonly<Record<string, number>>;
}

/** What a section has to be: one real pole without `q`, else a pair. */
export interface SectionTarget {
  readonly f0Hz: number;
  readonly q?: number;
}

/** A realised filter. */
export interface Realisation {
  readonly stages: readonly RealisedStage[];
  /** Of a ladder. */
  readonly sourceOhm?: number;
  readonly loadOhm?: number;
  /** Greatest departure from the ideal response, up to the pass edge and up to the stop edge. */
  readonly passErrorDb: number;
  readonly stopErrorDb: number;
  readonly warnings: readonly string[];
}

/** A realisation in steps that take some ten milliseconds each at most. */
export type Steps = Generator<void, Result<Realisation>>;

/** All steps at once. */
export function allSteps(steps: Steps): Result<Realisation> {
  for (;;) {
    const next = steps.next();
    if (next.done) return next.value;
  }
}
