import { firstOrder } from "../ideal.ts";

/** Ideal first-order high-pass. */
export const highpass1 = firstOrder(
  { kind: "highpass-1", summary: "ideal first-order high-pass", formula: "x/(1 + x), x = s/2πf0" },
  [0, 1],
);
