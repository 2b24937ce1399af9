import { type Charset, formatQuantity } from "../core/units/format.ts";
import type { UnitTag } from "../core/units/unit.ts";
import type { LimitQuantity } from "../document/types.ts";
import { signsOf } from "./signs.ts";

/** A value with a fixed number of decimals, so that it does not jump while the cursor moves. */
export function fixed(value: number, decimals: number, charset: Charset): string {
  if (Number.isNaN(value)) return signsOf(charset).none;
  if (!Number.isFinite(value)) return `${value < 0 ? "-" : ""}${signsOf(charset).infinity}`;
  const text = value.toFixed(decimals);
  return Number(text) === 0 ? text.replace("-", "") : text;
}

/** The same with its sign always in front, for differences. */
export function signed(value: number, decimals: number, charset: Charset): string {
  const text = fixed(value, decimals, charset);
  return value > 0 && Number.isFinite(value) && Number(text) !== 0 ? `+${text}` : text;
}

/** With exactly so many significant digits and an SI prefix: `1.000 kHz`, `79.58 µs`. */
export function scaled(value: number, unit: UnitTag, digits: number, charset: Charset): string {
  if (Number.isNaN(value)) return signsOf(charset).none;
  const text = formatQuantity(value, unit, digits, charset);
  const [, number, rest] = /^(-?[\d.]+)(.*)$/.exec(text) ?? [];
  if (number === undefined || rest === undefined || rest.startsWith("e")) return text;
  const present = number.replace(/[-.]/g, "").replace(/^0+/, "").length;
  const missing = Math.max(0, digits - Math.max(1, present));
  if (value === 0 || missing === 0) return text;
  return `${number}${number.includes(".") ? "" : "."}${"0".repeat(missing)}${rest}`;
}

/** A ratio in five digits. */
export function ratioText(ratio: number, charset: Charset): string {
  if (!Number.isFinite(ratio)) return fixed(ratio, 0, charset);
  if (ratio === 0) return "0";
  const exponent = Math.floor(Math.log10(ratio));
  return exponent >= -3 && exponent < 5 ? ratio.toPrecision(5) : ratio.toExponential(4);
}

/** A margin with its sign: how far a limit is kept, or by how much it is missed. */
export function marginText(margin: number, quantity: LimitQuantity, charset: Charset): string {
  if (quantity === "gain") return `${signed(margin, 2, charset)} dB`;
  if (quantity === "phase") return `${signed(margin, 1, charset)}${charset === "ascii" ? " deg" : "°"}`;
  return `${margin > 0 ? "+" : ""}${scaled(margin, "second", 3, charset)}`;
}
