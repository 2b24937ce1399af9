import { type Against, type FileChain, nodalGain } from "./netlists.ts";
import { type Complex, complex, logarithm, magnitude, minus, over, plus, scaled } from "./nodal-complex.ts";

/**
 * d(ln H)/d(ln f) of the nodal response: nepers and radians per neper of frequency.
 *
 * Central differences over shrinking steps, extrapolated to none; of all the estimates the one that its neighbours
 * confirm best, with how far apart they are.
 * Source: C. J. F. Ridders, Accurate computation of F'(x) and F'(x)F''(x), Adv. Eng. Software 4 (1982) 75–76.
 */
export function nodalSlope(
  chain: FileChain,
  freqHz: number,
  against: Against,
): { readonly value: Complex; readonly uncertainty: number } {
  let best = { value: complex(Number.NaN), uncertainty: Infinity };
  let previous: Complex[] = [];
  for (let level = 0; level < LEVELS; level++) {
    const row = [difference(chain, freqHz, against, WIDEST * RATIO ** -level)];
    for (let k = 1; k <= level; k++) {
      const gain = RATIO ** (2 * k) - 1;
      row.push(plus(row[k - 1], scaled(minus(row[k - 1], previous[k - 1]), 1 / gain)));
      const apart = Math.max(magnitude(minus(row[k], row[k - 1])), magnitude(minus(row[k], previous[k - 1])));
      if (apart < best.uncertainty) best = { value: row[k], uncertainty: apart };
    }
    previous = row;
  }
  return best;
}

/** First step in ln f: small against an octave. Ten steps of 1.6 go down to 7e-4 of frequency, below a Q of 1000. */
const WIDEST = 0.05;
const RATIO = 1.6;
const LEVELS = 10;

/** The quotient's angle is far from ±180° for any step of these, so no unwrapping is needed. */
function difference(chain: FileChain, freqHz: number, against: Against, step: number): Complex {
  const above = nodalGain(chain, freqHz * Math.exp(step), against);
  const below = nodalGain(chain, freqHz * Math.exp(-step), against);
  return scaled(logarithm(over(above, below)), 1 / (2 * step));
}
