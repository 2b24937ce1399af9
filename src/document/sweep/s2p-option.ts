import { fail, ok, type Problem, type Result } from "../../core/result.ts";
import { FREQUENCY_UNITS } from "./column.ts";
import { shown } from "./problem.ts";

/** What the option line of a version 1 file says. */
export interface S2pOption {
  readonly unit: { readonly name: string; readonly scale: number };
  readonly format: "RI" | "MA" | "DB";
  readonly referenceOhm: number;
}

const ALLOWED =
  "option lines such as # GHz S MA R 50 (Hz, kHz, MHz or GHz; S; RI, MA or DB; R and a resistance)";
const OTHER_PARAMETERS = ["Y", "Z", "H", "G"];

/**
 * `# <unit> <parameter> <format> R <n>`, in any order and case, each at most once; left out: GHz, S, MA, R 50.
 * Source: IBIS Open Forum, Touchstone File Format Specification Rev 1.1 (2002), "Option Line".
 */
export function readOption(line: string): Result<S2pOption> {
  const words = line.slice(1, MAX_LENGTH).trim().toUpperCase().split(/\s+/).filter(Boolean);
  const seen = new Map<string, string>();
  for (let index = 0; index < words.length; index += 1) {
    const word = words[index];
    const slot = slotOf(word);
    if (OTHER_PARAMETERS.includes(word))
      return fail({ found: `${word} parameters`, allowed: "S parameters" });
    if (slot === undefined) return fail(bad(`${shown(word)} in the option line`));
    if (seen.has(slot)) return fail(bad(`two entries for the ${slot} in the option line`));
    if (slot === "resistance") index += 1;
    seen.set(slot, words[index] ?? "");
  }
  const referenceOhm = Number(seen.get("resistance") ?? 50);
  if (!(referenceOhm > 0 && referenceOhm < Infinity))
    return fail(bad(`R ${shown(seen.get("resistance") ?? "")}`));
  const unit = FREQUENCY_UNITS[(seen.get("unit") ?? "GHZ").toLowerCase()];
  return ok({ unit, format: (seen.get("format") ?? "MA") as S2pOption["format"], referenceOhm });
}

const MAX_LENGTH = 1000;

function slotOf(word: string): string | undefined {
  if (Object.hasOwn(FREQUENCY_UNITS, word.toLowerCase())) return "unit";
  if (word === "S") return "parameter";
  if (word === "R") return "resistance";
  return word === "RI" || word === "MA" || word === "DB" ? "format" : undefined;
}

const bad = (found: string): Problem => ({ found, allowed: ALLOWED });
