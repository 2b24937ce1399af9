import { describe, expect, it } from "vitest";
import type { PresetStore } from "../../src/cli/preset-store.ts";
import { ASCII, run } from "./support.ts";

const none = async () => ({ ok: true as const, value: undefined });
const presets: PresetStore = {
  list: async () => ({ ok: true, value: [] }),
  find: none,
  save: none,
  remove: none,
  notes: () => [],
};

// A change of the help shows as a change of these files; they are written anew with `vitest -u`.
describe("--help", () => {
  it.each([
    [[]],
    [["read"]],
    [["sweep"]],
    [["check"]],
    [["design"]],
    [["presets"]],
    [["presets", "list"]],
    [["presets", "show"]],
    [["presets", "save"]],
    [["presets", "remove"]],
  ])("of %j is as checked in, plain ASCII and at most 80 columns wide", async (command: string[]) => {
    const { exitCode, stdout, stderr } = await run([...command, "--help"], { presets });
    expect([exitCode, stderr]).toEqual([0, ""]);
    expect(stdout).toMatch(/^[\n -~]+$/);
    expect(stdout.split("\n").filter((line) => line.length > 80)).toEqual([]);
    await expect(stdout).toMatchFileSnapshot(`../golden/help-${["halfpower", ...command].join("-")}.txt`);
    expect((await run([...command, "-h"], { presets, env: ASCII })).stdout).toBe(stdout);
  });

  it("offers no presets where there are none to be had", async () => {
    expect((await run(["--help"])).stdout).not.toContain("presets ");
  });
});
