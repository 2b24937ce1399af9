import { complex } from "../complex.ts";
import {
  complementary,
  fractionOfTangent,
  type JacobiValues,
  jacobi,
  type Modulus,
  modulusOfRatio,
  quarterPeriodRatio,
} from "./elliptic-functions.ts";
import { excessPower, type Prototype, type PrototypeSection } from "./sections.ts";

/**
 * Elliptic: equal ripple up to x = 1, at least `stopDb` of loss from the stop edge `1/k` on, where k follows from the
 * degree equation `K'/K = K1'/(n·K1)` with `k1² = (10^(ripple/10) − 1) / (10^(stop/10) − 1)`.
 * Zeros `±j / (k·cd(u·K))`, poles `j·cd((u − j·v)·K)`, u = (2i − 1)/n; gain at DC −ripple for even n.
 * Source: S. J. Orfanidis, Lecture Notes on Elliptic Filter Design (2006). Needs stopDb > rippleDb.
 */
export function elliptic(order: number, rippleDb: number, stopDb: number): Prototype {
  const modulus = selectivity(order, rippleDb, stopDb);
  const height = imaginaryPart(rippleDb, stopDb, modulus);
  const pairs = Array.from({ length: Math.floor(order / 2) }, (_, index) =>
    poleAndZero((order - 2 * index - 1) / order, (2 * index + 1) / order, modulus, height),
  );
  const single: PrototypeSection[] = order % 2 === 1 ? [{ pole: complex(-height.sn / height.cn) }] : [];
  return { sections: [...pairs, ...single], dcGain: order % 2 === 0 ? 10 ** (-rippleDb / 20) : 1 };
}

/** Where the loss has reached `stopDb`, over the ripple edge. */
export function ellipticStopEdge(order: number, rippleDb: number, stopDb: number): number {
  return 1 / selectivity(order, rippleDb, stopDb).k;
}

/** Closer than this to the corner, poles and zeros are no longer told apart well enough in double precision. */
const NARROWEST_TRANSITION = 1e-8;

/** Greatest order, up to `limit`, whose stop edge can still be told from the corner; 0 if there is none. */
export function largestEllipticOrder(rippleDb: number, stopDb: number, limit: number): number {
  let order = limit;
  while (order > 0 && transition(order, rippleDb, stopDb) < NARROWEST_TRANSITION) order -= 1;
  return order;
}

/** Stop edge less one: `1/k − 1` by way of kc, which keeps its digits. */
function transition(order: number, rippleDb: number, stopDb: number): number {
  const { k, kc } = selectivity(order, rippleDb, stopDb);
  return (kc * kc) / (k * (1 + k));
}

function selectivity(order: number, rippleDb: number, stopDb: number): Modulus {
  return modulusOfRatio(quarterPeriodRatio(discrimination(rippleDb, stopDb)) / order);
}

function discrimination(rippleDb: number, stopDb: number): Modulus {
  const stopExcess = excessPower(stopDb);
  const k = Math.sqrt(excessPower(rippleDb)) / Math.sqrt(stopExcess);
  const kc = Math.sqrt(excessPower(stopDb - rippleDb)) * Math.sqrt(10 ** (rippleDb / 10) / stopExcess);
  return { k, kc };
}

/**
 * Elliptic functions of modulus kc at the poles' imaginary argument. By the degree equation its fraction of K' is the
 * one of K1' where `sn/cn = 1/ε`; counted from the nearer end of the quarter period.
 */
function imaginaryPart(rippleDb: number, stopDb: number, modulus: Modulus): JacobiValues {
  const conjugateModulus = complementary(discrimination(rippleDb, stopDb));
  const fromZero = 1 / Math.sqrt(excessPower(rippleDb));
  const fromEnd = Math.sqrt(excessPower(stopDb));
  const near = fractionOfTangent(Math.min(fromZero, fromEnd), conjugateModulus);
  const [fraction, rest] = fromZero <= fromEnd ? [near, 1 - near] : [1 - near, near];
  return jacobi(fraction, rest, complementary(modulus));
}

/** `j·sn(a + j·b)` by the addition theorem, from real functions of a (modulus k) and b (modulus kc). */
function poleAndZero(fraction: number, rest: number, modulus: Modulus, b: JacobiValues): PrototypeSection {
  const a = jacobi(fraction, rest, modulus);
  const den = b.cn * b.cn + (modulus.k * a.sn * b.sn) ** 2;
  return {
    pole: complex((-a.cn * a.dn * b.sn * b.cn) / den, (a.sn * b.dn) / den),
    zero: 1 / (modulus.k * a.sn),
  };
}
