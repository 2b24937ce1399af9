import type { FilterSpec } from "../../filters/transform.ts";
import { logSpaced } from "../../response/grid.ts";
import { fail, ok, type Problem, type Result } from "../../result.ts";
import { buildStage } from "../../stages/build.ts";
import type { PartValues } from "../../stages/kind.ts";
import { activeSteps } from "./active.ts";
import { around, neighbours } from "./candidates.ts";
import { GainOf } from "./response.ts";
import { sallenKey } from "./section-kinds.ts";
import { allSteps, type PartsBin, type Realisation, type RealisedStage } from "./types.ts";

/** Kinds of ideal stages that can be made of real parts. */
export const REALISABLE = ["filter", "lowpass-1", "lowpass-2", "highpass-2", "bandpass-2"] as const;

/**
 * An ideal stage made of series values: low-passes as Sallen–Key sections, a second-order high-pass as the same circuit
 * with resistors and capacitors exchanged, a band-pass as a multiple-feedback section.
 */
export function realiseStage(kind: string, values: PartValues, bin: PartsBin): Result<Realisation> {
  switch (kind) {
    case "filter":
      return realiseFilter(values, bin);
    case "lowpass-1":
      return realiseLowpass({ family: "butterworth", order: 1, f0: values.f0 as number }, bin);
    case "lowpass-2":
    case "highpass-2":
    case "bandpass-2":
      return chosen(kind, values as { f0: number; Q: number }, bin);
    default:
      return fail({ found: `a ${kind} stage is not made of sections`, allowed: REALISABLE.join(", ") });
  }
}

function realiseFilter(values: PartValues, bin: PartsBin): Result<Realisation> {
  const { shape, family, order, corner, ripple } = values as Record<string, never>;
  if (shape !== "lowpass")
    return fail({ found: `a ${shape} filter`, allowed: "a lowpass, or single sections" });
  const spec: FilterSpec = { shape, family, order, cornerHz: corner, rippleDb: ripple };
  return allSteps(activeSteps(spec, edgesAround(corner), sallenKey, bin));
}

/** From a decade below the corner to half a decade above it. */
const edgesAround = (cornerHz: number) => ({
  passHz: cornerHz,
  passLossDb: 1,
  stopHz: 3 * cornerHz,
  stopLossDb: 2,
});

function realiseLowpass(
  { family, order, f0 }: { family: "butterworth"; order: number; f0: number },
  bin: PartsBin,
): Result<Realisation> {
  const spec: FilterSpec = { shape: "lowpass", family, order, cornerHz: f0 };
  return allSteps(activeSteps(spec, edgesAround(f0), sallenKey, bin));
}

const WEIGHED_AT = 40;

/** The set of series values whose response departs least from the ideal stage's, a decade to both sides. */
function chosen(
  kind: string,
  target: { readonly f0: number; readonly Q: number },
  bin: PartsBin,
): Result<Realisation> {
  const freqsHz = logSpaced(target.f0 / 10, target.f0 * 10, WEIGHED_AT);
  const gain = new GainOf(freqsHz);
  const ideal = gain.stages([{ kind, name: "", values: { f0: target.f0, Q: target.Q } }]);
  let best: { readonly stage: RealisedStage; readonly worst: number } | undefined;
  for (const stage of CANDIDATES[kind as keyof typeof CANDIDATES](target, bin)) {
    const found = gain.stages([stage]);
    const worst = found.reduce((most, value, k) => Math.max(most, Math.abs(value - ideal[k])), 0);
    if (best === undefined || worst < best.worst) best = { stage, worst };
  }
  if (best === undefined)
    return fail<Problem>({ found: "no series values come near it", allowed: "another impedance level" });
  // Throws for values that the kind would not take.
  buildStage(best.stage.kind, best.stage.values);
  return ok({ stages: [best.stage], passErrorDb: best.worst, stopErrorDb: best.worst, warnings: [] });
}

type Target = { readonly f0: number; readonly Q: number };

const openLoop = ({ gbwHz }: PartsBin) => (gbwHz === undefined ? {} : { gbw: gbwHz });

const CANDIDATES = {
  "lowpass-2": function* ({ f0, Q }: Target, bin: PartsBin): Iterable<RealisedStage> {
    for (const stage of sallenKey.pair({ f0Hz: f0, q: Q }, bin)) yield { ...stage, name: "low-pass section" };
  },
  /** Equal capacitors: R1 = 1/(2Q·ω0·C), R2 = 2Q/(ω0·C). Source: Op Amps for Everyone, ch. 16. */
  "highpass-2": function* ({ f0, Q }: Target, bin: PartsBin): Iterable<RealisedStage> {
    const omega = 2 * Math.PI * f0;
    for (const C of around(1 / (omega * bin.resistanceOhm), bin.capacitors)) {
      for (const R1 of neighbours(1 / (2 * Q * omega * C), bin.resistors)) {
        for (const R2 of neighbours((2 * Q) / (omega * C), bin.resistors)) {
          yield {
            kind: "sallen-key-highpass",
            name: "high-pass section",
            values: { C1: C, C2: C, R1, R2, ...openLoop(bin) },
          };
        }
      }
    }
  },
  /**
   * Equal capacitors and a gain of one at the centre: R3 = 2Q/(ω0·C), R1 = R3/2, 1/R2 = ω0²·C²·R3 − 1/R1.
   * Source: Op Amps for Everyone, ch. 16.
   */
  "bandpass-2": function* ({ f0, Q }: Target, bin: PartsBin): Iterable<RealisedStage> {
    const omega = 2 * Math.PI * f0;
    for (const C of around(1 / (omega * bin.resistanceOhm), bin.capacitors)) {
      for (const R3 of neighbours((2 * Q) / (omega * C), bin.resistors)) {
        for (const R1 of neighbours(R3 / 2, bin.resistors)) {
          const conductance = omega * omega * C * C * R3 - 1 / R1;
          if (!(conductance > 0)) continue;
          for (const R2 of neighbours(1 / conductance, bin.resistors)) {
            yield {
              kind: "mfb-bandpass",
              name: "band-pass section",
              values: { R1, R2, R3, C1: C, C2: C, ...openLoop(bin) },
            };
          }
        }
      }
    }
  },
} as const;
