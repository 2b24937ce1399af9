import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lowpassPrototype, stopEdge } from "../../../src/core/filters/prototype.ts";
import { closedFormLoss, excess } from "./closed-forms.ts";
import { allowedError, condition, prototypeSpecs, rootsPower, unwrap } from "./support.ts";

/** Loss at the corner in dB: the ripple, or half power. */
const edgeDb = ({ family, rippleDb }: { family: string; rippleDb: number }): number =>
  family === "chebyshev" || family === "elliptic" ? rippleDb : 10 * Math.log10(2);

/** Specs that can be designed: an elliptic filter may be refused for a transition that is too narrow. */
const designs = prototypeSpecs
  .map((spec) => ({ spec, designed: lowpassPrototype(spec) }))
  .filter(({ designed }) => designed.ok)
  .map(({ spec, designed }) => ({ spec, prototype: unwrap(designed) }));

const frequencies = fc.double({ min: -3, max: 3, noNaN: true }).map((decades) => 10 ** decades);

describe("every prototype", () => {
  it("is real, stable and finite, with `order` poles", () => {
    fc.assert(
      fc.property(designs, ({ spec, prototype: { zeros, poles, gain } }) => {
        expect(poles).toHaveLength(spec.order);
        expect(zeros.length).toBeLessThanOrEqual(spec.order);
        expect(Number.isFinite(gain) && gain > 0).toBe(true);
        for (const pole of poles) expect(pole.re).toBeLessThan(0);
        for (const zero of zeros) expect(zero.re).toBe(0);
        for (const list of [zeros, poles]) {
          for (const root of list) {
            expect(Number.isFinite(root.re) && Number.isFinite(root.im)).toBe(true);
            expect(list.some((other) => other.re === root.re && other.im === -root.im)).toBe(true);
          }
        }
      }),
    );
  });

  it("loses no more than its edge loss up to x = 1, and exactly that at x = 1", () => {
    fc.assert(
      fc.property(designs, fc.double({ min: 0, max: 1, noNaN: true }), ({ spec, prototype }, x) => {
        const edge = 10 ** (-edgeDb(spec) / 10);
        expect(rootsPower(prototype, x)).toBeGreaterThan(edge * (1 - allowedError(condition(prototype, x))));
        expect(rootsPower(prototype, x)).toBeLessThan(1 + allowedError(condition(prototype, x)));
        expect(Math.abs(rootsPower(prototype, 1) / edge - 1)).toBeLessThan(
          allowedError(condition(prototype, 1)),
        );
      }),
    );
  });

  it("loses at least `stop` from the stop edge on, and exactly that at the edge", () => {
    fc.assert(
      fc.property(designs, fc.double({ min: 0, max: 3, noNaN: true }), ({ spec, prototype }, decades) => {
        const edge = unwrap(stopEdge(spec));
        fc.pre(edge !== undefined);
        const stop = 10 ** (-spec.stopDb / 10);
        const x = edge! * 10 ** decades;
        const power = rootsPower(prototype, x);
        expect(power / (1 + allowedError(condition(prototype, x)))).toBeLessThanOrEqual(stop);
        expect(Math.abs(rootsPower(prototype, edge!) / stop - 1)).toBeLessThan(
          allowedError(condition(prototype, edge!)),
        );
      }),
    );
  });

  it("has the magnitude of its closed form at every frequency (elliptic: see below)", () => {
    fc.assert(
      fc.property(designs, frequencies, ({ spec, prototype }, x) => {
        fc.pre(spec.family !== "elliptic");
        const product = rootsPower(prototype, x) * closedFormLoss(spec, x);
        expect(Math.abs(product - 1)).toBeLessThan(allowedError(condition(prototype, x)));
      }),
      { numRuns: 500 },
    );
  });
});

// Characterisation of the elliptic rational function, Orfanidis (2006): R(x)·R(1/kx) = 1/k1, hence for the excess loss
// E = 1/|H|² − 1 the product E(x)·E(edge/x) = (10^(ripple/10) − 1)(10^(stop/10) − 1).
describe("elliptic prototype", () => {
  const ellipticDesigns = designs.filter(({ spec }) => spec.family === "elliptic");

  it("has the reciprocal symmetry of the elliptic rational function about √edge", () => {
    fc.assert(
      fc.property(
        ellipticDesigns,
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        ({ spec, prototype }, x) => {
          const edge = unwrap(stopEdge(spec))!;
          const below = 1 / rootsPower(prototype, x) - 1;
          // Where the pass band touches 0 dB the excess is a difference of nearly equal numbers.
          fc.pre(below > 1e-4);
          const product = below * (1 / rootsPower(prototype, edge / x) - 1);
          const expected = excess(spec.rippleDb) * excess(spec.stopDb);
          const error = condition(prototype, x) / below + condition(prototype, edge / x);
          expect(Math.abs(product / expected - 1)).toBeLessThan(allowedError(error));
        },
      ),
      { numRuns: 200 },
    );
  });

  it("passes everything at n points of the pass band and loses exactly `ripple` between them", () => {
    fc.assert(
      fc.property(ellipticDesigns, ({ spec, prototype }) => {
        const edge = unwrap(stopEdge(spec))!;
        const full = prototype.zeros.filter(({ im }) => im > 0).map(({ im }) => edge / im);
        if (spec.order % 2 === 1) full.push(0);
        full.sort((a, b) => a - b);
        expect(full).toHaveLength(Math.ceil(spec.order / 2));
        for (const x of full) {
          expect(Math.abs(rootsPower(prototype, x) - 1)).toBeLessThan(allowedError(condition(prototype, x)));
        }
        for (let i = 1; i < full.length; i += 1) {
          const least = leastBetween((x) => rootsPower(prototype, x), full[i - 1], full[i]);
          const error = condition(prototype, least.x);
          expect(Math.abs(least.value * 10 ** (spec.rippleDb / 10) - 1)).toBeLessThan(allowedError(error));
        }
      }),
    );
  });
});

/** Golden-section search. */
function leastBetween(f: (x: number) => number, from: number, to: number): { x: number; value: number } {
  const golden = (Math.sqrt(5) - 1) / 2;
  let [low, high] = [from, to];
  for (let step = 0; step < 60; step += 1) {
    const left = high - golden * (high - low);
    const right = low + golden * (high - low);
    if (f(left) < f(right)) high = right;
    else low = left;
  }
  return { x: (low + high) / 2, value: f((low + high) / 2) };
}
