import { firstOrder } from "../ideal.ts";

/** Ideal first-order all-pass. */
export const allpass1 = firstOrder(
  {
    kind: "allpass-1",
    summary: "ideal first-order all-pass: phase only",
    formula: "(1 − x)/(1 + x), x = s/2πf0",
  },
  [1, -1],
);
