import { expect } from "vitest";
import { type Reading, readAt } from "../../src/core/response/exact.ts";
import { engineChain } from "./netlist-engine.ts";
import { nodalSlope } from "./netlist-slope.ts";
import { type Against, type ChainReading, type FileChain, gainsOf, readNodes } from "./netlists.ts";
import { expectAngle, expectClose, expectComplex } from "./nodal-close.ts";
import { complex, gainDb, magnitude, over, phaseDeg } from "./nodal-complex.ts";

export const countings: readonly Against[] = ["emf", "input", "insertion"];

const toleranceDb = 1e-6;
const toleranceDeg = 1e-5;
/** 1e-6 dB as a ratio. */
const toleranceRatio = 1.15e-7;

/** Everything below at one frequency, but slope and delay. */
export function expectNodalReading(chain: FileChain, freqHz: number): void {
  const nodal = readNodes(chain, freqHz);
  expectGains(chain, freqHz, nodal);
  const reading = readAt(engineChain(chain, "emf"), freqHz);
  expectShares(reading, nodal);
  expectOnward(reading, nodal);
}

/** Gain and phase, counted in all three ways. */
function expectGains(chain: FileChain, freqHz: number, nodal: ChainReading): void {
  const expected = gainsOf(nodal, chain, freqHz);
  for (const against of countings) {
    const reading = readAt(engineChain(chain, against), freqHz);
    const what = `against ${against} at ${freqHz} Hz`;
    expectClose(reading.gainDb, gainDb(expected[against]), toleranceDb, `gain in dB ${what}`);
    expectAngle(reading.phaseDeg, phaseDeg(expected[against]), toleranceDeg, `phase ${what}`);
    const size = magnitude(expected[against]);
    expectClose(reading.ratio, size, toleranceRatio * size, `ratio ${what}`);
  }
}

/** The share of the source and of each stage. */
function expectShares({ shares, freqHz }: Reading, { emf, nodes }: ChainReading): void {
  expect(shares).toHaveLength(nodes.length);
  nodes.forEach(({ voltage }, k) => {
    const before = k === 0 ? emf : nodes[k - 1].voltage;
    expectClose(
      shares[k].gainDb,
      gainDb(over(voltage, before)),
      toleranceDb,
      `share ${k} in dB at ${freqHz} Hz`,
    );
  });
}

/**
 * The impedance looking on from each node, compared as an admittance so that an open output is a plain zero. What
 * rounding lets flow there is below 1e-18 S; the least admittance that is meant, 10 pF at 1 Hz behind a 20:1
 * transformer, is 1e-13 S.
 */
function expectOnward({ impedanceOhm, freqHz }: Reading, { nodes }: ChainReading): void {
  expect(impedanceOhm).toHaveLength(nodes.length);
  nodes.forEach(({ voltage, current }, k) => {
    const expected = over(current, voltage);
    const tolerance = toleranceRatio * magnitude(expected) + 1e-18;
    const open = impedanceOhm[k].re === Infinity;
    const found = open ? complex(0) : over(complex(1), impedanceOhm[k]);
    expectComplex(found, expected, tolerance, `admittance from node ${k} at ${freqHz} Hz`);
  });
}

/**
 * Slope and group delay within 1e-5 of the nodal response's own; below that its uncertainty from rounding decides,
 * 1e-14 of ln H over a step of 7e-4 or 1e-11, which near a flat stretch is more than 1e-5 of next to nothing: hence
 * 1e-9 of a neper (or radian) per neper, or of the whole slope where the other component carries it.
 */
export function expectNodalSlope(chain: FileChain, freqHz: number, against: Against): void {
  const { slopeDbPerDecade, groupDelayS } = readAt(engineChain(chain, against), freqHz);
  const { value, uncertainty } = nodalSlope(chain, freqHz, against);
  const what = `against ${against} at ${freqHz} Hz`;
  const least = 1e-9 * Math.max(1, magnitude(value));
  expectClose(uncertainty / Math.max(1, magnitude(value)), 0, 1e-6, `nodal slope's own uncertainty ${what}`);
  expectClose(
    slopeDbPerDecade / 20,
    value.re,
    1e-5 * Math.abs(value.re) + least,
    `slope in decades per decade ${what}`,
  );
  const delayPhase = -2 * Math.PI * freqHz * groupDelayS;
  expectClose(delayPhase, value.im, 1e-5 * Math.abs(value.im) + least, `-omega times group delay ${what}`);
}
