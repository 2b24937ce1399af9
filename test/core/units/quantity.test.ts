import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { parseQuantity } from "../../../src/core/units/quantity.ts";
import { UNITS, type UnitTag } from "../../../src/core/units/unit.ts";

const UNIT_TAGS = Object.keys(UNITS) as UnitTag[];

const problemOf = (input: string | number, unit: UnitTag) => {
  const result = parseQuantity(input, unit);
  if (result.ok) throw new Error(`"${input}" was taken as ${result.value}`);
  return result.problem;
};

describe("texts with prefix and unit", () => {
  // Expected values follow from the prefixes of the SI Brochure, 9th edition, table 7.
  test.each([
    ["4.7k", "ohm", 4700],
    ["4.7 kΩ", "ohm", 4700],
    ["4.7 k\u2126", "ohm", 4700],
    ["4.7\u00a0kΩ", "ohm", 4700],
    ["4.7 K", "ohm", 4700],
    ["10 ohm", "ohm", 10],
    ["10ohms", "ohm", 10],
    ["10 MOhm", "ohm", 1e7],
    ["5 m", "ohm", 0.005],
    ["1e3", "ohm", 1000],
    ["1E3", "ohm", 1000],
    [".5", "ohm", 0.5],
    ["5.", "ohm", 5],
    ["+5", "ohm", 5],
    ["- 5", "ohm", -5],
    ["\u22125", "ohm", -5],
    [" \t5 k\n", "ohm", 5000],
    ["100n", "farad", 1e-7],
    ["0.1 uF", "farad", 1e-7],
    ["0.1 \u00b5F", "farad", 1e-7],
    ["0.1 \u03bcF", "farad", 1e-7],
    ["1e-9F", "farad", 1e-9],
    ["1f", "farad", 1e-15],
    ["1fF", "farad", 1e-15],
    ["4.7 mH", "henry", 0.0047],
    ["1 MHz", "hertz", 1e6],
    ["1 mHz", "hertz", 0.001],
    ["2.4 GHz", "hertz", 2.4e9],
    ["1 THz", "hertz", 1e12],
    ["75 us", "second", 75e-6],
    ["5", "metre", 5],
    ["5 m", "metre", 5],
    ["5 mm", "metre", 0.005],
    ["5 km", "metre", 5000],
    ["20 mV", "volt", 0.02],
    ["5 nV/√Hz", "voltPerRootHertz", 5e-9],
    ["5nV/rtHz", "voltPerRootHertz", 5e-9],
    ["5n", "voltPerRootHertz", 5e-9],
    ["1 pA/√Hz", "amperePerRootHertz", 1e-12],
    ["20 kS/s", "samplesPerSecond", 20000],
    ["20kSa/s", "samplesPerSecond", 20000],
    ["20 kHz", "samplesPerSecond", 20000],
    ["-3", "level", -3],
    ["-6 dB", "level", -6],
    ["-45", "degree", -45],
    ["-45°", "degree", -45],
    ["90 deg", "degree", 90],
    ["-40 °C", "celsius", -40],
    ["25\u2103", "celsius", 25],
    ["10", "gain", 10],
    ["-2.5", "gain", -2.5],
    ["100k", "gain", 1e5],
    ["5%", "number", 0.05],
    ["5 %", "number", 0.05],
    ["0.66", "number", 0.66],
    ["10k", "number", 10000],
  ] as const)("%j as %s is %d", (text, unit, value) => {
    expect(parseQuantity(text, unit)).toEqual({ ok: true, value });
  });

  test("the decimal text decides the double, not a product of rounded factors", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 999_999 }), fc.integer({ min: 0, max: 5 }), (digits, shift) => {
        const text = `${digits}e-${shift}`;
        expect(parseQuantity(`${text} nF`, "farad")).toEqual({
          ok: true,
          value: Number(`${digits}e-${shift + 9}`),
        });
      }),
    );
  });

  test.each(UNIT_TAGS)("a finite number is taken as it is for %s", (unit) => {
    for (const value of [0, -0, 4700, -1e-300, 5e-324, Number.MAX_VALUE]) {
      expect(parseQuantity(value, unit)).toEqual({ ok: true, value });
    }
  });
});

describe("gain in dB", () => {
  // 20 dB is a factor of ten by definition (ISO 80000-3); 6.0206 dB is 20·log10(2).
  test.each([
    ["0 dB", 1],
    ["20dB", 10],
    ["-20 dB", 0.1],
    ["40 dB", 100],
    ["6.020599913279624 dB", 2],
  ])("%s is a ratio of %d", (text, ratio) => {
    const result = parseQuantity(text, "gain");
    expect(result.ok && result.value / ratio).toBeCloseTo(1, 14);
  });
});

