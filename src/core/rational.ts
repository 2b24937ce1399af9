/**
 * Rational functions of a scaled Laplace variable.
 *
 * `x = s / omega0`, `s = jω`; `num(x) / den(x)`, coefficients in ascending powers of x. Scaling to the function's own
 * corner keeps coefficients near one, so that high orders stay well conditioned.
 */

/** Real coefficients in ascending powers. */
export type Polynomial = readonly number[];

export interface Rational {
  readonly num: Polynomial;
  readonly den: Polynomial;
  /** Scale of the variable in rad/s. */
  readonly omega0: number;
}

/** `num / den` in plain s (rad/s), unless another scale is given. */
export function rational(num: Polynomial, den: Polynomial = [1], omega0 = 1): Rational {
  return { num, den, omega0 };
}
