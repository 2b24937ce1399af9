/** So many frequencies are carried through the chain together; what is worked on stays in the processor's cache. */
export const BLOCK_SIZE = 512;

/** The numbers that the loops work on, one block of frequencies at a time; real and imaginary parts apart. */
export interface Working {
  /** Angular frequency in rad/s, and one over it. */
  readonly omega: Float64Array;
  readonly inverseOmega: Float64Array;
  /** Voltage and current on their way from the load to the source, up to a common factor; see `two-port.ts`. */
  readonly vRe: Float64Array;
  readonly vIm: Float64Array;
  readonly iRe: Float64Array;
  readonly iIm: Float64Array;
  /** The product of all `n`: what comes out is n/V. */
  readonly nRe: Float64Array;
  readonly nIm: Float64Array;
  /** That is to be multiplied by 2^exponent. */
  readonly exponent: Int32Array;
}

const array = () => new Float64Array(BLOCK_SIZE);

/**
 * There is one set, and the loops are made around it once: arrays that never change are constants to the compiler,
 * which then knows where they lie. Handed over as arguments they make each loop two to three times as slow.
 */
export const WORKING: Working = {
  omega: array(),
  inverseOmega: array(),
  vRe: array(),
  vIm: array(),
  iRe: array(),
  iIm: array(),
  nRe: array(),
  nIm: array(),
  exponent: new Int32Array(BLOCK_SIZE),
};
