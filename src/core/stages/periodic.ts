import { dual, exponential, integerPower, multiply } from "../dual.ts";
import type { IrrationalTransfer } from "../elements/element.ts";

/** At most so many nulls and tops between them are looked at singly, from the lowest on. */
const MOST_LOBES = 1000;
/** And so many images of the pass band, each with the nulls beside it. */
const MOST_IMAGES = 1000;

/** Value and derivative by its argument of a real function. */
interface Sample {
  readonly value: number;
  readonly slope: number;
}

/**
 * `e^(−jω·delay) · g(f/rate)^power` with g real: what hold, moving average and decimator have in common.
 * @param nullsHz spacing of the nulls
 * @param repeats whether the pass band comes back at every multiple of the rate
 */
export function linearPhase(options: {
  readonly rate: number;
  readonly delayS: number;
  readonly power: number;
  readonly size: (turns: number) => Sample;
  readonly nullsHz: number;
  readonly repeats: boolean;
}): Omit<IrrationalTransfer, "type"> {
  const { rate, delayS, power, size, nullsHz, repeats } = options;
  return {
    at: (omega) => {
      const turns = omega / (2 * Math.PI * rate);
      const { value, slope } = size(turns);
      const real = integerPower(dual(value, 0, turns * slope), power);
      return multiply(real, exponential(0, -omega * delayS, 0, -omega * delayS));
    },
    delayS,
    marks: (fromHz, toHz) => {
      const lobes = multiples(nullsHz / 2, fromHz, toHz, MOST_LOBES);
      const seenHz = lobes[lobes.length - 1] ?? fromHz;
      const images = repeats ? multiples(rate, seenHz, toHz + nullsHz, MOST_IMAGES) : [];
      return [...lobes, ...images.flatMap((image) => [image - nullsHz, image, image + nullsHz])];
    },
  };
}

/** The multiples of `stepHz` within the range, at most so many of the lowest. */
function multiples(stepHz: number, fromHz: number, toHz: number, most: number): readonly number[] {
  const first = Math.max(1, Math.ceil(fromHz / stepHz));
  const count = Math.min(most, Math.floor(toHz / stepHz) - first + 1);
  return Array.from({ length: Math.max(0, count) }, (_, k) => (first + k) * stepHz);
}

/** `sin(π·x)`, exactly zero at whole numbers (to rounding of x) and with the sign that belongs there. */
export function sinPi(x: number): Sample {
  const turns = Math.round(x);
  const rest = x - turns;
  const sign = turns % 2 === 0 ? 1 : -1;
  const settled = Math.abs(rest) <= 2 * Number.EPSILON * Math.abs(x) ? 0 : rest;
  return { value: sign * Math.sin(Math.PI * settled), slope: sign * Math.PI * Math.cos(Math.PI * settled) };
}

/** `sin(π·x)/(π·x)` and its derivative. */
export function sinc(x: number): Sample {
  if (x === 0) return { value: 1, slope: 0 };
  const sine = sinPi(x);
  const value = sine.value / (Math.PI * x);
  return { value, slope: (sine.slope / Math.PI - value) / x };
}

/** `sin(π·M·x)/(M·sin(π·x))` and its derivative: the mean of M samples, x in turns of the sample rate. */
export function dirichlet(x: number, M: number): Sample {
  const upper = sinPi(M * x);
  const lower = sinPi(x);
  // Beside a multiple of the rate both vanish: the value is ±1 there, flat.
  if (Math.abs(lower.value) < 1e-9) {
    const turns = Math.round(x);
    return { value: (turns * (M - 1)) % 2 === 0 ? 1 : -1, slope: 0 };
  }
  const value = upper.value / (M * lower.value);
  return { value, slope: (upper.slope - value * lower.slope) / lower.value };
}
