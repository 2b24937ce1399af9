import { isolating } from "../../elements/make.ts";
import { add, multiply } from "../../polynomial.ts";
import { rational } from "../../rational.ts";
import { capacitance, defineKind, optional, orZero, resistance } from "../kind.ts";
import { gbwPart, inParallel, inSeries, inverseOpenLoopGain } from "../op-amp.ts";

interface NoninvertingValues {
  readonly Rf: number;
  readonly Rg: number;
  readonly Cf?: number;
  readonly Cg?: number;
  readonly gbw?: number;
  readonly Rin?: number;
  readonly Cin?: number;
}

/** Non-inverting op-amp stage. */
export const noninverting = defineKind<NoninvertingValues>({
  kind: "noninverting",
  group: "active",
  summary: "non-inverting op-amp stage",
  circuit: "Zf = Rf‖Cf from the output to the − input, Zg = Rg + Cg from there to common",
  formula: "G/(1 + G/A), G = 1 + Zf/Zg, A = 2π·gbw/s",
  source: "Op Amps for Everyone, non-inverting amplifier; one-pole op amp",
  parts: [
    resistance("Rf", "feedback resistor", { initial: "90k" }),
    resistance("Rg", "resistor to common", { initial: "10k" }),
    optional(capacitance("Cf", "capacitor across Rf")),
    optional(capacitance("Cg", "capacitor in series with Rg")),
    gbwPart,
    optional(resistance("Rin", "input resistance")),
    optional(orZero(capacitance("Cin", "input capacitance"))),
  ],
  elements: ({ Rf, Rg, Cf, Cg, gbw, Rin, Cin }) => {
    const zg = inSeries(Rg, Cg);
    const zf = inParallel(Rf, Cf);
    const lower = multiply(zg.num, zf.den);
    const whole = add(lower, multiply(zf.num, zg.den));
    const loop = add(lower, multiply(whole, inverseOpenLoopGain(gbw)));
    return [isolating(rational(whole, loop), { Rin, Cin })];
  },
});
