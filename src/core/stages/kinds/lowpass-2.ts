import { secondOrder } from "../ideal.ts";

/** Ideal second-order low-pass. */
export const lowpass2 = secondOrder(
  { kind: "lowpass-2", summary: "ideal second-order low-pass", formula: "1/(1 + x/Q + x²), x = s/2πf0" },
  () => [1],
);
