import { secondOrder } from "../ideal.ts";

/** Ideal second-order notch. */
export const notch2 = secondOrder(
  { kind: "notch-2", summary: "ideal second-order notch", formula: "(1 + x²)/(1 + x/Q + x²), x = s/2πf0" },
  () => [1, 0, 1],
);
