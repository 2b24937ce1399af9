import { readAt } from "../core/response/exact.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { LimitLine, VerticalEdge } from "./overlays.ts";

/** Bounds on gain in absolute dB; those that count from a frequency are moved by the gain there. */
export function gainLimitLines({ chain, limits }: ResolvedChain): readonly LimitLine[] {
  return limits
    .filter(({ quantity }) => quantity === "gain")
    .map(({ fromHz, toHz, atLeast, atMost, reHz }) => {
      const zeroDb = reHz === undefined ? 0 : readAt(chain, reHz).gainDb;
      const moved = (bound: number | undefined) => (bound === undefined ? undefined : bound + zeroDb);
      return { fromHz, toHz, atLeast: moved(atLeast), atMost: moved(atMost) };
    });
}

/** Half the sample rate, and the edge of the wanted band. */
export function converterEdges({ converter }: ResolvedChain): readonly VerticalEdge[] {
  if (converter === undefined) return [];
  const { rateHz, bandHz } = converter;
  return [
    { freqHz: rateHz / 2, kind: "fold" },
    ...(bandHz === undefined ? [] : [{ freqHz: bandHz, kind: "band" as const }]),
  ];
}
