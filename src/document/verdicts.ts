import { checkLimit } from "../core/limits/check.ts";
import { checkFolding, type Folding, idealSignalToNoiseDb } from "../core/limits/folding.ts";
import type { Verdict } from "../core/limits/limit.ts";
import type { ResolvedChain } from "./resolve.ts";

/** What a chain's own limits and converter ask of it, and how far it keeps that. */
export interface Verdicts {
  readonly pass: boolean;
  /** In the order of the chain's limits. */
  readonly limits: readonly Verdict[];
  /** Only with a converter that has a band, and a resolution or a need given by hand. */
  readonly folding: Folding | undefined;
}

/** Checks every limit, and what folds into the converter's band; `neededDb` is wanted there, else what the bits give. */
export function verdictsOn(resolved: ResolvedChain, neededDb?: number): Verdicts {
  const { chain, sweep } = resolved;
  const limits = resolved.limits.map((limit) => checkLimit(chain, limit, sweep));
  const folding = foldingOf(resolved, neededDb);
  return { limits, folding, pass: limits.every(({ pass }) => pass) && folding?.pass !== false };
}

function foldingOf({ chain, converter, limits, sweep }: ResolvedChain, given?: number): Folding | undefined {
  if (converter?.bandHz === undefined) return undefined;
  const { rateHz, bandHz, bits } = converter;
  const neededDb = given ?? (bits === undefined ? undefined : idealSignalToNoiseDb(bits));
  if (neededDb === undefined) return undefined;
  // The band's reference is the frequency that gain is counted from within it, where a limit names one.
  const referenceHz = limits.find(({ reHz }) => reHz !== undefined && reHz <= bandHz)?.reHz;
  const sampling = { rateHz, bandHz, neededDb, ...(referenceHz === undefined ? {} : { referenceHz }) };
  return checkFolding(chain, sampling, sweep.toHz);
}
