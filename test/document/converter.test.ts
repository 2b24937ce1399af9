import { describe, expect, test } from "vitest";
import { fileOf, lowpass, run } from "../cli/support.ts";
import { message, read, withStages } from "./read-here.ts";

const resolvedWith = (converter: string) => {
  const loaded = read(withStages("", `, "converter": ${converter}`));
  return loaded.ok ? loaded.value.resolved.converter : message(withStages("", `, "converter": ${converter}`));
};

describe("a converter", () => {
  test.each([
    ['{ "rate": "20k" }', { rateHz: 20e3 }],
    ['{ "rate": "20k", "band": "10k" }', { rateHz: 20e3, bandHz: 10e3 }],
    ['{ "rate": 1, "bits": 24 }', { rateHz: 1, bits: 24 }],
    ['{ "rate": "1M", "fullScale": "2.5 V" }', { rateHz: 1e6, fullScaleV: 2.5 }],
  ])("needs its rate only: %s", (text, resolved) => {
    expect(resolvedWith(text)).toEqual(resolved);
  });

  test("with its rate only is told in the sheet, and where frequencies fold to in a reading", async () => {
    const file = fileOf(lowpass({ converter: { rate: "20k" } }));
    const sheet = await run([file]);
    expect([sheet.exitCode, sheet.stderr]).toEqual([0, ""]);
    expect(sheet.stdout).toContain("rate 20 kS/s\n");
    expect(sheet.stdout).not.toMatch(/undefined|NaN|bits|full scale|band edge/);
    const reading = await run(["read", file, "19k", "--json"]);
    expect(JSON.parse(reading.stdout).readings[0].foldHz).toBe(1000);
  });
});