describe("refusals say what was found and what is allowed", () => {
  test.each([
    ["4,7k", "ohm", '"4,7k" has a comma', "a decimal point, as in 4.7k"],
    ["0,5", "gain", '"0,5" has a comma', "a decimal point, as in 0.5"],
    ["1,000", "ohm", '"1,000" has a comma', "a decimal point, as in 4.7, and nothing between thousands"],
    ["1,5,5", "ohm", '"1,5,5" has a comma', "a decimal point, as in 4.7, and nothing between thousands"],
    ["10 uF", "ohm", '"10 uF" is in F', UNITS.ohm.wanted],
    ["4n7F", "ohm", '"4n7F" is in F', UNITS.ohm.wanted],
    ["10 ohm", "farad", '"10 ohm" is in Ω', UNITS.farad.wanted],
    ["6 dB", "hertz", '"6 dB" is in dB', UNITS.hertz.wanted],
    ["5%", "ohm", '"5%" is in percent', UNITS.ohm.wanted],
    ["10 x", "ohm", '"10 x" has "x" after the number', UNITS.ohm.wanted],
    ["0x10", "ohm", '"0x10" has "x10" after the number', UNITS.ohm.wanted],
    ["10 HZ", "hertz", '"10 HZ" has "HZ" after the number', UNITS.hertz.wanted],
    ["1 2", "ohm", '"1 2" has "2" after the number', UNITS.ohm.wanted],
    ["1.2.3", "ohm", '"1.2.3" has ".3" after the number', UNITS.ohm.wanted],
    ["1e", "ohm", '"1e" has "e" after the number', UNITS.ohm.wanted],
    ["25 k", "celsius", '"25 k" has "k" after the number', UNITS.celsius.wanted],
    ["abc", "ohm", '"abc" does not begin with a number', UNITS.ohm.wanted],
    ["--5", "ohm", '"--5" does not begin with a number', UNITS.ohm.wanted],
    [".", "ohm", '"." does not begin with a number', UNITS.ohm.wanted],
    ["constructor", "ohm", '"constructor" does not begin with a number', UNITS.ohm.wanted],
    ["", "ohm", "nothing", UNITS.ohm.wanted],
    [" \n", "ohm", "nothing", UNITS.ohm.wanted],
  ] as const)("%j as %s", (text, unit, found, allowed) => {
    expect(problemOf(text, unit)).toEqual({ found, allowed });
  });

  test.each(["NaN", "Infinity", "-inf", "∞", "1e999", "1e400 k"])("%s is not finite", (text) => {
    expect(problemOf(text, "ohm").found).toBe(`"${text}" is not a finite number`);
  });

  test.each([NaN, Infinity, -Infinity])("the number %d is not finite", (value) => {
    expect(problemOf(value, "gain").found).toBe(`${value} is not a finite number`);
  });

  test("a gain beyond the doubles is not finite, one below them is not zero", () => {
    expect(problemOf("1e6 dB", "gain").found).toContain("not a finite number");
    expect(problemOf("-1e6 dB", "gain").found).toContain("too small");
  });

  test("a value that is not zero is not read as zero", () => {
    expect(problemOf("1e-999", "ohm").found).toBe('"1e-999" is too small to be told from zero');
    expect(parseQuantity("0e-999", "ohm")).toEqual({ ok: true, value: 0 });
  });

  test("64 characters are read, 65 are not", () => {
    expect(parseQuantity("1".padEnd(64, "0"), "ohm")).toEqual({ ok: true, value: 1e63 });
    expect(problemOf("1".padEnd(65, "0"), "ohm")).toEqual({
      found: `"${"1".padEnd(31, "0")}…" is 65 characters long`,
      allowed: "at most 64 characters",
    });
  });

  test("control characters of the input do not reach the message", () => {
    expect(problemOf("4k7 \u001b[31m\u0007\u202eF", "ohm").found).toBe(
      '"4k7 [31mF" has "[31mF" after the number',
    );
  });

  test("any text gives a finite value or a printable problem, whatever the unit", () => {
    const alphabet = [..."0123456789..,+-eEkKmMuµRLFfpnGT ΩHzdB%°C/√sSaV\u001b\u0000\u202e\n"];
    const texts = fc.oneof(
      fc.string({ unit: "binary" }),
      fc.string({ unit: fc.constantFrom(...alphabet), maxLength: 70 }),
    );
    fc.assert(
      fc.property(texts, fc.constantFrom(...UNIT_TAGS), (text, unit) => {
        const result = parseQuantity(text, unit);
        if (result.ok) return Number.isFinite(result.value);
        const shown = result.problem.found + result.problem.allowed;
        return result.problem.allowed !== "" && !/[\p{Cc}\u2028-\u202e\u2066-\u2069]/u.test(shown);
      }),
      { numRuns: 2000 },
    );
  });
});
