import { describe, expect, it } from "vitest";
import { run } from "./support.ts";

const EDGES = ["--pass", "1k", "--pass-loss", "0.5", "--stop", "5k", "--stop-loss", "60"];

describe("halfpower design", () => {
  it("writes a chain that keeps what was asked, and the families side by side to standard error", async () => {
    const { exitCode, stdout, stderr } = await run(["design", ...EDGES]);
    expect(exitCode).toBe(0);
    const document = JSON.parse(stdout);
    expect(document.stages).toHaveLength(1);
    expect(document.stages[0].kind).toBe("filter");
    // ln √((10^6 − 1)/(10^0.05 − 1)) / ln 5 = 4.95.
    expect(document.stages[0].parts).toMatchObject({ family: "butterworth", order: 5 });
    expect(stderr.split("\n")[0]).toMatch(/^family +order +highest Q/);
    expect(stderr).toMatch(/^elliptic +4 /m);
    expect((await run(["check", "-", "--json"], { input: stdout })).exitCode).toBe(0);
  });

  it.each(["sallen-key", "mfb", "ladder"])(
    "realised as %s it goes through check as a pipe",
    async (circuit) => {
      const { exitCode, stdout, stderr } = await run([
        "design",
        ...EDGES,
        "--as",
        circuit,
        "--series",
        "E24",
      ]);
      expect(exitCode).toBe(0);
      expect(JSON.parse(stdout).stages.length).toBeGreaterThan(2);
      expect(stderr).toContain("dB up to the stop edge");
      const checked = await run(["check", "-", "--json"], { input: stdout });
      const [pass, stop] = JSON.parse(checked.stdout).limits;
      expect(stop.pass).toBe(true);
      expect(pass.margin).toBeGreaterThan(-0.3);
    },
  );

  it.each([
    [["--pass", "1k", "--pass-loss", "1", "--stop", "2k"], "--stop-loss"],
    [["--pass", "5k", "--pass-loss", "1", "--stop", "1k", "--stop-loss", "40"], "--stop: "],
    [["--pass", "1k", "--pass-loss", "0", "--stop", "2k", "--stop-loss", "40"], "--pass-loss: "],
    [["--pass", "1k", "--pass-loss", "-1", "--stop", "2k", "--stop-loss", "40"], "--pass-loss"],
    [["--pass", "1k", "--pass-loss", "1", "--stop", "2k", "--stop-loss", "5000"], "--stop-loss: "],
    [["--pass", "1k", "--pass-loss", "0.01", "--stop", "1.001k", "--stop-loss", "100"], "would be needed"],
    [[...EDGES, "--family", "cauer"], "--family: "],
    [[...EDGES, "--family", "bessel"], "bessel: no order"],
    [[...EDGES, "--family", "elliptic", "--as", "mfb"], "has nulls"],
    [[...EDGES, "--as", "twin"], "--as: "],
    [[...EDGES, "--series", "E7"], "--series: "],
    [[...EDGES, "--resistance", "0"], "--resistance: "],
    [[...EDGES, "--as", "mfb", "--gbw", "fast"], "--gbw: "],
  ])("refuses %j with one message", async (options, words) => {
    const { exitCode, stdout, stderr } = await run(["design", ...options]);
    expect([exitCode, stdout]).toEqual([2, ""]);
    expect(stderr).toContain(words);
    expect(stderr.trim().split("\n")).toHaveLength(1);
  });
});
