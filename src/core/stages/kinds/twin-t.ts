import type { LumpedElement } from "../../elements/element.ts";
import { add, multiply, scale } from "../../polynomial.ts";
import { capacitance, defineKind, resistance } from "../kind.ts";

interface TwinTValues {
  readonly R1: number;
  readonly R2: number;
  readonly R3: number;
  readonly C1: number;
  readonly C2: number;
  readonly C3: number;
}

/** Two tees in parallel, a notch at 1/(2πRC) when R1 = R2 = 2·R3 and C1 = C2 = C3/2. */
export const twinT = defineKind<TwinTValues>({
  kind: "twin-t",
  group: "passive",
  summary: "notch of two tees in parallel",
  circuit: "tee R1–R2 with C3 to common, beside tee C1–C2 with R3 to common",
  formula: "balanced, x = sRC: (1 + x²)/(1 + 4x + x²)",
  source: "admittances of parallel two-ports add; Pozar, Microwave Engineering, table 4.2",
  parts: [
    resistance("R1", "resistor at the input", { initial: "31.8k" }),
    resistance("R2", "resistor at the output", { initial: "31.8k" }),
    resistance("R3", "resistor to common", { initial: "15.9k" }),
    capacitance("C1", "capacitor at the input", { initial: "100n" }),
    capacitance("C2", "capacitor at the output", { initial: "100n" }),
    capacitance("C3", "capacitor to common", { initial: "200n" }),
  ],
  elements: (values) => [twinTee(values)],
});

/**
 * With the two tees' own determinants `P = R1 + R2 + sC3R1R2` and `Q = 1 + sR3(C1 + C2)` as common denominator:
 * n = −y21·PQ, a = y22·PQ, b = PQ, c = det(y)·PQ, d = y11·PQ, in which every division cancels.
 */
function twinTee({ R1, R2, R3, C1, C2, C3 }: TwinTValues): LumpedElement {
  const P = [R1 + R2, C3 * R1 * R2];
  const Q = [1, R3 * (C1 + C2)];
  const resistive = { in: [1, C3 * R2], out: [1, C3 * R1] };
  const capacitive = { in: multiply([0, C1], [1, R3 * C2]), out: multiply([0, C2], [1, R3 * C1]) };
  const through = [0, 0, C1 * C2 * R3];
  return {
    form: "lumped",
    omega0: 1,
    n: add(Q, multiply(through, P)),
    a: add(multiply(resistive.out, Q), multiply(capacitive.out, P)),
    b: multiply(P, Q),
    c: add(
      multiply([0, C3], Q),
      multiply([0, 0, C1 * C2], P),
      multiply(resistive.in, capacitive.out),
      multiply(resistive.out, capacitive.in),
      scale(through, -2),
    ),
    d: add(multiply(resistive.in, Q), multiply(capacitive.in, P)),
  };
}
