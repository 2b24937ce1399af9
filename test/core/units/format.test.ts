import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Charset, formatExact, formatPercent, formatQuantity } from "../../../src/core/units/format.ts";
import { parseQuantity } from "../../../src/core/units/quantity.ts";
import { UNITS, type UnitTag } from "../../../src/core/units/unit.ts";

const UNIT_TAGS = Object.keys(UNITS) as UnitTag[];
const CHARSETS: Charset[] = ["unicode", "ascii"];

/** Doubles over their whole range, and everyday magnitudes. */
const values = fc.oneof(
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc
    .tuple(fc.double({ min: -10, max: 10, noNaN: true }), fc.integer({ min: -20, max: 20 }))
    .map(([m, e]) => m * 10 ** e),
);
const EDGES = [
  0,
  -0,
  5e-324,
  -5e-324,
  2.2250738585072014e-308,
  1e308,
  -1e308,
  Number.MAX_VALUE,
  1e-15,
  9.9999e14,
  1e15,
  1e21,
];

describe("what is shown can be typed", () => {
  test.each(UNIT_TAGS)("formatExact(value, %j) reads back as the same double", (unit) => {
    const readsBack = (value: number, charset: Charset) => {
      expect(parseQuantity(formatExact(value, unit, charset), unit)).toStrictEqual({ ok: true, value });
    };
    for (const charset of CHARSETS) for (const value of EDGES) readsBack(value, charset);
    fc.assert(fc.property(values, fc.constantFrom(...CHARSETS), readsBack));
  });

  test.each(UNIT_TAGS)("formatQuantity(value, %j, digits) reads back within its rounding", (unit) => {
    const readsBack = (value: number, digits: number, charset: Charset) => {
      const result = parseQuantity(formatQuantity(value, unit, digits, charset), unit);
      if (!result.ok) throw new Error(result.problem.found);
      // Half a unit of the last digit, at most half of 10^(1-digits) of the value; 5e-324 is the grain of subnormals.
      const bound = Math.abs(value) * 0.5000001 * 10 ** (1 - digits) + 5e-324;
      expect(Math.abs(result.value - value)).toBeLessThanOrEqual(bound);
    };
    for (const charset of CHARSETS) for (const value of EDGES) readsBack(value, 4, charset);
    fc.assert(fc.property(values, fc.integer({ min: 1, max: 15 }), fc.constantFrom(...CHARSETS), readsBack));
  });

  test("the ASCII variant is ASCII", () => {
    fc.assert(
      fc.property(values, fc.constantFrom(...UNIT_TAGS), (value, unit) =>
        /^[ -~]+$/.test(formatQuantity(value, unit, 4, "ascii") + formatExact(value, unit, "ascii")),
      ),
    );
    expect(formatQuantity(-Infinity, "level", 4, "ascii")).toBe("-inf dB");
  });
});

describe("engineering notation", () => {
  // Written by hand after the SI Brochure, 9th edition: prefixes (table 7), blank before the symbol (5.4.3).
  test.each([
    [4700, "ohm", "4.7 kΩ"],
    [1e-7, "farad", "100 nF"],
    [4.7e-6, "farad", "4.7 µF"],
    [15915.494, "hertz", "15.92 kHz"],
    [999.96, "ohm", "1 kΩ"],
    [999.94, "ohm", "999.9 Ω"],
    [123456, "ohm", "123.5 kΩ"],
    [0.005, "metre", "5 mm"],
    [1e-15, "farad", "1 fF"],
    [9.99e14, "hertz", "999 THz"],
    [1e15, "hertz", "1e15 Hz"],
    [1.5e-16, "farad", "1.5e-16 F"],
    [5e-9, "voltPerRootHertz", "5 nV/√Hz"],
    [20000, "samplesPerSecond", "20 kS/s"],
    [-3.0103, "level", "-3.01 dB"],
    [-120.456, "level", "-120.5 dB"],
    [123456, "level", "123500 dB"],
    [1e-9, "level", "1e-9 dB"],
    [-45, "degree", "-45°"],
    [25, "celsius", "25 °C"],
    [-10, "gain", "-10"],
    [1e5, "gain", "100000"],
    [Math.SQRT1_2, "number", "0.7071"],
    [0, "ohm", "0 Ω"],
    [-0, "ohm", "0 Ω"],
    [Infinity, "level", "∞ dB"],
    [NaN, "level", "no value"],
  ] as const)("formatQuantity(%d, %j) is %j", (value, unit, text) => {
    expect(formatQuantity(value, unit)).toBe(text);
  });

  test("other counts of digits", () => {
    expect(formatQuantity(15915.494, "hertz", 2)).toBe("16 kHz");
    expect(formatQuantity(159154.94, "hertz", 1)).toBe("200 kHz");
    expect(formatQuantity(15915.494, "hertz", 7)).toBe("15.91549 kHz");
  });

  test("plain ASCII", () => {
    expect(formatQuantity(4700, "ohm", 4, "ascii")).toBe("4.7 kohm");
    expect(formatQuantity(4.7e-6, "farad", 4, "ascii")).toBe("4.7 uF");
    expect(formatQuantity(5e-9, "voltPerRootHertz", 4, "ascii")).toBe("5 nV/rtHz");
    expect(formatQuantity(-45, "degree", 4, "ascii")).toBe("-45 deg");
  });

  test("formatExact keeps every digit and is no longer than the digits need", () => {
    expect(formatExact(4.7e-9, "farad")).toBe("4.7 nF");
    expect(formatExact(0.1 + 0.2, "volt")).toBe("300.00000000000004 mV");
    expect(formatExact(-0, "ohm")).toBe("-0 Ω");
    expect(formatExact(1e308, "ohm")).toBe("1e308 Ω");
    expect(formatExact(5e-324, "ohm")).toBe("5e-324 Ω");
  });
});

describe("formatPercent(fraction)", () => {
  test.each([
    [0.05, "5 %"],
    [0.07, "7 %"],
    [0.001, "0.1 %"],
    [0, "0 %"],
    [-0.5, "-50 %"],
    [5, "500 %"],
  ])("%d is %j", (fraction, text) => {
    expect(formatPercent(fraction)).toBe(text);
  });

  test("reads back as the same double", () => {
    const readsBack = (fraction: number) => {
      const result = parseQuantity(formatPercent(fraction), "number");
      expect(result).toEqual({ ok: true, value: fraction });
    };
    fc.assert(fc.property(fc.double({ min: 1e-300, max: 1e300, noNaN: true }), readsBack));
  });
});
