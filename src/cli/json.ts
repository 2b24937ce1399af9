import type { Charset } from "../core/units/format.ts";
import { jsonMadeSafe, jsonToAscii } from "./ascii.ts";

/** One JSON document with the line ended. */
export function jsonText(value: unknown, charset: Charset): string {
  return safeJson(`${JSON.stringify(value, null, 2)}\n`, charset);
}

/** JSON text as it can be shown anywhere. */
export const safeJson = (json: string, charset: Charset): string =>
  charset === "ascii" ? jsonToAscii(jsonMadeSafe(json)) : jsonMadeSafe(json);
