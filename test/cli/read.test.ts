import { describe, expect, it } from "vitest";
import { ASCII, fileOf, lowpass, run } from "./support.ts";

const converter = { rate: "20k", bits: 16, fullScale: 5, band: "1k" };

describe("halfpower read CHAIN FREQ… --json", () => {
  it("prints one document with the fields of the specification", async () => {
    const { exitCode, stdout, stderr } = await run([
      "read",
      fileOf(lowpass({ converter })),
      "12.5k",
      "--json",
    ]);
    const document = JSON.parse(stdout);
    expect([exitCode, stderr]).toEqual([0, ""]);
    expect(Object.keys(document)).toEqual(["title", "against", "readings"]);
    expect(document.title).toBe("Pump 1, pressure line");
    expect(document.against).toBe("emf");
    expect(Object.keys(document.readings[0])).toEqual([
      "freqHz",
      "gainDb",
      "attenuationDb",
      "ratio",
      "phaseDeg",
      "phaseUnwrappedDeg",
      "groupDelayS",
      "slopeDbPerDecade",
      "shares",
      "foldHz",
    ]);
    expect(document.readings[0].shares.map(({ name }: { name: string }) => name)).toEqual([
      "source",
      "RFI filter",
    ]);
    // |12.5 − 20·round(12.5/20)| = 7.5 kHz, by hand.
    expect(document.readings[0].foldHz).toBe(7500);
  });

  it("takes frequencies as they are written on parts and in reports, in the order given", async () => {
    const written = ["4k7", "12.5k", "1 kHz", "0.05MHz", "1e3", "50"];
    const { stdout } = await run(["read", fileOf(lowpass()), ...written, "--json"]);
    const found = JSON.parse(stdout).readings.map(({ freqHz }: { freqHz: number }) => freqHz);
    expect(found).toEqual([4700, 12_500, 1000, 50_000, 1000, 50]);
  });

  it("reads −3.0103 dB and −45° at the half-power point of R and C", async () => {
    // 1/(2π·1 kΩ·100 nF) = 1591.549431 Hz; |1/(1+j)| = 1/√2, angle −45°.
    const { stdout } = await run(["read", fileOf(lowpass()), "1591.549431", "--json"]);
    const [reading] = JSON.parse(stdout).readings;
    expect(reading.gainDb).toBeCloseTo(-3.0103, 4);
    expect(reading.attenuationDb).toBeCloseTo(3.0103, 4);
    expect(reading.phaseDeg).toBeCloseTo(-45, 6);
    expect(reading).not.toHaveProperty("foldHz");
  });
});

describe("halfpower read CHAIN FREQ… --csv", () => {
  it("ends lines with CRLF and has a column for each share", async () => {
    const stages = [{ kind: "gain", name: 'first, "main"', parts: { gain: 10 } }];
    const { stdout } = await run(["read", fileOf(lowpass({ stages })), "100", "1k", "--csv"]);
    const lines = stdout.split("\r\n");
    expect(lines[0]).toBe(
      "freqHz,gainDb,attenuationDb,ratio,phaseDeg,phaseUnwrappedDeg,groupDelayS,slopeDbPerDecade," +
        'share gainDb: source,"share gainDb: first, ""main"""',
    );
    expect(lines[1]).toBe("100,20,-20,10,0,0,0,0,0,20");
    expect(lines).toHaveLength(4);
    expect(lines[3]).toBe("");
  });

  it("leaves fields empty at a null", async () => {
    const stages = [{ kind: "notch-2", parts: { f0: "1k", Q: 5 } }];
    const { stdout } = await run(["read", fileOf(lowpass({ stages })), "1k", "--csv"]);
    expect(stdout.split("\r\n")[1]).toBe("1000,,,0,,,,,0,");
  });
});

