/** Complex arithmetic of the tests' own, so that nothing under test is used to check it. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const complex = (re: number, im = 0): Complex => ({ re, im });

export const plus = (a: Complex, b: Complex): Complex => complex(a.re + b.re, a.im + b.im);

export const minus = (a: Complex, b: Complex): Complex => complex(a.re - b.re, a.im - b.im);

export const times = (a: Complex, b: Complex): Complex =>
  complex(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re);

export const scaled = (a: Complex, factor: number): Complex => complex(a.re * factor, a.im * factor);

export const magnitude = (a: Complex): number => Math.sqrt(a.re * a.re + a.im * a.im);

export function over(a: Complex, b: Complex): Complex {
  const square = b.re * b.re + b.im * b.im;
  return complex((a.re * b.re + a.im * b.im) / square, (a.im * b.re - a.re * b.im) / square);
}

/** Principal square root: the one with a real part that is not negative. */
export function squareRoot(a: Complex): Complex {
  const radius = Math.sqrt(magnitude(a));
  const angle = Math.atan2(a.im, a.re) / 2;
  return complex(radius * Math.cos(angle), radius * Math.sin(angle));
}

/** e to the power a. */
export const exponential = (a: Complex): Complex =>
  complex(Math.exp(a.re) * Math.cos(a.im), Math.exp(a.re) * Math.sin(a.im));

/** Principal natural logarithm. */
export const logarithm = (a: Complex): Complex => complex(Math.log(magnitude(a)), phaseRad(a));

export const phaseRad = (a: Complex): number => Math.atan2(a.im, a.re);

export const phaseDeg = (a: Complex): number => (phaseRad(a) * 180) / Math.PI;

export const gainDb = (a: Complex): number => 20 * Math.log10(magnitude(a));

/** Smallest distance between two angles in degrees, modulo 360. */
export function angleApartDeg(aDeg: number, bDeg: number): number {
  const apart = (((aDeg - bDeg) % 360) + 360) % 360;
  return Math.min(apart, 360 - apart);
}
