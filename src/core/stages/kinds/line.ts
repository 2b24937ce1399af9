import { DB_PER_NEPER } from "../../units/decibel.ts";
import { defineKind, frequency, lossDb, metres, optional, orZero, plain, resistance } from "../kind.ts";

interface LineValues {
  readonly Z0: number;
  readonly length: number;
  readonly velocity: number;
  readonly loss?: number;
  readonly lossAt?: number;
}

/** m/s, exact (SI). */
const SPEED_OF_LIGHT = 299_792_458;

/** Uniform line of real characteristic impedance; skin-effect loss. */
export const line = defineKind<LineValues>({
  kind: "line",
  group: "passive",
  summary: "uniform cable: characteristic impedance, length, loss",
  circuit: "A = D = cosh γl, B = Z0·sinh γl, C = sinh γl / Z0",
  formula: "open: 1/cosh γl, γ = α + j2πf/(velocity·c), α rising with √f",
  source: "Pozar, Microwave Engineering, section 2.1 and table 4.1",
  parts: [
    resistance("Z0", "characteristic impedance", { initial: "50" }),
    metres("length", "length", { initial: "60" }),
    plain("velocity", "velocity as a fraction of that of light", {
      range: { from: 1e-6, to: 1, whole: false },
      initial: "0.66",
    }),
    optional(orZero(lossDb("loss", "loss in dB per 100 m at lossAt"))),
    optional(frequency("lossAt", "frequency at which the loss is given")),
  ],
  check: ({ loss = 0, lossAt }) =>
    loss > 0 && lossAt === undefined
      ? {
          part: "lossAt",
          found: "it is missing",
          allowed: "the frequency at which the loss is given, as in 10M",
        }
      : undefined,
  elements: ({ Z0, length, velocity, loss = 0, lossAt = 1 }) => [
    {
      form: "distributed",
      z0Ohm: Z0,
      delayS: length / (velocity * SPEED_OF_LIGHT),
      lossNeper: (loss * length) / (100 * DB_PER_NEPER),
      lossAtHz: lossAt,
    },
  ],
});
