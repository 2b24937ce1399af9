import { keepInRange } from "./exponents.ts";
import { addInverse, addProduct, addResonant, addRising, carryMatrix, multiplyBy, polar } from "./kernels.ts";
import { type ComplexArray, empty } from "./sample-rational.ts";
import type { BranchCoefficients, ElementSamples } from "./samples.ts";

/** So many elements may pass before the pair is looked at for leaving the range of double precision. */
const ELEMENTS_BETWEEN_CHECKS = 8;

/**
 * The pair (V, I) on its way from the load to the source, and the product of all `n`, over a whole grid of angular
 * frequencies (rad/s): H = n/V. See `two-port.ts` for the same at one frequency.
 */
export class Carrier {
  readonly #omega: Float64Array;
  readonly #inverseOmega: Float64Array;
  readonly #v: ComplexArray;
  readonly #i: ComplexArray;
  readonly #n: ComplexArray;
  /** H is to be multiplied by 2^exponent. */
  readonly #exponent: Int32Array;
  /** Until then n is one everywhere. */
  #hasProduct = false;
  #sinceCheck = 0;

  constructor(omega: Float64Array) {
    this.#omega = omega;
    this.#inverseOmega = omega.map((w) => 1 / w);
    this.#v = empty(omega.length);
    this.#i = empty(omega.length);
    this.#n = empty(omega.length);
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

  /** Carries the pair from the output of the elements to their input. */
  carry(elements: readonly ElementSamples[]): void {
    for (let e = elements.length - 1; e >= 0; e--) {
      this.#apply(elements[e]);
      if (++this.#sinceCheck >= ELEMENTS_BETWEEN_CHECKS) this.#keepInRange();
    }
  }

  /** H becomes H over the other one's. */
  divideBy(other: Carrier): void {
    this.#keepInRange();
    other.#keepInRange();
    multiplyBy(this.#n, other.#v);
    multiplyBy(this.#v, other.#n);
    for (let k = 0; k < this.#exponent.length; k++) this.#exponent[k] -= other.#exponent[k];
    this.#hasProduct = true;
  }

  /** Writes gain in dB and phase in (−180, 180] of H. */
  read(gainDb: Float64Array, phaseDeg: Float64Array): void {
    this.#keepInRange();
    polar(this.#n, this.#v, this.#exponent, gainDb, phaseDeg);
  }

  #apply(element: ElementSamples): void {
    switch (element.form) {
      case "series":
        this.#add(this.#v, this.#i, element.by);
        break;
      case "shunt":
        this.#add(this.#i, this.#v, element.by);
        break;
      case "isolating":
        fill(this.#i, 0);
        this.#multiply(element.transfer);
        break;
      case "matrix":
        carryMatrix(this.#v, this.#i, element);
        this.#multiply(element.n);
        break;
    }
  }

  #add(sum: ComplexArray, to: ComplexArray, by: BranchCoefficients | ComplexArray): void {
    if ("re" in by) addProduct(sum, to, by);
    else if (by.inverted) addInverse(sum, to, this.#omega, this.#inverseOmega, by);
    else if (by.falling === 0) addRising(sum, to, this.#omega, by);
    else addResonant(sum, to, this.#omega, this.#inverseOmega, by);
  }

  #multiply(n: ComplexArray): void {
    multiplyBy(this.#n, n);
    this.#hasProduct = true;
  }

  /** Chains of many stages reach far beyond 1e308: powers of two are taken out and kept apart. */
  #keepInRange(): void {
    this.#sinceCheck = 0;
    keepInRange(this.#v, this.#i, this.#exponent, -1);
    if (this.#hasProduct) keepInRange(this.#n, this.#n, this.#exponent, 1);
  }
}

function fill({ re, im }: ComplexArray, value: number): void {
  re.fill(value);
  im.fill(0);
}
