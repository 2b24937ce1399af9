import type { Chain } from "../chain.ts";
import {
  add,
  type Dual,
  divide,
  dual,
  evaluateRational,
  magnitude,
  multiply,
  ONE,
  scale,
  ZERO,
} from "../dual.ts";
import { DB_PER_NEPER, fromDb, toDb, toDegrees, wrapDeg } from "../units/decibel.ts";
import { carry, type Pair } from "./two-port.ts";

/** Everything that is read at one frequency, from the exact response. */
export interface Reading {
  readonly freqHz: number;
  /** −Infinity where nothing comes out at all. */
  readonly gainDb: number;
  /** |H| */
  readonly ratio: number;
  /** (−180, 180]; NaN at a null. */
  readonly phaseDeg: number;
  /** −dφ/dω in seconds; NaN at a null. */
  readonly groupDelayS: number;
  /** d(gain)/d(log10 f) in dB per decade; NaN at a null. */
  readonly slopeDbPerDecade: number;
  /** The source first, then the stages in the line: `20·log10 |V_k / V_(k−1)|`; they add up to the gain against EMF. */
  readonly shares: readonly { readonly name: string; readonly gainDb: number }[];
  /** Impedance looking on from behind the source and behind each stage, ohm; Infinity into an open output. */
  readonly impedanceOhm: readonly { readonly re: number; readonly im: number }[];
}

/**
 * Reads the chain at one frequency (Hz, greater than zero).
 *
 *   H = Πn / (v_0 + Zs·i_0)      V_k / E = (n_1…n_k)·v_k / (v_0 + Zs·i_0)      Z_k = v_k / i_k
 *
 * Where a zero meets a zero (a lossless trap right across an ideal source, say) the limit is read beside it.
 * Where a measured response ends there is no value: every number is NaN.
 * Source: cascade of transmission matrices, Pozar, Microwave Engineering, section 4.4.
 */
export function readAt(chain: Chain, freqHz: number): Reading {
  const here = readStrictly(chain, freqHz);
  if (!Number.isNaN(here.gainDb) && !here.shares.some((share) => Number.isNaN(share.gainDb))) return here;
  const beside = readStrictly(chain, freqHz * (1 + LIMIT_STEP));
  return { ...beside, freqHz, ...(Number.isNaN(here.gainDb) ? {} : { ...here, shares: beside.shares }) };
}

/** Far above rounding, far below any bandwidth. */
const LIMIT_STEP = 1e-9;

/** A complex number with its derivative, times two to the power `exponent`: chains multiply far beyond 1e308. */
interface Scaled {
  readonly value: Dual;
  readonly exponent: number;
}

interface Node {
  /** Voltage and current behind the stage, to be multiplied by 2^exponent. */
  readonly pair: Pair;
  readonly exponent: number;
  /** Product of the stage's `n`. */
  readonly n: Scaled;
}

function readStrictly(chain: Chain, freqHz: number): Reading {
  const omega = 2 * Math.PI * freqHz;
  const nodes = carryBack(chain, omega);
  const { numerator, denominator } = transferOf(chain, nodes, omega);
  const gainDb = levelDb(numerator) - levelDb(denominator);
  const silent = gainDb === -Infinity;
  const slope = add(logDerivative(numerator.value), scale(logDerivative(denominator.value), -1));
  return {
    freqHz,
    gainDb,
    ratio: silent ? 0 : fromDb(gainDb),
    phaseDeg: silent ? Number.NaN : angleDeg(divide(numerator.value, denominator.value)),
    groupDelayS: silent ? Number.NaN : -slope.im,
    slopeDbPerDecade: silent ? Number.NaN : DB_PER_NEPER * Math.LN10 * omega * slope.re,
    shares: sharesOf(chain, nodes, omega),
    impedanceOhm: nodes.map(({ pair }) => impedance(pair)),
  };
}

