import { addSeries, addShunt } from "./branch-loops.ts";
import { gain, phase } from "./polar-loops.ts";
import { keepPairInRange, keepProductInRange } from "./range-loops.ts";
import type { Step } from "./samples.ts";
import { clearCurrent, start } from "./start-loops.ts";
import { addSampledSeries, addSampledShunt, carryMatrix, multiply, multiplySection } from "./step-loops.ts";
import { BLOCK_SIZE } from "./working.ts";

/** So many steps may be taken before the numbers are looked at for leaving the range of double precision. */
const STEPS_BETWEEN_CHECKS = 16;

/**
 * Gain in dB and phase in (−180, 180] of a row of steps, given from source to load, over a grid of angular frequencies
 * in rad/s. The pair (V, I) is carried from the load to the source; see `two-port.ts` for the same at one frequency.
 */
export function carryAll(
  steps: readonly Step[],
  omega: Float64Array,
  gainDb: Float64Array,
  phaseDeg: Float64Array,
): void {
  const changesProduct = steps.some(changesN);
  const keepInRange = (count: number) => {
    keepPairInRange(count);
    if (changesProduct) keepProductInRange(count);
  };
  for (let at = 0; at < omega.length; at += BLOCK_SIZE) {
    const count = Math.min(BLOCK_SIZE, omega.length - at);
    start(at, count, omega);
    for (let taken = 1; taken <= steps.length; taken++) {
      take(steps[steps.length - taken], at, count);
      if (taken % STEPS_BETWEEN_CHECKS === 0) keepInRange(count);
    }
    keepInRange(count);
    gain(at, count, gainDb);
    phase(at, count, phaseDeg);
  }
}

function take(step: Step, at: number, count: number): void {
  switch (step.form) {
    case "series":
      addSeries(count, step.branch);
      break;
    case "sampled series":
      addSampledSeries(at, count, step.impedance);
      break;
    case "shunt":
      addShunt(count, step.branch);
      break;
    case "sampled shunt":
      addSampledShunt(at, count, step.admittance);
      break;
    case "isolation":
      clearCurrent();
      break;
    case "section":
      multiplySection(count, step.section);
      break;
    case "factor":
      multiply(at, count, step.by);
      break;
    case "matrix":
      carryMatrix(at, count, step);
      multiply(at, count, step.n);
      break;
  }
}

const changesN = ({ form }: Step): boolean => form === "section" || form === "factor" || form === "matrix";
