import { execFileSync, spawnSync } from "node:child_process";
import { existsSync, mkdirSync, mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { beforeAll, beforeEach, describe, expect, it } from "vitest";
import { chainOf } from "./texts.ts";

const root = new URL("../..", import.meta.url).pathname;
const program = join(root, "dist", "halfpower.js");
let home: string;
let settings: string;

beforeAll(() => {
  if (!existsSync(program)) execFileSync(process.execPath, [".ci/build.mjs"], { cwd: root });
}, 60_000);
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), "halfpower-home-"));
  settings = join(home, "halfpower", "settings.json");
});

function halfpower(...args: readonly string[]) {
  const env = { PATH: process.env.PATH, LANG: "C.UTF-8", XDG_CONFIG_HOME: home };
  const { status, stdout, stderr } = spawnSync(process.execPath, [program, ...args], {
    env,
    cwd: home,
    encoding: "utf8",
    input: "",
  });
  return { status, stdout, stderr };
}

describe("the built command and presets on the disk", () => {
  it("keeps a chain under a name, uses it by that name from anywhere, and removes it", () => {
    const folder = mkdtempSync(join(tmpdir(), "halfpower-stand-"));
    writeFileSync(join(folder, "cable.csv"), "10,-0.1,-1\n1000,-3,-45\n");
    const stages = [{ kind: "table", name: "cable", parts: { file: "cable.csv" } }];
    const text = JSON.stringify({ format: "halfpower-chain", version: 1, title: "Pump 3", stages });
    writeFileSync(join(folder, "pump3.chain.json"), text);
    expect(halfpower("presets", "save", join(folder, "pump3.chain.json"), "pump 3")).toEqual({
      status: 0,
      stdout: "",
      stderr: 'halfpower: the preset "pump 3" is saved\n',
    });
    expect(halfpower("presets", "show", "pump 3")).toEqual({ status: 0, stdout: text, stderr: "" });
    const { presets } = JSON.parse(halfpower("presets", "--json").stdout);
    expect(presets).toContainEqual({ name: "pump 3", origin: "own", type: "chain", title: "Pump 3" });
    const { readings } = JSON.parse(halfpower("read", "pump 3", "1k", "--json").stdout);
    // The row at 1 kHz as it was measured.
    expect(readings[0].gainDb).toBeCloseTo(-3, 9);
    expect(halfpower("presets", "remove", "pump 3").status).toBe(0);
    expect(halfpower("read", "pump 3", "1k").status).toBe(2);
  });

  it("replaces the user's own and refuses the name of a shipped one", () => {
    const save = (notes: string, name: string) => {
      const file = join(home, "pump.chain.json");
      writeFileSync(file, chainOf(notes));
      return halfpower("presets", "save", file, name);
    };
    expect(save("one", "mine").status).toBe(0);
    expect(save("two", "mine").status).toBe(0);
    expect(halfpower("presets", "show", "mine").stdout).toBe(chainOf("two"));
    const refused = save("three", "strain-bridge");
    expect(refused.stderr).toBe(
      'halfpower: preset "strain-bridge": a preset of that name came with the program; allowed is another name\n',
    );
    expect(refused.status).toBe(2);
  });

  it("starts with a damaged settings file, which it sets aside and says so", () => {
    mkdirSync(join(home, "halfpower"));
    writeFileSync(settings, "{ damaged");
    const { status, stderr } = halfpower("presets", "list");
    expect([status, stderr]).toEqual([
      0,
      `halfpower: ${settings}: it does not hold settings; it is kept as ${settings}.damaged, and new settings begin\n`,
    ]);
    expect(readFileSync(`${settings}.damaged`, "utf8")).toBe("{ damaged");
    expect(halfpower("presets", "list").stderr).toBe("");
  });

  it("does not touch the settings for a chain file", () => {
    const file = join(home, "pump.chain.json");
    writeFileSync(file, chainOf(""));
    expect(halfpower("read", file, "1k")).toMatchObject({ status: 0, stderr: "" });
    expect(existsSync(join(home, "halfpower"))).toBe(false);
  });

  it("sets out the strain bridge of the pump stand where no chain is named and there is no terminal", () => {
    const { status, stdout, stderr } = halfpower();
    expect([status, stderr]).toEqual([0, ""]);
    const shipped = JSON.parse(halfpower("presets", "show", "strain-bridge").stdout);
    expect(stdout.split("\n")[0]).toBe(shipped.title);
  });
});
