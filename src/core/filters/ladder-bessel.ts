import {
  add,
  type Complex,
  complex,
  conjugate,
  divide,
  modulus,
  multiply,
  scale,
  squareRoot,
  subtract,
} from "../complex.ts";
import { conjugateZeros } from "./aberth.ts";
import { besselHalfPower } from "./bessel.ts";
import { besselPoles } from "./bessel-poles.ts";

/**
 * Bessel ladder between equal resistances by Darlington's synthesis: the reflection `ρ = N/D` has `|ρ|² = 1 − |H|²`, and
 * `(D + N)/(D − N)` is expanded into a continued fraction in s.
 *
 * All zeros of ρ but the one at the origin are put in the right half plane. That gives the ladder of the published tables,
 * smallest element first, and coefficients of N that alternate in sign, so that D − N hardly cancels; with left-half-plane
 * zeros six digits are lost by order ten.
 * Source: S. Darlington, Synthesis of reactance 4-poles (1939); table convention Zverev, Handbook of Filter Synthesis (1967).
 */
export function besselLadder(order: number): readonly number[] {
  const factor = 1 / besselHalfPower(order);
  const poles = besselPoles(order).map((pole) => scale(pole, factor));
  const denominator = fromRoots(poles);
  const numerator = [0, ...fromRoots(reflectionZeros(order, poles))];
  return continuedFraction(
    denominator.map((coefficient, power) => coefficient + numerator[power]),
    denominator.map((coefficient, power) => coefficient - numerator[power]),
  );
}

/** Right-half-plane zeros of `1 − |H|²`, that at the origin left out: one of each pair. */
function reflectionZeros(order: number, poles: readonly Complex[]): readonly Complex[] {
  const squares = poles
    .flatMap((pole) => (pole.im === 0 ? [pole] : [pole, conjugate(pole)]))
    .map((p) => multiply(p, p));
  const start = circle(order - 1).map((point) => scale(point, order));
  return conjugateZeros(start, (y) => reflectionStep(squares, y)).map((y) => squareRoot(scale(y, -1)));
}

/**
 * Newton step on `(M − 1)/y`, y = ω² = −s², for the loss `M = 1/|H|² = Π(1 + y/p²)`: kept as a product, as its
 * coefficients would not pin the zeros down at high order.
 */
function reflectionStep(squares: readonly Complex[], y: Complex): Complex {
  let loss = complex(1);
  let logSlope = complex(0);
  for (const square of squares) {
    loss = multiply(loss, add(complex(1), divide(y, square)));
    logSlope = add(logSlope, divide(complex(1), add(square, y)));
  }
  const slopeOverValue = divide(multiply(loss, logSlope), subtract(loss, complex(1)));
  return divide(complex(1), subtract(slopeOverValue, divide(complex(1), y)));
}

/** Starting points for `count` zeros: pairs on the unit circle, and a negative real one if `count` is odd. */
function circle(count: number): readonly Complex[] {
  return Array.from({ length: Math.ceil(count / 2) }, (_, index) => {
    if (2 * index + 1 === count) return complex(-1);
    const angle = (Math.PI * (2 * index + 1)) / count;
    return complex(Math.cos(angle), Math.sin(angle));
  });
}

/** Monic real polynomial, ascending, of real roots and of pairs given by one root each. */
function fromRoots(roots: readonly Complex[]): readonly number[] {
  return roots.reduce<readonly number[]>(
    (product, root) => {
      const factor = root.im === 0 ? [-root.re, 1] : [modulus(root) ** 2, -2 * root.re, 1];
      return convolve(product, factor);
    },
    [1],
  );
}

function convolve(a: readonly number[], b: readonly number[]): readonly number[] {
  const product = new Array<number>(a.length + b.length - 1).fill(0);
  a.forEach((left, i) => {
    b.forEach((right, j) => {
      product[i + j] += left * right;
    });
  });
  return product;
}

/** Elements g of `g1·s + 1/(g2·s + …)`; `below` has a vanishing leading coefficient, `above` has not. */
function continuedFraction(above: readonly number[], below: readonly number[]): readonly number[] {
  const elements: number[] = [];
  let dividend = above;
  let divisor = below.slice(0, -1);
  while (divisor.length > 0) {
    const element = dividend.at(-1)! / divisor.at(-1)!;
    elements.push(element);
    const rest = dividend.map((coefficient, power) => coefficient - element * (divisor[power - 1] ?? 0));
    // The two highest powers vanish: the first by the choice of the element, the second because the rest alternates.
    [dividend, divisor] = [divisor, rest.slice(0, Math.max(divisor.length - 1, 0))];
  }
  return elements;
}
