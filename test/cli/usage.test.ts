import { describe, expect, it } from "vitest";
import manifest from "../../package.json" with { type: "json" };
import { runCli } from "../../src/cli/run.ts";
import { ASCII, fileOf, lowpass, run } from "./support.ts";

describe("the command line", () => {
  it.each([
    [["--jsn"], 'command line: there is no option "--jsn"; allowed is --version, --ascii or --help'],
    [["--vers"], 'command line: there is no option "--vers"; allowed is for example --version'],
    [["read", "x", "1k", "--jsn"], 'read: there is no option "--jsn"; allowed is for example --json'],
    [
      ["sweep", "x", "--perdecad", "1"],
      'sweep: there is no option "--perdecad"; allowed is for example --per-decade',
    ],
    [["swep", "x", "--from", "1"], 'command line: there is no command "swep"; allowed is for example sweep'],
    [["reads", "x", "1k"], 'command line: there is no command "reads"; allowed is for example read'],
    [["read"], "read: CHAIN is missing; allowed is halfpower read CHAIN FREQ..."],
    [["read", "x"], "read: FREQ is missing; allowed is halfpower read CHAIN FREQ..."],
    [["sweep"], "sweep: CHAIN is missing; allowed is halfpower sweep CHAIN"],
    [["--\u001b[31m"], 'command line: there is no option "--[31m"; allowed is --version, --ascii or --help'],
  ])("refuses %j", async (argv, message) => {
    const { exitCode, stdout, stderr } = await run(argv);
    expect(stderr).toBe(`halfpower: ${message}\n`);
    expect([exitCode, stdout]).toEqual([2, ""]);
  });

  it("shows the version", async () => {
    for (const option of ["--version", "-V"]) {
      expect(await run([option])).toEqual({ exitCode: 0, stdout: `${manifest.version}\n`, stderr: "" });
    }
  });

  it("opens the full screen only between two terminals that can move the cursor", async () => {
    const opened: unknown[] = [];
    const terminal = async (TERM: string, isTTY: boolean) => {
      const output = { isTTY, write: async () => {} };
      const stdin = Object.assign((async function* () {})(), { isTTY: true });
      const io = {
        env: { TERM, LANG: "C.UTF-8" },
        stdin,
        stdout: output,
        stderr: output,
      };
      return runCli([fileOf(lowpass())], io, async ({ chain, display }) => {
        opened.push([chain.path?.endsWith("pump.chain.json"), display.mode]);
        return 7;
      });
    };
    expect(await terminal("xterm", true)).toBe(7);
    expect(await terminal("dumb", true)).toBe(0);
    expect(await terminal("xterm", false)).toBe(0);
    expect(opened).toEqual([[true, "screen"]]);
  });
});

describe("a fault", () => {
  const failing = async (error: unknown) => {
    let stderr = "";
    const io = {
      env: ASCII,
      stdin: (async function* () {})(),
      stdout: { write: () => Promise.reject(error) },
      stderr: {
        write: async (text: string) => {
          stderr += text;
        },
      },
    };
    return { exitCode: await runCli(["read", fileOf(lowpass()), "1k"], io), stderr };
  };

  it("of the program is one line without a stack trace", async () => {
    const { exitCode, stderr } = await failing(new TypeError("x is not\na function\u001b[31m"));
    expect([exitCode, stderr]).toEqual([2, "halfpower: internal fault: x is not a function[31m\n"]);
  });

  it("of the disk is said in words", async () => {
    const { exitCode, stderr } = await failing(Object.assign(new Error("write"), { code: "ENOSPC" }));
    expect(exitCode).toBe(2);
    expect(stderr).toMatch(/^halfpower: standard output: the disk is full.*\n$/);
  });

  it("of the reader, who closed the pipe, is none", async () => {
    const closed = await failing(Object.assign(new Error("write EPIPE"), { code: "EPIPE" }));
    expect(closed).toEqual({ exitCode: 0, stderr: "" });
  });
});
