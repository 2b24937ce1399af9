import { describe, expect, it } from "vitest";
import { fileOf, lowpass, run } from "./support.ts";

/** R = 1 kΩ, C = 100 nF: 10·log10(1 + (f / 1591.5494 Hz)²) dB down; 1.4451 dB at 1 kHz, 15.967… dB at 9.9 kHz. */
const limits = [
  { name: "band", quantity: "gain", from: 10, to: "1k", atLeast: -1, re: 10 },
  { name: "stop", quantity: "gain", from: "20k", to: "1M", atMost: -20 },
];
const converter = { rate: "20k", bits: 12, fullScale: 5, band: "100" };

describe("halfpower check CHAIN", () => {
  it("prints one document with the fields of the specification, and ends with 1 where a limit is not met", async () => {
    const { exitCode, stdout, stderr } = await run([
      "check",
      fileOf(lowpass({ limits, converter })),
      "--json",
    ]);
    const document = JSON.parse(stdout);
    expect([exitCode, stderr]).toEqual([1, ""]);
    expect(Object.keys(document)).toEqual(["pass", "limits", "folding"]);
    expect(Object.keys(document.limits[0])).toEqual(["name", "pass", "worstFreqHz", "worstValue", "margin"]);
    expect(Object.keys(document.folding)).toEqual(["pass", "worstFreqHz", "attenuationDb", "neededDb"]);
    const [band, stop] = document.limits;
    expect(document.pass).toBe(false);
    expect([band.pass, band.worstFreqHz]).toEqual([false, 1000]);
    // −1.44507 dB at 1 kHz less −0.00017 dB at 10 Hz.
    expect(band.worstValue).toBeCloseTo(-1.4449, 3);
    expect(band.margin).toBeCloseTo(-0.4449, 3);
    expect([stop.pass, stop.worstFreqHz]).toEqual([true, 20000]);
    // The first image begins at 19.9 kHz: 10·log10(1 + 12.5035²) = 21.968 dB; 6.02·12 + 1.76 = 74 dB are needed.
    expect(document.folding.worstFreqHz).toBeCloseTo(19900, 6);
    expect(document.folding.attenuationDb).toBeCloseTo(21.968, 2);
    expect(document.folding.neededDb).toBeCloseTo(74, 9);
    expect(document.folding.pass).toBe(false);
  });

  it("takes another need for what folds", async () => {
    const argv = ["check", fileOf(lowpass({ converter })), "--alias-loss", "20 dB", "--json"];
    const { exitCode, stdout } = await run(argv);
    expect(JSON.parse(stdout).folding).toMatchObject({ pass: true, neededDb: 20 });
    expect(exitCode).toBe(0);
    const bad = await run(["check", fileOf(lowpass()), "--alias-loss", "much"]);
    expect(bad.exitCode).toBe(2);
    expect(bad.stderr).toContain("--alias-loss");
  });

  it("ends with 0 where all are met, and shows each with its margin", async () => {
    const { exitCode, stdout } = await run(["check", fileOf(lowpass({ limits: [limits[1]] }))]);
    expect(exitCode).toBe(0);
    expect(stdout).toContain("limits met");
    expect(stdout).toMatch(/stop +gain +-22\.0\d* dB +20 kHz +2\.0\d* dB +met/);
    const csv = await run(["check", fileOf(lowpass({ limits })), "--csv"]);
    expect(csv.stdout.split("\r\n")[0]).toBe("name,quantity,pass,worstFreqHz,worstValue,margin");
    expect(csv.exitCode).toBe(1);
  });

  it("has nothing to say of a chain without limits and converter", async () => {
    const { exitCode, stdout } = await run(["check", fileOf(lowpass()), "--json"]);
    expect(JSON.parse(stdout)).toEqual({ pass: true, limits: [] });
    expect(exitCode).toBe(0);
  });
});
