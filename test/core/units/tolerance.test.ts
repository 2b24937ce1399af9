import { describe, expect, test } from "vitest";
import { parseTolerance } from "../../../src/core/units/tolerance.ts";

describe("parseTolerance(input) -> fraction", () => {
  // A percent is a hundredth (ISO 80000-1).
  test.each([
    ["5%", 0.05],
    ["5 %", 0.05],
    ["0.1%", 0.001],
    ["99.9 %", 0.999],
    ["0.05", 0.05],
    [0.05, 0.05],
    [" 1% ", 0.01],
  ])("%j is %d", (input, fraction) => {
    expect(parseTolerance(input)).toEqual({ ok: true, value: fraction });
  });

  const allowed = "a tolerance above 0 and below 100 %, as in 5% or 0.05";
  test.each([
    ["0", '"0" is 0 %'],
    ["0%", '"0%" is 0 %'],
    ["100%", '"100%" is 100 %'],
    ["-1 %", '"-1 %" is -1 %'],
    ["5", '"5" is 500 %'],
    [1, "1 is 100 %"],
    ["1k", '"1k" is 100000 %'],
    ["5 Ω", '"5 Ω" is in Ω'],
    ["J", '"J" does not begin with a number'],
    ["", "nothing"],
  ])("%j is refused", (input, found) => {
    expect(parseTolerance(input)).toEqual({ ok: false, problem: { found, allowed } });
  });

  test("a comma and a value that is not finite keep their own hints", () => {
    expect(parseTolerance("0,5%")).toMatchObject({ problem: { allowed: "a decimal point, as in 0.5%" } });
    expect(parseTolerance(NaN)).toMatchObject({ problem: { found: "NaN is not a finite number" } });
  });
});
