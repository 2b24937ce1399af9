/**
 * Jacobi elliptic functions by the descending Landen transformation. Moduli go in pairs `k² + kc² = 1`, both kept, since
 * either may be so near 1 that the other could not be recovered from it. Arguments are fractions of the quarter period K.
 *
 * Source: S. J. Orfanidis, Lecture Notes on Elliptic Filter Design (2006); Abramowitz and Stegun, ch. 16 and 17.
 */
export interface Modulus {
  readonly k: number;
  readonly kc: number;
}

export const complementary = ({ k, kc }: Modulus): Modulus => ({ k: kc, kc: k });

export interface JacobiValues {
  readonly sn: number;
  readonly cn: number;
  readonly dn: number;
}

/** Arithmetic-geometric mean of two positive numbers. `K(k) = π / (2·agm(1, kc))`. */
export function arithmeticGeometricMean(first: number, second: number): number {
  let a = first;
  let b = second;
  while (Math.abs(a - b) > 4 * Number.EPSILON * a) {
    [a, b] = [(a + b) / 2, Math.sqrt(a) * Math.sqrt(b)];
  }
  return (a + b) / 2;
}

/** `K(kc) / K(k)`. */
export const quarterPeriodRatio = ({ k, kc }: Modulus): number =>
  arithmeticGeometricMean(1, kc) / arithmeticGeometricMean(1, k);

/** The modulus whose `K(kc) / K(k)` is `ratio`, from theta functions of the smaller of the two nomes. */
export function modulusOfRatio(ratio: number): Modulus {
  if (ratio < 1) return complementary(modulusOfRatio(1 / ratio));
  const nome = Math.exp(-Math.PI * ratio);
  const theta3 = 1 + 2 * (nome + nome ** 4 + nome ** 9 + nome ** 16);
  const theta4 = 1 + 2 * (-nome + nome ** 4 - nome ** 9 + nome ** 16);
  const theta2 = 2 * Math.exp((-Math.PI * ratio) / 4) * (1 + nome ** 2 + nome ** 6 + nome ** 12);
  return { k: (theta2 / theta3) ** 2, kc: (theta4 / theta3) ** 2 };
}

/**
 * `sn, cn, dn` at `fraction·K`, where `rest = 1 − fraction` is given too so that neither loses digits.
 * Only sums of positive terms occur, hence full relative accuracy of all three.
 */
export function jacobi(fraction: number, rest: number, modulus: Modulus): JacobiValues {
  if (modulus.k < 1e-9) {
    return { sn: Math.sin((Math.PI / 2) * fraction), cn: Math.sin((Math.PI / 2) * rest), dn: 1 };
  }
  const next = landen(modulus);
  const { sn, cn, dn } = jacobi(fraction, rest, next);
  const square = sn * sn;
  const den = 1 + next.k * square;
  return {
    sn: ((1 + next.k) * sn) / den,
    cn: (cn * dn) / den,
    dn: (cn * cn + ((2 * modulus.kc) / (1 + modulus.kc)) * square) / den,
  };
}

/** One descending step: `k → (k / (1 + kc))²`. */
function landen({ k, kc }: Modulus): Modulus {
  return { k: (k / (1 + kc)) ** 2, kc: (2 * Math.sqrt(kc)) / (1 + kc) };
}

/** The fraction of K at which `sn/cn = tangent`, by Gauss's ascending phase; tangent ≥ 0. */
export function fractionOfTangent(tangent: number, { kc }: Modulus): number {
  let phase = Math.atan(tangent);
  let a = 1;
  let b = kc;
  let doublings = 0;
  while (Math.abs(a - b) > 4 * Number.EPSILON * a) {
    const tangentNow = Math.tan(phase);
    const turns = Math.round((phase - Math.atan(tangentNow)) / Math.PI);
    phase += Math.atan((b / a) * tangentNow) + turns * Math.PI;
    [a, b] = [(a + b) / 2, Math.sqrt(a) * Math.sqrt(b)];
    doublings += 1;
  }
  return phase / 2 ** doublings / (Math.PI / 2);
}
