import { formatQuantity } from "../core/units/format.ts";
import type { ResolvedChain } from "../document/resolve.ts";

/** The span of frequencies that a chain's measured responses cover together. */
export interface MeasuredRange {
  /** Names of the stages, safe to show. */
  readonly names: readonly string[];
  readonly fromHz: number;
  readonly toHz: number;
}

/** Of the stages in the line; undefined where none is measured. `fromHz` is above `toHz` where two have no common span. */
export function measuredRange({ stages }: ResolvedChain): MeasuredRange | undefined {
  const measured = stages
    .filter(({ off }) => !off)
    .flatMap(({ name, values }) =>
      Object.values(values).flatMap((value) =>
        typeof value === "object" && value.type === "table"
          ? { name, fromHz: value.freqHz[0], toHz: value.freqHz[value.freqHz.length - 1] }
          : [],
      ),
    );
  if (measured.length === 0) return undefined;
  return {
    names: measured.map(({ name }) => name),
    fromHz: Math.max(...measured.map(({ fromHz }) => fromHz)),
    toHz: Math.min(...measured.map(({ toHz }) => toHz)),
  };
}

/** `10 Hz to 20 kHz, the range of "cable sweep"`. */
export function rangeWords({ names, fromHz, toHz }: MeasuredRange): string {
  const shownNames = names.map((name) => `"${name}"`).join(" and ");
  if (fromHz > toHz) return `no frequency, because the ranges of ${shownNames} have none in common`;
  return `${hertz(fromHz)} to ${hertz(toHz)}, the measured range of ${shownNames}`;
}

export const isOutside = ({ fromHz, toHz }: MeasuredRange, freqHz: number): boolean =>
  freqHz < fromHz || freqHz > toHz;

/** Why there is no value at a frequency, and where there is one. */
export function noValue(resolved: ResolvedChain, freqHz: number): { found: string; allowed: string } {
  const range = measuredRange(resolved);
  if (range !== undefined && isOutside(range, freqHz)) {
    return { found: `there is no value at ${hertz(freqHz)}`, allowed: rangeWords(range) };
  }
  return {
    found: `there is no finite value at ${hertz(freqHz)}`,
    allowed: "a frequency beside it or nearer to those of real parts",
  };
}

export const hertz = (freqHz: number): string => formatQuantity(freqHz, "hertz", 6);
