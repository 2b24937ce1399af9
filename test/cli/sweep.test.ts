import { describe, expect, it } from "vitest";
import { fileOf, lowpass, run } from "./support.ts";

const swept = (options: readonly string[], rest: object = {}) =>
  run(["sweep", fileOf(lowpass(rest)), ...options]);

const frequencies = (json: string): number[] =>
  JSON.parse(json).readings.map(({ freqHz }: { freqHz: number }) => freqHz);

describe("halfpower sweep CHAIN", () => {
  it("covers the chain's own sweep, both ends included, without shares", async () => {
    const { exitCode, stdout } = await swept(["--json"], { sweep: { from: 10, to: "1k", perDecade: 3 } });
    expect(exitCode).toBe(0);
    // Steps of a third of a decade: 10·10^(k/3).
    const found = frequencies(stdout);
    expect(found).toHaveLength(7);
    for (const [k, freqHz] of found.entries()) expect(freqHz).toBeCloseTo(10 * 10 ** (k / 3), 9);
    expect(found[6]).toBe(1000);
    expect(Object.keys(JSON.parse(stdout).readings[0])).toEqual([
      "freqHz",
      "gainDb",
      "attenuationDb",
      "ratio",
      "phaseDeg",
      "phaseUnwrappedDeg",
      "groupDelayS",
      "slopeDbPerDecade",
    ]);
  });

  it("takes another range and density", async () => {
    const { stdout } = await swept(["--from", "100", "--to=2 kHz", "--per-decade", "1", "--csv"]);
    const rows = stdout.split("\r\n").slice(1, -1);
    expect(rows.map((row) => Number(row.split(",")[0]))).toEqual([100, 1000, 2000]);
  });

  it("leaves out rows outside a measured response and says so on standard error", async () => {
    const table = fileOf("frequency Hz, dB, deg\n10, 0, 0\n1000, -20, -90\n", "cable.csv");
    const stages = [{ kind: "table", name: "cable", parts: { file: table } }];
    const file = fileOf(lowpass({ stages, sweep: { from: 1, to: "10k", perDecade: 1 } }));
    const { exitCode, stdout, stderr } = await run(["sweep", file, "--json"]);
    expect(exitCode).toBe(0);
    expect(frequencies(stdout)).toEqual([10, 100, 1000]);
    expect(stderr).toBe(
      `halfpower: ${file}: 2 rows are left out; there are values from 10 Hz to 1 kHz, the measured range of "cable"\n`,
    );
    const nowhere = await run(["sweep", file, "--from", "2k"]);
    expect(nowhere.exitCode).toBe(2);
    expect(nowhere.stderr).toContain("nowhere in the sweep is a value");
  });

  it("takes 200000 points and no more", async () => {
    // 20 decades at 10000 per decade are 200001 points.
    const tooMany = await swept(["--from", "1", "--to", "1e20", "--per-decade", "10000"]);
    expect(tooMany.exitCode).toBe(2);
    expect(tooMany.stderr).toBe("halfpower: sweep: it has 200001 points; allowed is at most 200000 points\n");
  });
});

describe("halfpower sweep refuses", () => {
  it.each([
    [["--from", "0"], '--from: "0" is out of range; allowed is more than 0 Hz'],
    [["--from", "-5"], '--from: "-5" is out of range; allowed is more than 0 Hz'],
    [["--to", "1k", "--from", "2k"], '--to: "1k" is not above "from"; allowed is more than 2 kHz'],
    [["--from", "1k", "--to", "1k"], '--to: "1k" is not above "from"; allowed is more than 1 kHz'],
    [["--from", "2M"], '--from: "2M" is not below "to"; allowed is below 1 MHz, where the sweep ends'],
    [["--per-decade", "0"], '--per-decade: "0" is out of range; allowed is a whole number from 1 to 10000'],
    [
      ["--per-decade", "2.5"],
      '--per-decade: "2.5" is out of range; allowed is a whole number from 1 to 10000',
    ],
    [
      ["--per-decade", "10001"],
      '--per-decade: "10001" is out of range; allowed is a whole number from 1 to 10000',
    ],
    [["--from"], "sweep: --from has no value; allowed is --from <FREQ>"],
    [["1k"], 'sweep: "1k" is one word too many; allowed is halfpower sweep CHAIN'],
  ])("%j", async (options, message) => {
    const { exitCode, stdout, stderr } = await swept(options);
    expect(stderr).toBe(`halfpower: ${message}\n`);
    expect([exitCode, stdout]).toEqual([2, ""]);
  });
});
