import type { Chain } from "../chain.ts";
import { type Dual, divide, isNull, levelDb, logDerivative, multiply, ONE, plain, ZERO } from "../dual.ts";
import { evaluateRational } from "../dual-polynomial.ts";
import { DB_PER_NEPER, fromDb, toDegrees, wrapDeg } from "../units/decibel.ts";
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
  if (Number.isNaN(here.gainDb)) return { ...beside, freqHz };
  return {
    ...here,
    shares: here.shares.map((share, k) => (Number.isNaN(share.gainDb) ? beside.shares[k] : share)),
  };
}

/** Far above rounding, far below any bandwidth. */
const LIMIT_STEP = 1e-9;

interface Node {
  /** Voltage and current behind the stage, up to a common factor. */
  readonly pair: Pair;
  /** Product of the stage's `n`. */
  readonly n: Dual;
}

function readStrictly(chain: Chain, freqHz: number): Reading {
  const omega = 2 * Math.PI * freqHz;
  const nodes = carryBack(chain, omega);
  const { numerator, denominator } = transferOf(chain, nodes, omega);
  const gainDb = levelDb(numerator) - levelDb(denominator);
  const silent = gainDb === -Infinity;
  const [above, below] = [logDerivative(numerator), logDerivative(denominator)];
  return {
    freqHz,
    gainDb,
    ratio: silent ? 0 : fromDb(gainDb),
    phaseDeg: silent ? Number.NaN : angleDeg(divide(numerator, denominator)),
    groupDelayS: silent ? Number.NaN : (below.im - above.im) / omega,
    slopeDbPerDecade: silent ? Number.NaN : DB_PER_NEPER * Math.LN10 * (above.re - below.re),
    shares: sharesOf(chain, nodes, omega),
    impedanceOhm: nodes.map(({ pair }) => impedance(pair)),
  };
}

/** The node behind the source, then the node behind each stage; each holds the `n` of the stage before it. */
function carryBack(chain: Chain, omega: number): Node[] {
  let pair = loadPair(chain, omega);
  const nodes: Node[] = [];
  for (const { elements } of [...chain.stages].reverse()) {
    const behind = pair;
    let n = ONE;
    for (const element of [...elements].reverse()) {
      const carried = carry(element, pair, omega);
      n = multiply(n, carried.n);
      pair = carried;
    }
    nodes.unshift({ pair: behind, n });
  }
  nodes.unshift({ pair, n: ONE });
  return nodes;
}

function loadPair(chain: Chain, omega: number): Pair {
  if (chain.loadImpedance === undefined) return { v: ONE, i: ZERO };
  const { num, den } = evaluateRational(chain.loadImpedance, omega);
  return { v: num, i: den };
}

/** H as a fraction that needs no division by an impedance. */
function transferOf(chain: Chain, nodes: readonly Node[], omega: number) {
  const output = nodes.reduce((product, { n }) => multiply(product, n), nodes[nodes.length - 1].pair.v);
  if (chain.against === "input") return { numerator: output, denominator: nodes[0].pair.v };
  const { n, emf } = sourceAt(chain, nodes[0].pair, omega);
  const numerator = multiply(output, n);
  if (chain.against === "emf") return { numerator, denominator: emf };
  // Against what the load would get with the chain taken out, ZL / (Zs + ZL).
  const load = loadPair(chain, omega);
  const direct = sourceAt(chain, load, omega);
  return {
    numerator: multiply(numerator, direct.emf),
    denominator: multiply(emf, multiply(load.v, direct.n)),
  };
}

/** The source's branch is one more series element: its `n`, and the EMF that the pair behind it stands for. */
function sourceAt(chain: Chain, pair: Pair, omega: number): { n: Dual; emf: Dual } {
  const { n, v } = carry({ form: "series", impedance: chain.sourceImpedance }, pair, omega);
  return { n, emf: v };
}

function sharesOf(chain: Chain, nodes: readonly Node[], omega: number): Reading["shares"] {
  const { n, emf } = sourceAt(chain, nodes[0].pair, omega);
  const voltageDb = nodes.map(({ pair }) => levelDb(pair.v));
  return [
    { name: "source", gainDb: levelDb(n) + voltageDb[0] - levelDb(emf) },
    ...chain.stages.map(({ name }, k) => ({
      name,
      gainDb: levelDb(nodes[k + 1].n) + voltageDb[k + 1] - voltageDb[k],
    })),
  ];
}

const impedance = ({ v, i }: Pair): { re: number; im: number } =>
  isNull(i) ? { re: Infinity, im: 0 } : plain(divide(v, i));

/** Angle in (−180, 180]. */
const angleDeg = ({ re, im }: Dual): number => wrapDeg(toDegrees(Math.atan2(im, re)));
