import { isolating } from "../../elements/make.ts";
import { add, multiply, scale } from "../../polynomial.ts";
import { rational } from "../../rational.ts";
import { capacitance, defineKind, optional, resistance } from "../kind.ts";
import { gbwPart, inParallel, inSeries, inverseOpenLoopGain } from "../op-amp.ts";

interface InvertingValues {
  readonly Rg: number;
  readonly Rf: number;
  readonly Cg?: number;
  readonly Cf?: number;
  readonly gbw?: number;
}

/** Inverting op-amp stage; with Cf an integrator with a leak, with Cg a differentiator with a stop. */
export const inverting = defineKind<InvertingValues>({
  kind: "inverting",
  group: "active",
  summary: "inverting op-amp stage, with Cf or Cg a shelving one",
  circuit: "Zg = Rg + Cg to the − input, Zf = Rf‖Cf from there to the output",
  formula: "−Zf/(Zg + (Zg + Zf)/A), A = 2π·gbw/s; input impedance Zg + Zf/(1 + A)",
  source: "Op Amps for Everyone, inverting amplifier; one-pole op amp",
  parts: [
    resistance("Rg", "resistor to the − input", { initial: "10k" }),
    resistance("Rf", "feedback resistor", { initial: "100k" }),
    optional(capacitance("Cg", "capacitor in series with Rg")),
    optional(capacitance("Cf", "capacitor across Rf")),
    gbwPart,
  ],
  elements: ({ Rg, Rf, Cg, Cf, gbw }) => {
    const zg = inSeries(Rg, Cg);
    const zf = inParallel(Rf, Cf);
    const inverseA = inverseOpenLoopGain(gbw);
    const input = multiply(zg.num, zf.den);
    const feedback = multiply(zf.num, zg.den);
    const loop = add(input, multiply(add(input, feedback), inverseA));
    const admittance = rational(multiply(multiply(zg.den, zf.den), add([1], inverseA)), loop);
    return [{ ...isolating(rational(scale(feedback, -1), loop)), inputAdmittance: admittance }];
  },
});
