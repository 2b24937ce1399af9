import { fail, ok, type Result } from "../result.ts";
import { quoted } from "../text.ts";
import { formatPercent } from "./format.ts";
import { parseQuantity } from "./quantity.ts";
import { UNITS } from "./unit.ts";

const ALLOWED = "a tolerance above 0 and below 100 %, as in 5% or 0.05";

/** Relative tolerance as a fraction above 0 and below 1: `5%`, or a bare number as the fraction itself. */
export function parseTolerance(input: string | number): Result<number> {
  const parsed = parseQuantity(input, "number");
  if (!parsed.ok) {
    const { found, allowed } = parsed.problem;
    return fail({ found, allowed: allowed === UNITS.number.wanted ? ALLOWED : allowed });
  }
  const fraction = parsed.value;
  if (fraction > 0 && fraction < 1) return ok(fraction);
  const shown = typeof input === "number" ? String(input) : quoted(input.trim());
  return fail({ found: `${shown} is ${formatPercent(fraction)}`, allowed: ALLOWED });
}
