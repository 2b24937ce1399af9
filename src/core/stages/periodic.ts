import type { IrrationalTransfer } from "../elements/element.ts";

/** At most so many nulls of a sampled stage are looked at singly. */
const MOST_MARKS = 2000;

/** Value and derivative by its argument of a real function. */
interface Sample {
  readonly value: number;
  readonly slope: number;
}

/**
 * `e^(−jω·delay) · g(f/rate)^power` with g real: what hold, moving average and decimator have in common.
 * @param nullsHz spacing of the nulls
 * @param isNull which multiples of that spacing are nulls
 */
export function linearPhase(options: {
  readonly rate: number;
  readonly delayS: number;
  readonly power: number;
  readonly size: (turns: number) => Sample;
  readonly nullsHz: number;
  readonly isNull: (multiple: number) => boolean;
}): Omit<IrrationalTransfer, "type"> {
  const { rate, delayS, power, size, nullsHz, isNull } = options;
  return {
    at: (omega) => {
      const turns = omega / (2 * Math.PI * rate);
      const g = size(turns);
      const real = g.value ** power;
      const slope = (power * g.value ** (power - 1) * g.slope) / (2 * Math.PI * rate);
      const [cos, sin] = [Math.cos(omega * delayS), -Math.sin(omega * delayS)];
      return [real * cos, real * sin, slope * cos + real * sin * delayS, slope * sin - real * cos * delayS];
    },
    delayS,
    marks: (fromHz, toHz) => {
      const marks: number[] = [];
      const first = Math.max(1, Math.ceil(fromHz / nullsHz));
      for (let k = first; k * nullsHz <= toHz && marks.length < MOST_MARKS; k++) {
        if (isNull(k)) marks.push(k * nullsHz);
      }
      return marks;
    },
  };
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
