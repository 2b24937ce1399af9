import { add, type Complex, complex, divide, modulus, multiply, subtract } from "../../complex.ts";
import type { Polynomial } from "../../rational.ts";
import { buildStage } from "../../stages/build.ts";
import { qOf } from "../figures.ts";
import type { PairTarget } from "./section-kinds.ts";
import type { RealisedStage } from "./types.ts";

const ROUNDS = 6;

/**
 * The target that has to be aimed at so that, with the op amp's gain–bandwidth product, the wanted one comes out: what
 * the section misses by is taken off the aim, time and again. `make` gives the section for an aim, values as computed.
 */
export function aimedAt(
  target: PairTarget,
  make: (aim: PairTarget) => RealisedStage | undefined,
): PairTarget {
  let aim = target;
  for (let round = 0; round < ROUNDS; round++) {
    const stage = make(aim);
    const found = stage === undefined ? undefined : pairOf(stage, aim);
    if (found === undefined) return target;
    aim = { f0Hz: aim.f0Hz * (target.f0Hz / found.f0Hz), q: aim.q * (target.q / found.q) };
    if (!(aim.f0Hz > 0 && aim.q > 0.5 && Number.isFinite(aim.f0Hz + aim.q))) return target;
  }
  return aim;
}

/** The section's own pole pair, found from the ideal one by Newton's method. */
function pairOf({ kind, values }: RealisedStage, near: PairTarget): PairTarget | undefined {
  const [element] = buildStage(kind, values).elements;
  if (element?.form !== "isolating" || element.transfer.type !== "rational") return undefined;
  const [section] = element.transfer.sections;
  if (section === undefined) return undefined;
  const omega = (2 * Math.PI * near.f0Hz) / section.omega0;
  const real = -omega / (2 * near.q);
  let pole = complex(real, Math.sqrt(Math.max(omega * omega - real * real, omega * omega * 1e-6)));
  for (let k = 0; k < 40; k++) pole = subtract(pole, newtonStep(section.den, pole));
  if (!(pole.re < 0 && pole.im > 0)) return undefined;
  return { f0Hz: (modulus(pole) * section.omega0) / (2 * Math.PI), q: qOf(pole) };
}

function newtonStep(p: Polynomial, at: Complex): Complex {
  let [value, slope] = [complex(0), complex(0)];
  for (let k = p.length - 1; k >= 0; k--) {
    slope = add(multiply(slope, at), value);
    value = add(multiply(value, at), complex(p[k]));
  }
  return modulus(slope) === 0 ? complex(0) : divide(value, slope);
}
