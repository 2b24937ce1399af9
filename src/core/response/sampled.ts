import type { Chain, ChainStage } from "../chain.ts";
import type { Rational } from "../rational.ts";
import { wrapDeg } from "../units/decibel.ts";
import { carryAll } from "./carry.ts";
import { type Step, sampleElement } from "./samples.ts";
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
  readonly #stages = new WeakMap<ChainStage, readonly Step[]>();

  constructor(freqHz: Float64Array) {
    this.freqHz = freqHz;
    this.#omega = new Float64Array(freqHz.length);
    for (let k = 0; k < freqHz.length; k++) this.#omega[k] = 2 * Math.PI * freqHz[k];
  }

  response(chain: Chain): SampledResponse {
    const response = this.#evaluate(chain);
    if (chain.against === "insertion") this.#subtractDirect(response, chain);
    settle(chain, this.freqHz, response.gainDb, response.phaseDeg);
    return response;
  }

  #evaluate(chain: Chain): SampledResponse {
    const gainDb = new Float64Array(this.freqHz.length);
    const phaseDeg = new Float64Array(this.freqHz.length);
    carryAll(this.#steps(chain), this.#omega, gainDb, phaseDeg);
    return { freqHz: this.freqHz, gainDb, phaseDeg };
  }

  /** Counts against what the load would get with the chain taken out. */
  #subtractDirect({ gainDb, phaseDeg }: SampledResponse, chain: Chain): void {
    const direct = this.#evaluate({ ...chain, stages: [] });
    for (let k = 0; k < gainDb.length; k++) {
      gainDb[k] -= direct.gainDb[k];
      phaseDeg[k] = wrapDeg(phaseDeg[k] - direct.phaseDeg[k]);
    }
  }

  /** From the source to the load. */
  #steps({ sourceImpedance, stages, loadImpedance, against }: Chain): readonly Step[] {
    const steps: Step[] = [];
    if (against !== "input") steps.push(...this.#branch("series", sourceImpedance));
    for (const stage of stages) steps.push(...this.#stepsOf(stage));
    if (loadImpedance !== undefined) steps.push(...this.#branch("shunt", loadImpedance));
    return steps;
  }

  #branch(form: "series" | "shunt", impedance: Rational): readonly Step[] {
    return sampleElement({ form, impedance }, this.#omega);
  }

  #stepsOf(stage: ChainStage): readonly Step[] {
    const known = this.#stages.get(stage);
    if (known !== undefined) return known;
    const steps: Step[] = [];
    // A flatMap here takes as long as two of the loops over the grid.
    for (const element of stage.elements) steps.push(...sampleElement(element, this.#omega));
    this.#stages.set(stage, steps);
    return steps;
  }
}
