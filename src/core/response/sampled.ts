import type { Chain, ChainStage } from "../chain.ts";
import {
  addInverse,
  addProduct,
  addResonant,
  addRising,
  divideBy,
  inRange,
  multiplyBy,
  polar,
} from "./kernels.ts";
import {
  type BranchCoefficients,
  type ComplexArray,
  constant,
  type ElementSamples,
  empty,
  sampleElement,
  sampleRational,
} from "./samples.ts";

/** The chain's response over a grid of frequencies. */
export interface SampledResponse {
  readonly freqHz: Float64Array;
  /** −Infinity at a null; NaN where a measured response has no value. */
  readonly gainDb: Float64Array;
  /** (−180, 180] */
  readonly phaseDeg: Float64Array;
}

/**
 * Evaluates chains over one grid, keeping each stage's samples: after an edit only the stage that is new to it is
 * evaluated, and all are multiplied again. A stage is known by its object, which must not change.
 */
export class Sampler {
  readonly freqHz: Float64Array;
  readonly #omega: Float64Array;
  readonly #inverseOmega: Float64Array;
  readonly #stages = new WeakMap<ChainStage, readonly ElementSamples[]>();

  constructor(freqHz: Float64Array) {
    this.freqHz = freqHz;
    this.#omega = freqHz.map((freq) => 2 * Math.PI * freq);
    this.#inverseOmega = this.#omega.map((omega) => 1 / omega);
  }

  response(chain: Chain): SampledResponse {
    const transfer = this.transfer(chain);
    const gainDb = new Float64Array(this.freqHz.length);
    const phaseDeg = new Float64Array(this.freqHz.length);
    polar(transfer, transfer.exponent, gainDb, phaseDeg);
    return { freqHz: this.freqHz, gainDb, phaseDeg };
  }

