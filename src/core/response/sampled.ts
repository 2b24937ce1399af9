import type { Chain, ChainStage } from "../chain.ts";
import type { Rational } from "../rational.ts";
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
  type ElementSamples,
  empty,
  sampleElement,
} from "./samples.ts";
import { settle } from "./settle.ts";

/** The chain's response over a grid of frequencies. */
export interface SampledResponse {
  readonly freqHz: Float64Array;
  /** −Infinity at a null; NaN where a measured response has no value. */
  readonly gainDb: Float64Array;
  /** (−180, 180]; NaN at a null and where there is no value. */
  readonly phaseDeg: Float64Array;
}

/**
 * Evaluates chains over one grid, keeping each stage's samples: after an edit only the stage that is new to it is
 * evaluated, and all are multiplied again. A stage is known by its object, which must not change.
 */
export class Sampler {
  readonly freqHz: Float64Array;
  readonly #omega: Float64Array;
  readonly #carrier: Carrier;
  readonly #stages = new WeakMap<ChainStage, readonly ElementSamples[]>();

  constructor(freqHz: Float64Array) {
    this.freqHz = freqHz;
    this.#omega = freqHz.map((freq) => 2 * Math.PI * freq);
    this.#carrier = new Carrier(
      this.#omega,
      this.#omega.map((omega) => 1 / omega),
    );
  }

  response(chain: Chain): SampledResponse {
    const transfer = this.transfer(chain);
    const gainDb = new Float64Array(this.freqHz.length);
    const phaseDeg = new Float64Array(this.freqHz.length);
    polar(transfer, transfer.exponent, gainDb, phaseDeg);
    settle(chain, this.freqHz, gainDb, phaseDeg);
    return { freqHz: this.freqHz, gainDb, phaseDeg };
  }

  /**
   * H as `(re + j·im)·2^exponent`, counted as the chain says. The arrays are the sampler's own and hold until the
   * next call.
   */
  transfer(chain: Chain): Transfer {
    const carrier = this.#carrier;
    carrier.start();
    if (chain.loadImpedance !== undefined) carrier.carry(this.#branch("shunt", chain.loadImpedance));
    for (let k = chain.stages.length - 1; k >= 0; k--) {
      const elements = this.#samplesOf(chain.stages[k]);
      for (let e = elements.length - 1; e >= 0; e--) carrier.carry(elements[e]);
    }
    if (chain.against === "input") return carrier.transfer();
    carrier.carry(this.#branch("series", chain.sourceImpedance));
    const overEmf = carrier.transfer();
    return chain.against === "emf" ? overEmf : this.#overDirect(overEmf, chain);
  }

  /** Over what the load would get with the chain taken out. */
  #overDirect(overEmf: Transfer, chain: Chain): Transfer {
    const kept = { re: overEmf.re.slice(), im: overEmf.im.slice(), exponent: overEmf.exponent.slice() };
    const direct = this.transfer({ ...chain, stages: [], against: "emf" });
    divideBy(kept, direct);
    for (let k = 0; k < kept.exponent.length; k++) kept.exponent[k] -= direct.exponent[k];
    return kept;
  }

  #branch(form: "series" | "shunt", impedance: Rational): ElementSamples {
    return sampleElement({ form, impedance }, this.#omega);
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
  /** Product of n; one until `#hasProduct`. */
  readonly #n: ComplexArray;
  readonly #out: ComplexArray;
  /** H is to be multiplied by 2^exponent. */
  readonly #exponent: Int32Array;
  #hasProduct = false;
  #sinceCheck = 0;

  constructor(omega: Float64Array, inverseOmega: Float64Array) {
    this.#omega = omega;
    this.#inverseOmega = inverseOmega;
    this.#v = empty(omega.length);
    this.#i = empty(omega.length);
    this.#n = empty(omega.length);
    this.#out = empty(omega.length);
    this.#exponent = new Int32Array(omega.length);
  }

  /** One volt at an open output. */
  start(): void {
    fill(this.#v, 1);
    fill(this.#i, 0);
    fill(this.#n, 1);
    this.#exponent.fill(0);
    this.#hasProduct = false;
    this.#sinceCheck = 0;
  }

  /** `n / v`: the voltage at the load over that where the pair now stands. */
  transfer(): Transfer {
    this.#keepInRange();
    this.#out.re.set(this.#n.re);
    this.#out.im.set(this.#n.im);
    divideBy(this.#out, this.#v);
    return { ...this.#out, exponent: this.#exponent };
  }

  carry(element: ElementSamples): void {
    this.#apply(element);
    if (++this.#sinceCheck >= ELEMENTS_BETWEEN_CHECKS) this.#keepInRange();
  }

  #apply(element: ElementSamples): void {
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
    this.#hasProduct = true;
  }

  #isolate(stage: Extract<ElementSamples, { form: "isolating" }>): void {
    if (stage.outputImpedance) addProduct(this.#v, stage.outputImpedance, this.#i);
    multiplyBy(this.#n, stage.transfer);
    divideBy(this.#n, this.#v);
    this.#hasProduct = true;
    fill(this.#v, 1);
    if (stage.inputAdmittance) {
      this.#i.re.set(stage.inputAdmittance.re);
      this.#i.im.set(stage.inputAdmittance.im);
    } else fill(this.#i, 0);
  }

  /** Chains of many stages reach far beyond 1e308: powers of two are taken out and kept apart. */
  #keepInRange(): void {
    this.#sinceCheck = 0;
    if (!inRange(this.#v, this.#i, SMALL * SMALL, LARGE * LARGE)) this.#rescale(this.#v, this.#i, -1);
    if (this.#hasProduct && !inRange(this.#n, this.#n, SMALL * SMALL, LARGE * LARGE))
      this.#rescale(this.#n, NOTHING, 1);
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

function fill({ re, im }: ComplexArray, value: number): void {
  re.fill(value);
  im.fill(0);
}
