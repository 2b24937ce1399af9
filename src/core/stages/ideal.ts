import { isolating } from "../elements/make.ts";
import type { Polynomial } from "../rational.ts";
import { rational } from "../rational.ts";
import {
  defineKind,
  frequency,
  type NumberSpec,
  optional,
  orZero,
  plain,
  resistance,
  type StageKind,
} from "./kind.ts";

/** Ports that any ideal stage may be given; without them it draws no current and has no output impedance. */
export const idealPorts: readonly NumberSpec[] = [
  optional(resistance("Rin", "input resistance")),
  optional(orZero(resistance("Rout", "output resistance"))),
];

export interface PortValues {
  readonly Rin?: number;
  readonly Rout?: number;
}

interface SectionText {
  readonly kind: string;
  readonly summary: string;
  readonly formula: string;
}

const SOURCE =
  "standard first- and second-order sections; Van Valkenburg, Analog Filter Design (from memory)";

/** An ideal first-order section, `num(x)/(1 + x)` with x = s/2πf0. */
export function firstOrder(text: SectionText, num: Polynomial): StageKind {
  return defineKind<PortValues & { f0: number }>({
    ...text,
    group: "ideal",
    circuit: "ideal, by corner",
    source: SOURCE,
    parts: [frequency("f0", "corner", { initial: "1k" }), ...idealPorts],
    elements: ({ f0, ...ports }) => [isolating(rational(num, [1, 1], 2 * Math.PI * f0), ports)],
  });
}

/** An ideal second-order section, `num(x, Q)/(1 + x/Q + x²)` with x = s/2πf0. */
export function secondOrder(text: SectionText, num: (Q: number) => Polynomial): StageKind {
  return defineKind<PortValues & { f0: number; Q: number }>({
    ...text,
    group: "ideal",
    circuit: "ideal, by corner and Q",
    source: SOURCE,
    parts: [
      frequency("f0", "corner or centre", { initial: "1k" }),
      plain("Q", "quality factor", { initial: "0.7071" }),
      ...idealPorts,
    ],
    elements: ({ f0, Q, ...ports }) => [isolating(rational(num(Q), [1, 1 / Q, 1], 2 * Math.PI * f0), ports)],
  });
}
