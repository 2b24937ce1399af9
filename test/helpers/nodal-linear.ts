import { type Complex, complex, magnitude, minus, over, times } from "./nodal-complex.ts";

/** A complex matrix by rows, real and imaginary parts apart. */
export interface ComplexRow {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export const zeroRow = (size: number): ComplexRow => ({
  re: new Float64Array(size),
  im: new Float64Array(size),
});

/**
 * Gaussian elimination with partial pivoting: the returned function solves M·x = e for any e.
 * Source: G. H. Golub, C. F. Van Loan, Matrix Computations, algorithm 3.4.1. Throws for a singular matrix.
 */
export function factorise(matrix: readonly ComplexRow[]): (right: readonly Complex[]) => Complex[] {
  const rows = matrix.map(({ re, im }) => ({ re: re.slice(), im: im.slice() }));
  const order = rows.map((_, index) => index);
  for (let k = 0; k < rows.length; k++) {
    const pivot = largestBelow(rows, k);
    [rows[k], rows[pivot]] = [rows[pivot], rows[k]];
    [order[k], order[pivot]] = [order[pivot], order[k]];
    if (magnitude(entry(rows[k], k)) === 0) throw new Error("the network has no unique solution");
    for (let i = k + 1; i < rows.length; i++) eliminate(rows[i], rows[k], k);
  }
  return (right) =>
    substitute(
      rows,
      order.map((index) => right[index]),
    );
}

const entry = ({ re, im }: ComplexRow, column: number): Complex => complex(re[column], im[column]);

function largestBelow(rows: readonly ComplexRow[], k: number): number {
  let best = k;
  for (let i = k + 1; i < rows.length; i++) {
    if (magnitude(entry(rows[i], k)) > magnitude(entry(rows[best], k))) best = i;
  }
  return best;
}

/** Takes the pivot's row off a row below it and leaves the factor in place of the zero. */
function eliminate(row: ComplexRow, pivot: ComplexRow, k: number): void {
  if (row.re[k] === 0 && row.im[k] === 0) return;
  const factor = over(entry(row, k), entry(pivot, k));
  row.re[k] = factor.re;
  row.im[k] = factor.im;
  for (let j = k + 1; j < row.re.length; j++) {
    row.re[j] -= factor.re * pivot.re[j] - factor.im * pivot.im[j];
    row.im[j] -= factor.re * pivot.im[j] + factor.im * pivot.re[j];
  }
}

function substitute(rows: readonly ComplexRow[], right: readonly Complex[]): Complex[] {
  const x = [...right];
  for (let i = 0; i < x.length; i++) x[i] = minus(x[i], product(rows[i], x, 0, i));
  for (let i = x.length - 1; i >= 0; i--) {
    x[i] = over(minus(x[i], product(rows[i], x, i + 1, x.length)), entry(rows[i], i));
  }
  return x;
}

/** Sum of row·x over the columns `from` to before `to`. */
export function product(row: ComplexRow, x: readonly Complex[], from = 0, to = x.length): Complex {
  let re = 0;
  let im = 0;
  for (let j = from; j < to; j++) {
    if (row.re[j] === 0 && row.im[j] === 0) continue;
    const term = times(entry(row, j), x[j]);
    re += term.re;
    im += term.im;
  }
  return complex(re, im);
}