describe("halfpower read CHAIN FREQ…", () => {
  it("shows a table with units, and the shares", async () => {
    const { stdout } = await run(["read", fileOf(lowpass({ title: "Pump 1" })), "1591.549431"]);
    expect(stdout).toBe(
      [
        "Pump 1",
        "gain against the EMF of the source",
        "",
        "  frequency        gain  attenuation    ratio  phase  unwrapped  group delay       slope",
        "1.59155 kHz  -3.0103 dB    3.0103 dB  0.70711   -45°       -45°        50 µs  -10 dB/dec",
        "",
        "share of    1.59155 kHz",
        "source             0 dB",
        "RFI filter   -3.0103 dB",
        "",
      ].join("\n"),
    );
  });

  it("reads a chain from standard input", async () => {
    const { exitCode, stdout } = await run(["read", "-", "100"], { input: JSON.stringify(lowpass()) });
    expect(exitCode).toBe(0);
    expect(stdout).toContain("100 Hz");
  });

  it.each([["--ascii"], ["--csv"], ["--json"]])(
    "is plain ASCII in a locale without UTF-8, %s",
    async (option) => {
      const title = "Prüfstand µ, 60 m · Ω 泵";
      const stages = [{ kind: "rc-lowpass", name: "Eingang Ω", parts: { R: "1k", C: "100n" } }];
      const file = fileOf(lowpass({ title, stages }));
      const { stdout, exitCode } = await run(["read", file, "1k", option], { env: ASCII });
      expect(exitCode).toBe(0);
      expect(stdout).toMatch(/^[\r\n -~]*$/);
      if (option === "--json") expect(JSON.parse(stdout).title).toBe(title);
      if (option === "--ascii") expect(stdout).toContain("Prufstand u, 60 m * ohm ?");
    },
  );

  it("lets nothing of a hostile name through to the terminal", async () => {
    const hostile = "a\u001b[31mred\u0007\u009b2J\u202eb\u0000";
    const stages = [{ kind: "gain", name: hostile, parts: { gain: 2 }, caution: hostile }];
    const file = fileOf(lowpass({ title: hostile, stages }));
    for (const option of ["--ascii", "--csv", "--json", "--"]) {
      const { stdout, stderr } = await run(["read", file, option, "1k"]);
      expect(stderr).toBe("");
      expect(stdout).not.toMatch(/[\u0000-\u0009\u000b\u000c\u000e-\u001f\u007f-\u009f\u202e]/);
      expect(stdout).toContain("red");
    }
  });
});

describe("halfpower read refuses", () => {
  it.each([
    [["0"], 'FREQ: "0" is out of range; allowed is more than 0 Hz'],
    [["-5"], 'FREQ: "-5" is out of range; allowed is more than 0 Hz'],
    [["--", "-5k"], 'FREQ: "-5k" is out of range; allowed is more than 0 Hz'],
    [["-5k"], 'read: "-5k" is below zero; allowed is a value above zero'],
    [
      ["1k", "inf"],
      'FREQ 2 of 2: "inf" is not a finite number; allowed is a finite number, at most about 1e308',
    ],
    [["NaN"], 'FREQ: "NaN" is not a finite number; allowed is a finite number, at most about 1e308'],
    [["1e999"], 'FREQ: "1e999" is not a finite number; allowed is a finite number, at most about 1e308'],
    [["1,5k"], 'FREQ: "1,5k" has a comma; allowed is a decimal point, as in 1.5k'],
    [["5 kV"], 'FREQ: "5 kV" is in V; allowed is a frequency in Hz, as in 50, 12.5k or 1 MHz'],
    [[""], "FREQ: it is empty; allowed is a frequency in Hz, as in 50, 12.5k or 1 MHz"],
    [
      ["\u001b[2J"],
      'FREQ: "[2J" does not begin with a number; allowed is a frequency in Hz, as in 50, 12.5k or 1 MHz',
    ],
    [["1k", "--json", "--csv"], "--csv: --json is given too; allowed is one of the two"],
  ])("%j", async (words, message) => {
    const { exitCode, stdout, stderr } = await run(["read", fileOf(lowpass()), ...words]);
    expect(stderr).toBe(`halfpower: ${message}\n`);
    expect(stdout).toBe("");
    expect(exitCode).toBe(2);
  });

  it("a frequency outside a measured response, with its range", async () => {
    const sweep = fileOf("frequency Hz, dB, deg\n10, 0, 0\n1000, -20, -90\n", "cable.csv");
    const stages = [{ kind: "table", name: "cable", parts: { file: sweep } }];
    const file = fileOf(lowpass({ stages }));
    const { exitCode, stderr } = await run(["read", file, "100", "2k"]);
    expect(exitCode).toBe(2);
    expect(stderr).toBe(
      `halfpower: ${file}: there is no value at 2 kHz; allowed is 10 Hz to 1 kHz, the measured range of "cable"\n`,
    );
    expect((await run(["read", file, "10", "1k"])).exitCode).toBe(0);
  });

  it("a part out of range, with file, line, column and path", async () => {
    const text = JSON.stringify(lowpass(), null, 2).replace('"1k"', '"-1k"');
    const file = fileOf(text);
    const { exitCode, stderr } = await run(["read", file, "100"]);
    expect(exitCode).toBe(2);
    expect(stderr).toBe(
      `halfpower: ${file}:10:14: stages[0].parts.R: "-1k" is out of range; allowed is more than 0 Ω\n`,
    );
    expect((await run(["read", file, "100"], { env: ASCII })).stderr).toMatch(/more than 0 ohm\n$/);
  });
});