  /** H as `(re + j·im)·2^exponent`, counted as the chain says. */
  transfer(chain: Chain): Transfer {
    const omega = this.#omega;
    const carrier = new Carrier(omega, this.#inverseOmega, loadPair(chain, omega));
    for (let k = chain.stages.length - 1; k >= 0; k--) carrier.carryStage(this.#samplesOf(chain.stages[k]));
    if (chain.against === "input") return carrier.transfer();
    carrier.carryStage([sampleElement({ form: "series", impedance: chain.sourceImpedance }, omega)]);
    const overEmf = carrier.transfer();
    if (chain.against === "emf") return overEmf;
    const direct = new Carrier(omega, this.#inverseOmega, loadPair(chain, omega));
    direct.carryStage([sampleElement({ form: "series", impedance: chain.sourceImpedance }, omega)]);
    return quotient(overEmf, direct.transfer());
  }

  #samplesOf(stage: ChainStage): readonly ElementSamples[] {
    let samples = this.#stages.get(stage);
    if (samples === undefined) {
      samples = stage.elements.map((element) => sampleElement(element, this.#omega));
      this.#stages.set(stage, samples);
    }
    return samples;
  }
}

export interface Transfer extends ComplexArray {
  readonly exponent: Int32Array;
}

interface Start {
  readonly v: ComplexArray;
  readonly i: ComplexArray;
}

/** One volt at an open output, or the load's own pair. */
function loadPair(chain: Chain, omega: Float64Array): Start {
  const load = chain.loadImpedance;
  if (load === undefined) return { v: constant(1, omega.length), i: empty(omega.length) };
  const { num, den, omega0 } = load;
  return {
    v: sampleRational({ num, den: [1], omega0 }, omega),
    i: sampleRational({ num: den, den: [1], omega0 }, omega),
  };
}

/** So many elements may pass before the pair is looked at for leaving the range of double precision. */
const ELEMENTS_BETWEEN_CHECKS = 8;
const LARGE = 2 ** 200;
const SMALL = 2 ** -200;

/**
 * The pair (V, I) on its way from the load to the source, and the product of all `n`, over the whole grid.
 * See `two-port.ts` for the same at one frequency.
 */
class Carrier {
  readonly #omega: Float64Array;
  readonly #inverseOmega: Float64Array;
  readonly #v: ComplexArray;
  readonly #i: ComplexArray;
  /** Product of n; starts as the voltage at the load. */
  readonly #n: ComplexArray;
  /** The pair is to be multiplied by 2^−exponent relative to the product. */
  readonly #exponent: Int32Array;
  #sinceCheck = 0;

  constructor(omega: Float64Array, inverseOmega: Float64Array, { v, i }: Start) {
    this.#omega = omega;
    this.#inverseOmega = inverseOmega;
    this.#v = v;
    this.#i = i;
    this.#n = { re: v.re.slice(), im: v.im.slice() };
    this.#exponent = new Int32Array(omega.length);
  }

  carryStage(elements: readonly ElementSamples[]): void {
    for (let k = elements.length - 1; k >= 0; k--) {
      this.#carry(elements[k]);
      if (++this.#sinceCheck >= ELEMENTS_BETWEEN_CHECKS) this.#keepInRange();
    }
  }

  /** `n / v`: the voltage at the load over that where the pair now stands. */
  transfer(): Transfer {
    this.#keepInRange();
    const out = { re: this.#n.re.slice(), im: this.#n.im.slice() };
    divideBy(out, this.#v);
    return { ...out, exponent: this.#exponent };
  }

  #carry(element: ElementSamples): void {
    switch (element.form) {
      case "series":
        this.#addBranch(this.#v, this.#i, element.branch, "impedance");
        break;
      case "shunt":
        this.#addBranch(this.#i, this.#v, element.branch, "admittance");
        break;
      case "matrix":
        this.#carryMatrix(element);
        break;
      case "isolating":
        this.#isolate(element);
        break;
    }
  }

  #addBranch(
    sum: ComplexArray,
    by: ComplexArray,
    branch: BranchCoefficients,
    direct: BranchCoefficients["is"],
  ): void {
    if (branch.is !== direct) addInverse(sum, by, this.#omega, this.#inverseOmega, branch);
    else if (branch.falling === 0) addRising(sum, by, this.#omega, branch.real, branch.rising);
    else addResonant(sum, by, this.#omega, this.#inverseOmega, branch);
  }

  #carryMatrix({ n, a, b, c, d }: Extract<ElementSamples, { form: "matrix" }>): void {
    const v = { re: this.#v.re.slice(), im: this.#v.im.slice() };
    multiplyBy(this.#v, a);
    addProduct(this.#v, b, this.#i);
    multiplyBy(this.#i, d);
    addProduct(this.#i, c, v);
    multiplyBy(this.#n, n);
  }

  #isolate(stage: Extract<ElementSamples, { form: "isolating" }>): void {
    if (stage.outputImpedance) addProduct(this.#v, stage.outputImpedance, this.#i);
    multiplyBy(this.#n, stage.transfer);
    divideBy(this.#n, this.#v);
    this.#v.re.fill(1);
    this.#v.im.fill(0);
    if (stage.inputAdmittance) {
      this.#i.re.set(stage.inputAdmittance.re);
      this.#i.im.set(stage.inputAdmittance.im);
    } else {
      this.#i.re.fill(0);
      this.#i.im.fill(0);
    }
  }

  /** Chains of many stages reach far beyond 1e308: powers of two are taken out and kept apart. */
  #keepInRange(): void {
    this.#sinceCheck = 0;
    if (!inRange(this.#v, this.#i, SMALL * SMALL, LARGE * LARGE)) this.#rescale(this.#v, this.#i, -1);
    if (!inRange(this.#n, this.#n, SMALL * SMALL, LARGE * LARGE)) this.#rescale(this.#n, NOTHING, 1);
  }

  #rescale(p: ComplexArray, q: ComplexArray, direction: 1 | -1): void {
    const parts = [p.re, p.im, q.re, q.im];
    for (let k = 0; k < this.#exponent.length; k++) {
      const shift = powerOfTwo(Math.max(...parts.map((part) => Math.abs(part[k] ?? 0))));
      for (const part of parts) part[k] *= 2 ** -shift;
      this.#exponent[k] += direction * shift;
    }
  }
}

/** Stands in for the second of a pair where there is only one. */
const NOTHING: ComplexArray = empty(0);

const powerOfTwo = (size: number): number =>
  size > 0 && size < Infinity ? Math.max(-1000, Math.min(1000, Math.round(Math.log2(size)))) : 0;

function quotient(p: Transfer, q: Transfer): Transfer {
  const out = { re: p.re.slice(), im: p.im.slice() };
  divideBy(out, q);
  return { ...out, exponent: p.exponent.map((exponent, k) => exponent - q.exponent[k]) };
}
