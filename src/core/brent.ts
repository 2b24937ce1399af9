/**
 * Zero and least value of a function of one variable, without derivatives.
 * Source: R. P. Brent, Algorithms for Minimization Without Derivatives (1973), chapters 4 and 5.
 */

const MOST_STEPS = 100;

/** A zero between `a` and `b`, where the function has values of opposite sign; to the last digits of x. */
export function findZero(f: (x: number) => number, from: number, to: number): number {
  let [a, b] = [from, to];
  let [fa, fb] = [f(a), f(b)];
  let [c, fc] = [a, fa];
  let step = b - a;
  let before = step;
  for (let k = 0; k < MOST_STEPS; k++) {
    if (Math.abs(fc) < Math.abs(fb)) [a, b, c, fa, fb, fc] = [b, c, b, fb, fc, fb];
    const tolerance = 2 * Number.EPSILON * Math.abs(b);
    const half = (c - b) / 2;
    if (Math.abs(half) <= tolerance || fb === 0) return b;
    const tried = interpolated(a, fa, b, fb, c, fc, half);
    const useful = tried !== undefined && Math.abs(before) >= tolerance && Math.abs(fa) > Math.abs(fb);
    if (
      useful &&
      Math.abs(tried) < Math.min(0.75 * 2 * Math.abs(half), Math.abs(before / 2)) &&
      tried * half > 0
    ) {
      before = step;
      step = tried;
    } else {
      step = half;
      before = half;
    }
    [a, fa] = [b, fb];
    b += Math.abs(step) > tolerance ? step : Math.sign(half) * tolerance;
    fb = f(b);
    if (fb > 0 === fc > 0) {
      [c, fc] = [a, fa];
      step = b - a;
      before = step;
    }
  }
  return b;
}

/** Step from b by inverse quadratic interpolation, or by the secant where two of the points coincide. */
function interpolated(
  a: number,
  fa: number,
  b: number,
  fb: number,
  c: number,
  fc: number,
  half: number,
): number | undefined {
  if (![fa, fb, fc].every(Number.isFinite)) return undefined;
  const s = fb / fa;
  let p = 2 * half * s;
  let q = 1 - s;
  if (a !== c) {
    const [t, r] = [fa / fc, fb / fc];
    p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
    q = (t - 1) * (r - 1) * (s - 1);
  }
  return -p / q;
}

const GOLDEN = (3 - Math.sqrt(5)) / 2;
const ROOT_EPSILON = Math.sqrt(Number.EPSILON);

/** Where the function is least between `from` and `to`, one minimum lying between; to about half the digits of x. */
export function findLeast(f: (x: number) => number, from: number, to: number): number {
  let [a, b] = [from, to];
  let x = a + GOLDEN * (b - a);
  let [w, v] = [x, x];
  let fx = f(x);
  let [fw, fv] = [fx, fx];
  let step = 0;
  let before = 0;
  for (let k = 0; k < MOST_STEPS; k++) {
    const middle = (a + b) / 2;
    const tolerance = ROOT_EPSILON * Math.abs(x) * 1e-3 + Number.EPSILON;
    if (Math.abs(x - middle) <= 2 * tolerance - (b - a) / 2) return x;
    const tried = Math.abs(before) > tolerance ? parabolic(x, fx, w, fw, v, fv) : undefined;
    const useful =
      tried !== undefined && Math.abs(tried) < Math.abs(before / 2) && x + tried > a && x + tried < b;
    before = useful ? step : x < middle ? b - x : a - x;
    step = useful ? tried : GOLDEN * before;
    const u = x + (Math.abs(step) >= tolerance ? step : Math.sign(step) * tolerance);
    const fu = f(u);
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      [v, w, x, fv, fw, fx] = [w, x, u, fw, fx, fu];
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) [v, w, fv, fw] = [w, u, fw, fu];
      else if (fu <= fv || v === x || v === w) [v, fv] = [u, fu];
    }
  }
  return x;
}

/** Step from x to the vertex of the parabola through three points. */
function parabolic(x: number, fx: number, w: number, fw: number, v: number, fv: number): number | undefined {
  const r = (x - w) * (fx - fv);
  const q = (x - v) * (fx - fw);
  const step = ((x - v) * q - (x - w) * r) / (2 * (r - q));
  return Number.isFinite(step) ? step : undefined;
}
