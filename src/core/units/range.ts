import type { Problem } from "../result.ts";
import type { NumberRange } from "../stages/kind.ts";
import { formatExact } from "./format.ts";
import { notFinite } from "./refusal.ts";
import type { UnitTag } from "./unit.ts";

/** Why `value`, in SI units of `unit`, is outside `range`; undefined when it is inside. NaN and ±Infinity never are. */
export function checkRange(value: number, range: NumberRange, unit: UnitTag): Problem | undefined {
  if (!Number.isFinite(value)) return notFinite(String(value));
  if (isInside(value, range)) return undefined;
  return { found: formatExact(value, unit), allowed: rangeText(range, unit) };
}

/** The range in words: `more than 0 Ω`, `a whole number from 1 to 30`. */
export function rangeText(range: NumberRange, unit: UnitTag): string {
  const zero = formatExact(0, unit);
  if (range === "positive") return `more than ${zero}`;
  if (range === "nonNegative") return `${zero} or more`;
  if (range === "nonZero") return `anything but ${zero}`;
  if (range === "any") return "a finite number";
  const bounds = `from ${formatExact(range.from, unit)} to ${formatExact(range.to, unit)}`;
  return range.whole ? `a whole number ${bounds}` : bounds;
}

function isInside(value: number, range: NumberRange): boolean {
  if (range === "positive") return value > 0;
  if (range === "nonNegative") return value >= 0;
  if (range === "nonZero") return value !== 0;
  if (range === "any") return true;
  return value >= range.from && value <= range.to && (!range.whole || Number.isInteger(value));
}
