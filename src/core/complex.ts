/** Complex numbers as plain pairs, for the few places where roots are worked out; sweeps use split arrays instead. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const complex = (re: number, im = 0): Complex => ({ re, im });

export const conjugate = (z: Complex): Complex => ({ re: z.re, im: -z.im });

export const add = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });

export const subtract = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im });

export const scale = (z: Complex, factor: number): Complex => ({ re: z.re * factor, im: z.im * factor });

export const multiply = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});

/** Modulus without overflow. */
export const modulus = (z: Complex): number => Math.hypot(z.re, z.im);

/**
 * `a / b` with the larger component of `b` divided out first, so that squares neither overflow nor vanish.
 * Source: R. L. Smith, Algorithm 116: Complex division, Communications of the ACM 5 (1962).
 */
export function divide(a: Complex, b: Complex): Complex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re;
    const den = b.re + b.im * ratio;
    return { re: (a.re + a.im * ratio) / den, im: (a.im - a.re * ratio) / den };
  }
  const ratio = b.re / b.im;
  const den = b.re * ratio + b.im;
  return { re: (a.re * ratio + a.im) / den, im: (a.im * ratio - a.re) / den };
}

/** Natural logarithm, imaginary part in (−π, π]. */
export const logarithm = (z: Complex): Complex => ({ re: Math.log(modulus(z)), im: Math.atan2(z.im, z.re) });

/**
 * Square root with real part ≥ 0; the smaller component comes from the larger one, not from a difference.
 * Source: W. Kahan, Branch cuts for complex elementary functions (1987).
 */
export function squareRoot(z: Complex): Complex {
  if (z.re === 0 && z.im === 0) return { re: 0, im: z.im };
  const large = Math.sqrt((Math.abs(z.re) + modulus(z)) / 2);
  const small = z.im / (2 * large);
  if (z.re >= 0) return { re: large, im: small };
  return { re: Math.abs(small), im: z.im < 0 || Object.is(z.im, -0) ? -large : large };
}
