import { sweepProblemText } from "../../../src/document/sweep/problem.ts";
import { type ReadSweepOptions, readSweep } from "../../../src/document/sweep/read.ts";
import type { MeasuredSweep } from "../../../src/document/sweep/sweep.ts";

/** The sweep of a text that must be one. */
export function sweepOf(text: string, fileName = "pump2.csv", options: ReadSweepOptions = {}): MeasuredSweep {
  const result = readSweep(text, fileName, options);
  if (!result.ok) throw new Error(sweepProblemText(result.problem));
  return result.value;
}

/** The one line about a text that must be refused. */
export function refusalOf(text: string, fileName = "pump2.csv", options: ReadSweepOptions = {}): string {
  const result = readSweep(text, fileName, options);
  if (result.ok) throw new Error(`read as ${JSON.stringify(result.value.understood)}`);
  return sweepProblemText(result.problem);
}

/** The curve as plain arrays. */
export const curveOf = ({ freqHz, gainDb, phaseDeg }: MeasuredSweep) => ({
  freqHz: [...freqHz],
  gainDb: [...gainDb],
  ...(phaseDeg && { phaseDeg: [...phaseDeg] }),
});
