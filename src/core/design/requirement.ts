import type { Problem } from "../result.ts";
import { formatQuantity } from "../units/format.ts";

/** What a low-pass filter has to do: lose no more up to the pass edge, no less from the stop edge on. */
export interface Requirement {
  readonly passHz: number;
  readonly passLossDb: number;
  readonly stopHz: number;
  readonly stopLossDb: number;
}

/** What is wrong with a requirement, by the value that it is about; undefined where it makes sense. */
export function requirementProblem({
  passHz,
  passLossDb,
  stopHz,
  stopLossDb,
}: Requirement): (Problem & { readonly about: keyof Requirement }) | undefined {
  if (!(stopHz > passHz)) {
    const found = `the stop edge ${formatQuantity(stopHz, "hertz")} is not above the pass edge`;
    return { about: "stopHz", found, allowed: `more than ${formatQuantity(passHz, "hertz")}` };
  }
  if (!(passLossDb > 0 && passLossDb <= MOST_PASS_LOSS_DB)) {
    const found = `a pass loss of ${formatQuantity(passLossDb, "level")}`;
    return { about: "passLossDb", found, allowed: `above 0 dB, up to ${MOST_PASS_LOSS_DB} dB` };
  }
  if (!(stopLossDb > passLossDb && stopLossDb <= MOST_STOP_LOSS_DB)) {
    const found = `a stop loss of ${formatQuantity(stopLossDb, "level")}`;
    return { about: "stopLossDb", found, allowed: `above the pass loss, up to ${MOST_STOP_LOSS_DB} dB` };
  }
  return undefined;
}

/** Above it a band does not pass; a power of a tenth. */
const MOST_PASS_LOSS_DB = 10;
/** Far beyond any converter, and within what the families are computed to. */
const MOST_STOP_LOSS_DB = 300;
