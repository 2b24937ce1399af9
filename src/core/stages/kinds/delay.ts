import { exponential } from "../../dual.ts";
import { irrational } from "../../elements/make.ts";
import { idealPorts, type PortValues } from "../ideal.ts";
import { defineKind, duration } from "../kind.ts";

/** Pure delay: gain one, phase falling with frequency. */
export const delay = defineKind<PortValues & { time: number }>({
  kind: "delay",
  group: "ideal",
  summary: "pure delay",
  circuit: "ideal",
  formula: "e^(−s·time)",
  source: "shift theorem of the Laplace transform",
  parts: [duration("time", "delay", { initial: "10u" }), ...idealPorts],
  elements: ({ time, ...ports }) => [
    irrational(
      {
        at: (omega) => exponential(0, -omega * time, 0, -omega * time),
        delayS: time,
        marks: () => [],
      },
      ports,
    ),
  ],
});
