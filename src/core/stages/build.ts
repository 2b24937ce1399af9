import type { ChainStage } from "../chain.ts";
import { stageKind } from "./index.ts";
import type { PartValues } from "./kind.ts";

/** A stage of the given kind from checked part values in SI units. Throws a RangeError for a kind that is not there. */
export function buildStage(kind: string, values: PartValues, name: string = kind): ChainStage {
  const found = stageKind(kind);
  if (found === undefined) throw new RangeError(`no stage kind "${kind}"`);
  return { name, kind, elements: found.elements(values) };
}
