import { describe, expect, test } from "vitest";
import { parseQuantity } from "../../../src/core/units/quantity.ts";
import type { UnitTag } from "../../../src/core/units/unit.ts";
import rkm from "../../reference/rkm.json" with { type: "json" };

// IEC 60062:2016; which rows are confirmed and which are from memory is said in the file, row by row.
const codes = rkm.rows.filter(({ kind }) => kind === "resistance" || kind === "capacitance");
const withTolerance = rkm.rows.filter(({ kind }) => kind === "resistance_with_tolerance");

describe("codes of IEC 60062", () => {
  test("the reference has its rows", () => {
    expect(codes.length).toBeGreaterThan(60);
    expect(withTolerance.length).toBe(8);
  });

  test.each(codes)("$code is $value $unit", ({ code, value, unit }) => {
    expect(parseQuantity(code, unit as UnitTag)).toEqual({ ok: true, value });
    expect(parseQuantity(`-${code}`, unit as UnitTag)).toEqual({ ok: true, value: -value });
  });

  test.each(withTolerance)("the tolerance letter of $code is not dropped unsaid", ({ code, unit }) => {
    expect(parseQuantity(code, unit as UnitTag)).toMatchObject({ ok: false });
  });

  test("the Greek mu of the standard reads like its ASCII stand-in", () => {
    for (const mu of ["u", "\u00b5", "\u03bc"]) {
      expect(parseQuantity(`1${mu}5`, "farad")).toEqual({ ok: true, value: 1.5e-6 });
    }
  });

  // The letter F for farad is from memory of the standard.
  test("F stands for the point of a capacitance in farad", () => {
    expect(parseQuantity("1F5", "farad")).toEqual({ ok: true, value: 1.5 });
  });

  test.each([
    ["4k7 Ω", "ohm", 4700],
    ["4k7Hz", "hertz", 4700],
    ["4n7F", "farad", 4.7e-9],
    ["2M2", "number", 2.2e6],
  ] as const)("a letter code can carry its unit: %s", (code, unit, value) => {
    expect(parseQuantity(code, unit)).toEqual({ ok: true, value });
  });

  test.each([
    ["4k7k", "ohm"],
    ["4k7kΩ", "ohm"],
    ["4.7k7", "ohm"],
    ["4k7.5", "ohm"],
    ["4R7R", "ohm"],
    ["4R7Ω", "ohm"],
    ["4R7", "farad"],
    ["4L7", "henry"],
    ["4k7F", "ohm"],
    ["4m7", "metre"],
    ["3k3", "level"],
    ["4x7", "ohm"],
    ["R", "ohm"],
    ["k", "ohm"],
  ] as const)("%s is no %s", (code, unit) => {
    expect(parseQuantity(code, unit)).toMatchObject({ ok: false });
  });
});
