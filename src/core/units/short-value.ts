import { formatExact } from "./format.ts";
import { UNITS, type UnitTag } from "./unit.ts";

/** Short, as an engineer writes it into a file: `4.7k`, `100n`; reads back as exactly the same value. */
export function shortValue(value: number, unit: UnitTag): string {
  const text = formatExact(value, unit, "ascii");
  const symbol = UNITS[unit].ascii;
  if (symbol === "" || unit === "level" || !text.endsWith(symbol)) return text;
  return text.slice(0, -symbol.length).replace(" ", "");
}
