import { describe, expect, test } from "vitest";
import { whole } from "../../../src/core/stages/kind.ts";
import { checkRange } from "../../../src/core/units/range.ts";

describe("checkRange(value, range, unit)", () => {
  test.each([
    [5e-324, "positive", "ohm"],
    [0, "nonNegative", "ohm"],
    [-0, "nonNegative", "ohm"],
    [-2, "nonZero", "gain"],
    [-1e308, "any", "level"],
    [1, whole(1, 30), "number"],
    [30, whole(1, 30), "number"],
    [0.5, { from: 0, to: 1, whole: false }, "number"],
  ] as const)("%d is within %j", (value, range, unit) => {
    expect(checkRange(value, range, unit)).toBeUndefined();
  });

  test.each([
    [0, "positive", "ohm", "0 Ω", "more than 0 Ω"],
    [-4700, "positive", "ohm", "-4.7 kΩ", "more than 0 Ω"],
    [-1e-9, "nonNegative", "farad", "-1 nF", "0 F or more"],
    [0, "nonZero", "gain", "0", "anything but 0"],
    [0, whole(1, 30), "number", "0", "a whole number from 1 to 30"],
    [31, whole(1, 30), "number", "31", "a whole number from 1 to 30"],
    [2.5, whole(1, 30), "number", "2.5", "a whole number from 1 to 30"],
    [200, { from: -40, to: 125, whole: false }, "celsius", "200 °C", "from -40 °C to 125 °C"],
  ] as const)("%d is not within %j", (value, range, unit, found, allowed) => {
    expect(checkRange(value, range, unit)).toEqual({ found, allowed });
  });

  test.each([NaN, Infinity, -Infinity])("%d is in no range", (value) => {
    for (const range of ["positive", "nonNegative", "nonZero", "any", whole(1, 30)] as const) {
      expect(checkRange(value, range, "number")?.found).toBe(`${value} is not a finite number`);
    }
  });
});
