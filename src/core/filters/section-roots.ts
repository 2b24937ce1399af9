import { type Complex, complex } from "../complex.ts";
import type { Polynomial, Rational } from "../rational.ts";

/** Poles of a section of at most second order, in rad/s. */
export const sectionPoles = (section: Rational): readonly Complex[] => roots(section.den, section.omega0);

/** Zeros of a section of at most second order, in rad/s. */
export const sectionZeros = (section: Rational): readonly Complex[] => roots(section.num, section.omega0);

function roots(coefficients: Polynomial, omega0: number): readonly Complex[] {
  const [constant, linear = 0, square = 0] = coefficients;
  if (square !== 0) return quadraticRoots(constant / square, linear / square, omega0);
  return linear === 0 ? [] : [complex((-constant / linear) * omega0)];
}

/**
 * Roots of `x² + linear·x + constant`, times omega0. Two real ones come from the larger and the product, so that neither
 * is a small difference. Source: Press et al., Numerical Recipes, §5.6.
 */
function quadraticRoots(constant: number, linear: number, omega0: number): readonly Complex[] {
  const half = -linear / 2;
  const radius = Math.sqrt(Math.max(constant, 0));
  const discriminant = (Math.abs(half) - radius) * (Math.abs(half) + radius);
  if (constant >= 0 && discriminant < 0) {
    const im = Math.sqrt(-discriminant) * omega0;
    return [complex(half * omega0, im), complex(half * omega0, -im)];
  }
  const spread = Math.sqrt(constant >= 0 ? discriminant : half * half - constant);
  const larger = half >= 0 ? half + spread : half - spread;
  if (larger === 0) return [complex(0), complex(0)];
  return [complex(larger * omega0), complex((constant / larger) * omega0)];
}
