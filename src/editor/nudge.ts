import { SERIES_NAMES, type SeriesName, stepInSeries } from "../core/units/e-series.ts";
import { parseQuantity } from "../core/units/quantity.ts";
import { shortValue } from "../core/units/short-value.ts";
import type { UnitTag } from "../core/units/unit.ts";
import type { RawValue } from "../document/types.ts";
import type { Field } from "./rows.ts";

/** What one press of + or − does to a value. */
export type NudgeStep =
  | { readonly type: "series"; readonly series: SeriesName }
  | { readonly type: "percent"; readonly percent: number };

const PERCENTS = [0.1, 1, 5, 10] as const;

/** Every step there is to choose from, with its words. */
export const NUDGE_STEPS: readonly { readonly words: string; readonly step: NudgeStep }[] = [
  ...SERIES_NAMES.filter((name) => name !== "E3").map((series) => ({
    words: series,
    step: { type: "series", series } as const,
  })),
  ...PERCENTS.map((percent) => ({ words: `${percent} %`, step: { type: "percent", percent } as const })),
];

export const nudgeWords = (nudge: NudgeStep): string =>
  nudge.type === "series" ? nudge.series : `${nudge.percent} %`;

/** The value one step up or down, as text; undefined where it has no next one. */
export function nudged(field: Field, nudge: NudgeStep, direction: "up" | "down"): RawValue | undefined {
  if (field.type === "choice") return neighbour(field, direction);
  if (field.type !== "number" || field.unit === undefined) return undefined;
  const raw = field.raw ?? field.fallback;
  if (raw === undefined) return undefined;
  const value = parseQuantity(raw, field.unit);
  if (!value.ok) return undefined;
  const sign = direction === "up" ? 1 : -1;
  if (field.whole) return value.value + sign;
  const inDb = field.unit === "gain" && typeof raw === "string" && /dB\s*$/.test(raw);
  if (inDb) return `${rounded(20 * Math.log10(value.value) + sign)} dB`;
  if (isOnLinearScale(field.unit)) return shortValue(rounded(value.value + sign), field.unit);
  const next = onSeries(value.value, nudge, direction);
  return next === undefined ? undefined : shortValue(next, field.unit);
}

/** Levels, angles and temperatures go by ones: they pass through zero. */
const isOnLinearScale = (unit: UnitTag): boolean =>
  unit === "level" || unit === "degree" || unit === "celsius";

function onSeries(value: number, nudge: NudgeStep, direction: "up" | "down"): number | undefined {
  if (value === 0) return undefined;
  const size = Math.abs(value);
  // Down for a negative value is away from zero.
  const away = (direction === "up") === value > 0;
  const next =
    nudge.type === "series"
      ? stepInSeries(size, nudge.series, away ? "up" : "down")
      : rounded(size * (1 + nudge.percent / 100) ** (away ? 1 : -1));
  return next === undefined ? undefined : Math.sign(value) * next;
}

/** Six digits are more than any part has. */
const rounded = (value: number): number => Number(value.toPrecision(6));

function neighbour({ choices = [], raw, fallback }: Field, direction: "up" | "down"): string | undefined {
  const now = choices.indexOf(String(raw ?? fallback ?? choices[0]));
  const count = choices.length;
  return choices[(now + (direction === "up" ? 1 : -1) + count) % count];
}
