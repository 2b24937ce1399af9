import { secondOrder } from "../ideal.ts";

/** Ideal second-order all-pass. */
export const allpass2 = secondOrder(
  {
    kind: "allpass-2",
    summary: "ideal second-order all-pass: phase only",
    formula: "(1 − x/Q + x²)/(1 + x/Q + x²), x = s/2πf0",
  },
  (Q) => [1, -1 / Q, 1],
);
