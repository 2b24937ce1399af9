import { execFileSync, spawn, spawnSync } from "node:child_process";
import { accessSync, constants, existsSync, openSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { startPty } from "../helpers/pty.ts";
import { fileOf, lowpass } from "./support.ts";

const root = new URL("../..", import.meta.url).pathname;
const program = `${root}dist/halfpower.js`;

const start = (args: readonly string[], input = "", env: Record<string, string> = {}) =>
  spawnSync(process.execPath, [program, ...args], {
    input,
    encoding: "utf8",
    env: { PATH: process.env.PATH, LANG: "C.UTF-8", ...env },
  });

beforeAll(() => {
  if (!existsSync(program)) execFileSync(process.execPath, [".ci/build.mjs"], { cwd: root });
}, 60_000);

describe("the built command", () => {
  it("can be run by itself", () => {
    expect(() => accessSync(program, constants.X_OK)).not.toThrow();
    expect(execFileSync(program, ["--version"], { encoding: "utf8" })).toMatch(/^\d+\.\d+\.\d+\n$/);
  });

  it("reads a chain from standard input, and a formula", () => {
    const stages = [{ kind: "formula", parts: { H: "1/(1 + s*T)", T: 1e-3 } }];
    const { status, stdout, stderr } = start(
      ["read", "-", "159.154943", "--json"],
      JSON.stringify(lowpass({ stages })),
    );
    expect([status, stderr]).toEqual([0, ""]);
    // 1/(2π·1 ms) = 159.154943 Hz is the half-power point, −3.0103 dB.
    expect(JSON.parse(stdout).readings[0].gainDb).toBeCloseTo(-3.0103, 4);
  });

  it("ends with 2 and one line for bad usage", () => {
    const { status, stdout, stderr } = start(["read", "nowhere.chain.json", "1k"]);
    expect([status, stdout]).toEqual([2, ""]);
    expect(stderr).toMatch(/^halfpower: nowhere\.chain\.json: .*\n$/);
  });

  it("takes no offence at a pipe that is closed", async () => {
    const file = fileOf(lowpass());
    const child = spawn(process.execPath, [program, "sweep", file, "--per-decade", "5000"]);
    let stderr = "";
    child.stderr.on("data", (text) => {
      stderr += text;
    });
    child.stdout.once("data", () => child.stdout.destroy());
    const status = await new Promise((resolve) => child.on("close", resolve));
    expect([status, stderr]).toEqual([0, ""]);
  });

  it("says that the disk is full", () => {
    const full = openSync("/dev/full", "w");
    const { status, stderr } = spawnSync(process.execPath, [program, "read", fileOf(lowpass()), "1k"], {
      stdio: ["ignore", full, "pipe"],
      encoding: "utf8",
    });
    expect(status).toBe(2);
    expect(stderr).toMatch(/^halfpower: standard output: the disk is full.*\n$/);
  });

  it("sets out the sheet in a terminal that is dumb, without a single escape", async () => {
    const pty = startPty(process.execPath, [program, fileOf(lowpass())], { env: { TERM: "dumb" } });
    const { exitCode } = await pty.ended;
    expect(exitCode).toBe(0);
    expect(pty.output()).toContain("Pump 1, pressure line");
    expect(pty.output()).not.toContain("\u001b");
  });
});
