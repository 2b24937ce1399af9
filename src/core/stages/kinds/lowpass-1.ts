import { firstOrder } from "../ideal.ts";

/** Ideal first-order low-pass. */
export const lowpass1 = firstOrder(
  { kind: "lowpass-1", summary: "ideal first-order low-pass", formula: "1/(1 + x), x = s/2πf0" },
  [1],
);
