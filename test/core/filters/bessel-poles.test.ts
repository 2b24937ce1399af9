import { describe, expect, it } from "vitest";
import { besselHalfPower } from "../../../src/core/filters/bessel.ts";
import { besselPoles } from "../../../src/core/filters/bessel-poles.ts";
import { besselHalfPowerByBisection, reverseBesselCoefficients } from "./closed-forms.ts";

const BITS = 1000n;
type Fixed = { re: bigint; im: bigint };

/** A double as a whole number of 2^−1000, without rounding for the magnitudes used here. */
function fixed(value: number): bigint {
  let scaled = value;
  let shift = 0n;
  while (!Number.isInteger(scaled)) {
    scaled *= 2;
    shift += 1n;
  }
  return BigInt(scaled) << (BITS - shift);
}

const times = (a: Fixed, b: Fixed): Fixed => ({
  re: (a.re * b.re - a.im * b.im) >> BITS,
  im: (a.re * b.im + a.im * b.re) >> BITS,
});

/** |θn/θn'| at s, by Horner's rule in 1000 bits behind the point. */
function distanceToZero(order: number, s: Fixed): number {
  let value: Fixed = { re: 0n, im: 0n };
  let slope: Fixed = { re: 0n, im: 0n };
  for (const coefficient of reverseBesselCoefficients(order).toReversed()) {
    const carried = times(slope, s);
    slope = { re: carried.re + value.re, im: carried.im + value.im };
    const product = times(value, s);
    value = { re: product.re + (coefficient << BITS), im: product.im };
  }
  const square = ({ re, im }: Fixed): bigint => re * re + im * im;
  return Math.sqrt(Number((square(value) << 400n) / square(slope))) / 2 ** 200;
}

// Independent of the method under test: the polynomial's whole-number coefficients, summed without rounding.
describe("besselPoles(order)", () => {
  it.each(Array.from({ length: 30 }, (_, index) => index + 1))(
    "order %i: every pole is a zero to 1e-14",
    (order) => {
      const poles = besselPoles(order);
      expect(poles).toHaveLength(Math.ceil(order / 2));
      for (const { re, im } of poles) {
        const distance = distanceToZero(order, { re: fixed(re), im: fixed(im) });
        expect(distance / Math.hypot(re, im)).toBeLessThan(1e-14);
      }
      // All different: n poles of a polynomial of degree n are all of them.
      const heights = poles.map((pole) => pole.im);
      for (let i = 1; i < heights.length; i += 1) expect(heights[i - 1] - heights[i]).toBeGreaterThan(0.5);
    },
  );
});

describe("besselHalfPower(order)", () => {
  it("solves |H|² = 1/2 on the whole-number polynomial", () => {
    for (let order = 1; order <= 30; order += 1) {
      expect(Math.abs(besselHalfPower(order) / besselHalfPowerByBisection(order) - 1)).toBeLessThan(1e-14);
    }
  });
});
