import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { ASCII, fileOf, lowpass, run } from "./support.ts";

const example = readFileSync(new URL("../reference/example.chain.json", import.meta.url), "utf8");
const linesOf = (text: string): string[] => text.split("\n");

describe("halfpower CHAIN without a terminal", () => {
  it("tells the chain, its parts, source, load and converter", async () => {
    const { exitCode, stdout, stderr } = await run([fileOf(example)]);
    expect([exitCode, stderr]).toEqual([0, ""]);
    for (const text of [
      "Pump 2, strain bridge",
      "EMF 1 V, R 350 Ω",
      "R 1 kΩ ±1 %, C 4.7 nF ±10 %",
      "gain 40 dB, bandwidth 50 kHz, Rin 10 MΩ, Rout 50 Ω",
      "R 1 MΩ, C 30 pF in parallel",
      "rate 20 kS/s, 16 bits, full scale 5 V, band 1 kHz",
      "share at 100 Hz",
    ]) {
      expect(stdout).toContain(text);
    }
    expect(stdout).toMatch(/^1 {2}RFI filter {2}rc-lowpass/m);
  });

  it("reads at the decades and at the half-power point", async () => {
    // 1/(2π·1 kΩ·100 nF) = 1591.5494 Hz, −3.01 dB, −45°, −10 dB per decade, RC/2 = 50 µs. Half the power of that at
    // 1 Hz, where the sweep is greatest: 1 + x² = 2(1 + x1²) with x1 = 1 Hz/1591.5494 Hz gives 1591.5501 Hz.
    const { stdout } = await run([fileOf(lowpass())]);
    const halfPower = linesOf(stdout).find((line) => line.endsWith("half power"));
    expect(halfPower?.trim().split(/ {2,}/)).toEqual([
      "1.5916 kHz",
      "-3.01 dB",
      "-45°",
      "50 µs",
      "-10",
      "half power",
    ]);
    for (const decade of ["1 Hz", "10 Hz", "100 Hz", "1 kHz", "10 kHz", "100 kHz", "1 MHz"]) {
      expect(linesOf(stdout).some((line) => line.trim().startsWith(`${decade}  `))).toBe(true);
    }
  });

  it("draws gain and phase over one axis of frequency", async () => {
    // 20·log10|1/(1+jx)| falls by 20 dB per decade, to −55.96 dB at 1 MHz; the phase goes from 0 to −90° (by hand).
    const lines = linesOf((await run([fileOf(lowpass())])).stdout);
    const gain = lines.indexOf("gain");
    const phase = lines.indexOf("phase");
    expect(lines[gain + 1]).toMatch(/^ {6}0┤─+╮[ ·]*$/);
    expect(lines.slice(gain, phase).some((line) => /^ {4}-40┤/.test(line))).toBe(true);
    expect(lines[phase + 1]).toMatch(/^ {6}0┤─+╮[ ·]*$/);
    expect(lines.slice(phase).some((line) => /^ {4}-90┤.*╰─+$/.test(line))).toBe(true);
    expect(lines.some((line) => /^ +Hz 1 +10 +100 +1k +10k +100k +1M$/.test(line))).toBe(true);
  });

  it("shows a notch that lies between two columns, and draws a chain without any shape", async () => {
    const notch = [{ kind: "notch-2", parts: { f0: 50, Q: 5000 } }];
    expect((await run([fileOf(lowpass({ stages: notch }))])).stdout).toContain("▾");
    const { exitCode, stderr } = await run([fileOf(lowpass({ stages: [] }))], {
      env: { LANG: "C.UTF-8", COLUMNS: "40" },
    });
    expect([exitCode, stderr]).toEqual([0, ""]);
  });

  it("names a null, shows a stage that is out of the line, and the cautions", async () => {
    const stages = [
      { kind: "notch-2", name: "mains rejection", parts: { f0: 50, Q: 2 }, caution: "on the mains side" },
      { kind: "gain", name: "spare", off: true, parts: { gain: 10 } },
    ];
    const { stdout } = await run([fileOf(lowpass({ stages }))]);
    expect(stdout).toMatch(/50 Hz +-∞ dB .* null$/m);
    expect(stdout).toMatch(/^2 {2}spare +gain +out of the line$/m);
    expect(stdout).toContain("caution: on the mains side");
  });

  it.each([[undefined], ["80"], ["60"], ["120"], ["0"], ["x"]])(
    "keeps within the columns, COLUMNS %s",
    async (COLUMNS) => {
      const env = { LANG: "C.UTF-8", ...(COLUMNS === undefined ? {} : { COLUMNS }) };
      const { stdout } = await run([fileOf(example)], { env });
      expect(linesOf(stdout).every((line) => [...line].length <= (COLUMNS === "120" ? 120 : 80))).toBe(true);
    },
  );

  it("is plain ASCII with --ascii and in a locale without UTF-8", async () => {
    const file = fileOf(example);
    const asked = await run([file, "--ascii"]);
    const forced = await run([file], { env: ASCII });
    expect(asked.stdout).toMatch(/^[\n -~]+$/);
    expect(forced.stdout).toBe(asked.stdout);
  });

  it("refuses what is no chain", async () => {
    const { exitCode, stdout, stderr } = await run([fileOf("{}")]);
    expect([exitCode, stdout]).toEqual([2, ""]);
    expect(stderr).toMatch(/^halfpower: .*pump\.chain\.json:1:1: .*; allowed is .*\n$/);
  });
});
