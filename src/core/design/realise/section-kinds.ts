import { around, fromUp, neighbours } from "./candidates.ts";
import type { PartsBin, RealisedStage, SectionTarget } from "./types.ts";

/** A section wanted of two poles; `q` is there. */
export interface PairTarget extends SectionTarget {
  readonly q: number;
}

/** How sections of one circuit are made: every set of series values worth trying, for a pair and for a single pole. */
export interface SectionKind {
  readonly pair: (target: PairTarget, bin: PartsBin) => Iterable<RealisedStage>;
  readonly single: (target: SectionTarget, bin: PartsBin) => Iterable<readonly RealisedStage[]>;
}

const CAPACITORS_ABOVE = 4;

const openLoop = ({ gbwHz }: PartsBin) => (gbwHz === undefined ? {} : { gbw: gbwHz });

/**
 * Sallen–Key with a gain of one: with C1 to the output and C2 to common, R1 + R2 = 1/(ω0·Q·C2) and
 * R1·R2 = 1/(ω0²·C1·C2), which needs C1 ≥ 4Q²·C2. Source: Op Amps for Everyone, ch. 16.
 */
export const sallenKey: SectionKind = {
  pair: function* ({ f0Hz, q }, bin) {
    const omega = 2 * Math.PI * f0Hz;
    for (const C2 of around(1 / (omega * bin.resistanceOhm * 2 * q), bin.capacitors)) {
      for (const C1 of fromUp(4 * q * q * C2, bin.capacitors, CAPACITORS_ABOVE)) {
        const sum = 1 / (omega * q * C2);
        const product = 1 / (omega * omega * C1 * C2);
        const root = Math.sqrt(Math.max(0, sum * sum - 4 * product));
        for (const R1 of neighbours((sum + root) / 2, bin.resistors)) {
          for (const R2 of neighbours((sum - root) / 2, bin.resistors)) {
            yield { kind: "sallen-key-lowpass", name: "", values: { R1, R2, C1, C2, ...openLoop(bin) } };
          }
        }
      }
    }
  },
  single: function* ({ f0Hz }, bin) {
    const omega = 2 * Math.PI * f0Hz;
    for (const C of around(1 / (omega * bin.resistanceOhm), bin.capacitors)) {
      for (const R of neighbours(1 / (omega * C), bin.resistors)) {
        const follower = bin.gbwHz === undefined ? { gain: 1 } : { gain: 1, bandwidth: bin.gbwHz };
        yield [
          { kind: "rc-lowpass", name: "", values: { R, C } },
          { kind: "amplifier", name: "follower", values: follower },
        ];
      }
    }
  },
};

/**
 * Multiple feedback with a gain of −1: R1 = R2, and C2·R2² − b·R2 + 2a/C1 = 0 with a = 1/ω0², b = 1/(ω0·Q), which needs
 * C1 ≥ 8Q²·C2; R3 = a/(R2·C1·C2). Source: Op Amps for Everyone, ch. 16.
 */
export const multipleFeedback: SectionKind = {
  pair: function* ({ f0Hz, q }, bin) {
    const omega = 2 * Math.PI * f0Hz;
    const [a, b] = [1 / (omega * omega), 1 / (omega * q)];
    for (const C2 of around(1 / (omega * bin.resistanceOhm * 2 * q), bin.capacitors)) {
      for (const C1 of fromUp(8 * q * q * C2, bin.capacitors, CAPACITORS_ABOVE)) {
        const root = Math.sqrt(Math.max(0, b * b - (8 * C2 * a) / C1));
        for (const R2 of neighbours((b + root) / (2 * C2), bin.resistors)) {
          for (const R3 of neighbours(a / (R2 * C1 * C2), bin.resistors)) {
            yield { kind: "mfb-lowpass", name: "", values: { R1: R2, R2, R3, C1, C2, ...openLoop(bin) } };
          }
        }
      }
    }
  },
  single: function* ({ f0Hz }, bin) {
    const omega = 2 * Math.PI * f0Hz;
    for (const Cf of around(1 / (omega * bin.resistanceOhm), bin.capacitors)) {
      for (const R of neighbours(1 / (omega * Cf), bin.resistors)) {
        yield [{ kind: "inverting", name: "", values: { Rg: R, Rf: R, Cf, ...openLoop(bin) } }];
      }
    }
  },
};
