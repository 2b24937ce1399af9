import type { Chain, ChainStage } from "../chain.ts";
import type { Rational } from "../rational.ts";
import { Carrier } from "./carrier.ts";
import { type ElementSamples, sampleElement } from "./samples.ts";
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
    this.#carrier = new Carrier(this.#omega);
  }

  response(chain: Chain): SampledResponse {
    this.#carryChain(this.#carrier, chain);
    if (chain.against === "insertion") this.#carrier.divideBy(this.#direct(chain));
    const gainDb = new Float64Array(this.freqHz.length);
    const phaseDeg = new Float64Array(this.freqHz.length);
    this.#carrier.read(gainDb, phaseDeg);
    settle(chain, this.freqHz, gainDb, phaseDeg);
    return { freqHz: this.freqHz, gainDb, phaseDeg };
  }

  /** What the load would get with the chain taken out. */
  #direct(chain: Chain): Carrier {
    const direct = new Carrier(this.#omega);
    this.#carryChain(direct, { ...chain, stages: [] });
    return direct;
  }

  #carryChain(carrier: Carrier, chain: Chain): void {
    carrier.start();
    if (chain.loadImpedance !== undefined) carrier.carry(this.#branch("shunt", chain.loadImpedance));
    for (let k = chain.stages.length - 1; k >= 0; k--) carrier.carry(this.#samplesOf(chain.stages[k]));
    if (chain.against !== "input") carrier.carry(this.#branch("series", chain.sourceImpedance));
  }

  #branch(form: "series" | "shunt", impedance: Rational): readonly ElementSamples[] {
    return sampleElement({ form, impedance }, this.#omega);
  }

  #samplesOf(stage: ChainStage): readonly ElementSamples[] {
    let samples = this.#stages.get(stage);
    if (samples === undefined) {
      samples = stage.elements.flatMap((element) => sampleElement(element, this.#omega));
      this.#stages.set(stage, samples);
    }
    return samples;
  }
}