/** The node behind the source, then the node behind each stage; each holds the `n` of the stage before it. */
function carryBack(chain: Chain, omega: number): Node[] {
  let pair = loadPair(chain, omega);
  let exponent = 0;
  const nodes: Node[] = [];
  for (const { elements } of [...chain.stages].reverse()) {
    const behind = { pair, exponent };
    let n = UNIT;
    for (const element of [...elements].reverse()) {
      const carried = carry(element, pair, omega);
      // An isolating element divides by the pair, and so by the pair's scale, and starts a new pair of its own.
      const isolating = element.form === "isolating";
      n = times(n, { value: carried.n, exponent: isolating ? -exponent : 0 });
      const shift = shiftOf(Math.max(magnitude(carried.v), magnitude(carried.i)));
      pair = { v: scale(carried.v, 2 ** -shift), i: scale(carried.i, 2 ** -shift) };
      exponent = (isolating ? 0 : exponent) + shift;
    }
    nodes.unshift({ ...behind, n });
  }
  nodes.unshift({ pair, exponent, n: UNIT });
  return nodes;
}

function loadPair(chain: Chain, omega: number): Pair {
  if (chain.loadImpedance === undefined) return { v: ONE, i: ZERO };
  const { num, den } = evaluateRational(chain.loadImpedance, omega);
  return { v: num, i: den };
}

/** H as a fraction that needs no division by an impedance. */
function transferOf(chain: Chain, nodes: readonly Node[], omega: number) {
  const last = nodes[nodes.length - 1];
  const output = nodes.reduce((product, node) => times(product, node.n), voltage(last));
  if (chain.against === "input") return { numerator: output, denominator: voltage(nodes[0]) };
  const { n, emf } = sourceAt(chain, nodes[0], omega);
  const numerator = times(output, n);
  if (chain.against === "emf") return { numerator, denominator: emf };
  // Against what the load would get with the chain taken out, ZL / (Zs + ZL).
  const direct = sourceAt(chain, { pair: loadPair(chain, omega), exponent: 0, n: UNIT }, omega);
  const directOutput = times({ value: loadPair(chain, omega).v, exponent: 0 }, direct.n);
  return { numerator: times(numerator, direct.emf), denominator: times(emf, directOutput) };
}

/** The source's branch is one more series element: its `n`, and the EMF that the pair behind it stands for. */
function sourceAt(chain: Chain, first: Node, omega: number): { n: Scaled; emf: Scaled } {
  const carried = carry({ form: "series", impedance: chain.sourceImpedance }, first.pair, omega);
  return {
    n: { value: carried.n, exponent: 0 },
    emf: { value: carried.v, exponent: first.exponent },
  };
}

function sharesOf(chain: Chain, nodes: readonly Node[], omega: number): Reading["shares"] {
  const { n, emf } = sourceAt(chain, nodes[0], omega);
  const voltageDb = nodes.map((node) => levelDb(voltage(node)));
  return [
    { name: "source", gainDb: levelDb(n) + voltageDb[0] - levelDb(emf) },
    ...chain.stages.map(({ name }, k) => ({
      name,
      gainDb: levelDb(nodes[k + 1].n) + voltageDb[k + 1] - voltageDb[k],
    })),
  ];
}

function impedance({ v, i }: Pair): { re: number; im: number } {
  return magnitude(i) === 0 ? { re: Infinity, im: 0 } : divide(v, i);
}

const voltage = (node: Node): Scaled => ({ value: node.pair.v, exponent: node.exponent });

const UNIT: Scaled = { value: ONE, exponent: 0 };

function times(p: Scaled, q: Scaled): Scaled {
  return normalised(multiply(p.value, q.value), p.exponent + q.exponent);
}

function normalised(value: Dual, exponent: number): Scaled {
  const shift = shiftOf(magnitude(value));
  return { value: scale(value, 2 ** -shift), exponent: exponent + shift };
}

/** The power of two that brings a magnitude near one; none for zero and for what is not finite. */
function shiftOf(size: number): number {
  return size > 0 && size < Infinity ? Math.max(-1000, Math.min(1000, Math.round(Math.log2(size)))) : 0;
}

const levelDb = ({ value, exponent }: Scaled): number => toDb(magnitude(value)) + exponent * toDb(2);

/** `d(ln z)/dω`: nepers and radians per rad/s. */
const logDerivative = (z: Dual): Dual => divide(dual(z.dRe, z.dIm), dual(z.re, z.im));

/** Angle in (−180, 180]. */
function angleDeg({ re, im }: Dual): number {
  return wrapDeg(toDegrees(Math.atan2(im, re)));
}
