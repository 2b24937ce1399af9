import { secondOrder } from "../ideal.ts";

/** Ideal second-order band-pass. */
export const bandpass2 = secondOrder(
  {
    kind: "bandpass-2",
    summary: "ideal second-order band-pass, unity at f0",
    formula: "(x/Q)/(1 + x/Q + x²), x = s/2πf0",
  },
  (Q) => [0, 1 / Q],
);
