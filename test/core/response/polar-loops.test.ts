import fc from "fast-check";
import { describe, it } from "vitest";
import { gain, phase } from "../../../src/core/response/polar-loops.ts";
import { WORKING } from "../../../src/core/response/working.ts";
import { expectClose } from "../../helpers/nodal-close.ts";

// Gain and phase by table against the language's own logarithm and arctangent.
interface Ratio {
  readonly n: readonly [number, number];
  readonly v: readonly [number, number];
  readonly exponent: number;
}

function read({ n, v, exponent }: Ratio): { gainDb: number; phaseDeg: number } {
  [WORKING.nRe[0], WORKING.nIm[0]] = n;
  [WORKING.vRe[0], WORKING.vIm[0]] = v;
  WORKING.exponent[0] = exponent;
  const [gainDb, phaseDeg] = [new Float64Array(1), new Float64Array(1)];
  gain(0, 1, gainDb);
  phase(0, 1, phaseDeg);
  return { gainDb: gainDb[0], phaseDeg: phaseDeg[0] };
}

/** Over the whole range that is kept, near one as often as far out. */
const part = fc
  .tuple(
    fc.double({ min: -2, max: 2, noNaN: true }),
    fc.oneof(fc.constant(0), fc.integer({ min: -195, max: 195 })),
  )
  .map(([value, exponent]) => value * 2 ** exponent);
const vector = fc.tuple(part, part).filter(([re, im]) => Math.hypot(re, im) > 2 ** -200);

describe("gain and phase of n/V", () => {
  it("agree with Math.log10 and Math.atan2", () => {
    fc.assert(
      fc.property(vector, vector, fc.integer({ min: -3000, max: 3000 }), (n, v, exponent) => {
        const { gainDb, phaseDeg } = read({ n, v, exponent });
        const level = (p: readonly [number, number]) => 20 * Math.log10(Math.hypot(...p));
        const expectedDb = level(n) - level(v) + exponent * 20 * Math.log10(2);
        expectClose(gainDb, expectedDb, 1e-11, `gain of ${n} over ${v} times 2^${exponent}`);
        const angle = Math.atan2(n[1] * v[0] - n[0] * v[1], n[0] * v[0] + n[1] * v[1]) * (180 / Math.PI);
        expectClose(phaseDeg, angle <= -180 ? 180 : angle, 1e-12, `phase of ${n} over ${v}`);
      }),
      { seed: 1990, numRuns: 20_000 },
    );
  });

  it.each<readonly [string, readonly [number, number], number, number]>([
    ["one", [1, 0], 0, 0],
    ["minus one", [-1, 0], 0, 180],
    ["minus one from below", [-1, -0], 0, 180],
    ["so little below that it is half a turn", [-1, -1e-300], 0, 180],
    ["j", [0, 1], 0, 90],
    ["−j", [0, -1], 0, -90],
    ["1 + j", [1, 1], 10 * Math.log10(2), 45],
    ["−1 − j", [-1, -1], 10 * Math.log10(2), -135],
    ["a null", [0, 0], -Infinity, Number.NaN],
    ["no number", [Number.NaN, 0], Number.NaN, Number.NaN],
  ])("%s", (what, n, gainDb, phaseDeg) => {
    const found = read({ n, v: [1, 0], exponent: 0 });
    same(found.gainDb, gainDb, `gain of ${what}`);
    same(found.phaseDeg, phaseDeg, `phase of ${what}`);
  });
});

function same(found: number, expected: number, what: string): void {
  if (!(Number.isNaN(found) && Number.isNaN(expected))) expectClose(found, expected, 1e-14, what);
}
