import { secondOrder } from "../ideal.ts";

/** Ideal second-order high-pass. */
export const highpass2 = secondOrder(
  { kind: "highpass-2", summary: "ideal second-order high-pass", formula: "x²/(1 + x/Q + x²), x = s/2πf0" },
  () => [0, 0, 1],
);
