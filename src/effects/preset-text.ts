import { plainText } from "../core/text.ts";
import { STAGE_PRESET_FORMAT } from "../document/stage-preset.ts";
import { FORMAT } from "../document/types.ts";

export type PresetType = "chain" | "stage";

/** What a preset's text says about itself, without being checked any further. Texts are safe to show. */
export interface PresetHead {
  readonly type: PresetType;
  /** Empty where there is none. */
  readonly title: string;
  /** Of a stage preset. */
  readonly kind?: string;
}

const MAX_TITLE = 200;
const TYPES: Readonly<Record<string, PresetType>> = { [FORMAT]: "chain", [STAGE_PRESET_FORMAT]: "stage" };

/** Undefined where it is neither a chain nor a stage. */
export function presetHead(text: string): PresetHead | undefined {
  const data = jsonObject(text);
  const format = data?.format;
  if (data === undefined || typeof format !== "string" || !Object.hasOwn(TYPES, format)) return undefined;
  const type = TYPES[format];
  const head = { type, title: shown(data.title) };
  if (type === "chain") return head;
  const stage = data.stage as { readonly kind?: unknown } | null | undefined;
  return { ...head, kind: shown(stage?.kind) };
}

const shown = (value: unknown): string => (typeof value === "string" ? plainText(value, MAX_TITLE) : "");

function jsonObject(text: string): Readonly<Record<string, unknown>> | undefined {
  try {
    const data: unknown = JSON.parse(text.replace(/^\ufeff/, ""));
    return typeof data === "object" && data !== null ? (data as Record<string, unknown>) : undefined;
  } catch {
    return undefined;
  }
}
