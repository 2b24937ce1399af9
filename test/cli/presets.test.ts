import { describe, expect, it } from "vitest";
import type { FoundPreset, PresetStore } from "../../src/cli/preset-store.ts";
import { ASCII, fileOf, folder, lowpass, type RunSettings, run } from "./support.ts";

const bridge = JSON.stringify(lowpass({ title: "Pump 2, strain bridge" }));
const stage = JSON.stringify({
  format: "halfpower-stage",
  version: 1,
  stage: { kind: "gain", parts: { gain: 2 } },
});

/** Presets in memory; what is saved is own. */
function memory(notes: readonly string[] = []): PresetStore & { readonly own: Map<string, string> } {
  const here = folder();
  const shipped = new Map<string, FoundPreset>([
    ["strain-bridge", { type: "chain", text: bridge, folder: here }],
    ["doubler", { type: "stage", text: stage, folder: here }],
  ]);
  const own = new Map<string, string>();
  return {
    own,
    list: async () => ({
      ok: true,
      value: [
        { name: "strain-bridge", origin: "shipped", type: "chain", title: "Pump 2, strain bridge" },
        { name: "doubler", origin: "shipped", type: "stage", title: "" },
        ...[...own.keys()].map(
          (name) => ({ name, origin: "own", type: "chain", title: "Eigene, Ω" }) as const,
        ),
      ],
    }),
    find: async (name) => ({ ok: true, value: shipped.get(name) }),
    save: async (name, text) => {
      if (name.includes("/")) {
        return { ok: false, problem: { place: "NAME", found: `"${name}" has a slash`, allowed: "none" } };
      }
      own.set(name, text);
      return { ok: true, value: undefined };
    },
    remove: async (name) => {
      own.delete(name);
      return { ok: true, value: undefined };
    },
    notes: () => notes,
  };
}

const runWith = (argv: readonly string[], presets = memory(), settings: RunSettings = {}) =>
  run(argv, { ...settings, presets });

describe("halfpower presets", () => {
  it("lists name, origin, type and title, also without a command of its own", async () => {
    const listed = await runWith(["presets", "list"]);
    expect(listed).toEqual({
      exitCode: 0,
      stderr: "",
      stdout: [
        "name           origin   type   title",
        "strain-bridge  shipped  chain  Pump 2, strain bridge",
        "doubler        shipped  stage",
        "",
      ].join("\n"),
    });
    expect(await runWith(["presets"])).toEqual(listed);
    const { stdout } = await runWith(["presets", "--json"]);
    expect(JSON.parse(stdout).presets[1]).toEqual({
      name: "doubler",
      origin: "shipped",
      type: "stage",
      title: "",
    });
  });

  it("shows a preset's text as it is", async () => {
    const { stdout, exitCode } = await runWith(["presets", "show", "doubler"]);
    expect([exitCode, stdout]).toEqual([0, stage]);
  });

  it("saves a chain and removes it", async () => {
    const presets = memory();
    const text = JSON.stringify(lowpass(), null, 1);
    const saved = await runWith(["presets", "save", fileOf(text), "line"], presets);
    expect(saved).toEqual({ exitCode: 0, stdout: "", stderr: 'halfpower: the preset "line" is saved\n' });
    expect(presets.own.get("line")).toBe(text);
    expect((await runWith(["presets"], presets, { env: ASCII })).stdout).toContain("Eigene, ohm");
    const removed = await runWith(["presets", "remove", "line"], presets);
    expect(removed.stderr).toBe('halfpower: the preset "line" is removed\n');
    expect(presets.own.size).toBe(0);
  });

  it("says on standard error what was amiss with the settings, and goes on", async () => {
    const { exitCode, stdout, stderr } = await runWith(
      ["read", "strain-bridge", "1k", "--json"],
      memory(["set aside"]),
    );
    expect([exitCode, stderr]).toEqual([0, "halfpower: set aside\n"]);
    expect(JSON.parse(stdout).title).toBe("Pump 2, strain bridge");
  });

  it.each([
    [["presets", "lst"], 'presets: there is no command "lst"; allowed is for example list'],
    [["presets", "show"], "presets show: NAME is missing; allowed is halfpower presets show NAME"],
    [["presets", "save", "x"], "presets save: NAME is missing; allowed is halfpower presets save CHAIN NAME"],
    [["presets", "show", "dubler"], 'NAME: there is no preset "dubler"; allowed is for example doubler'],
    [
      ["presets", "save", "doubler", "x"],
      "preset doubler: it is a stage, not a chain; allowed is the preset of a chain, or a stage within a chain",
    ],
    [["presets", "save", "strain-bridge", "a/b"], 'NAME: "a/b" has a slash; allowed is none'],
    [
      ["read", "strain-brige", "1k"],
      'CHAIN: there is no preset "strain-brige"; allowed is for example strain-bridge',
    ],
    [
      ["read", "zzz", "1k"],
      'CHAIN: there is no preset "zzz"; allowed is a chain file, - for standard input, or a preset\'s name',
    ],
    [
      ["read", "./strain-bridge", "1k"],
      "./strain-bridge: there is no such file or folder; allowed is a file, in a folder that exists",
    ],
    [
      ["read", "strain-bridge.json", "1k"],
      "strain-bridge.json: there is no such file or folder; allowed is a file, in a folder that exists",
    ],
  ])("refuses %j", async (argv, message) => {
    const { exitCode, stdout, stderr } = await runWith(argv);
    expect(stderr).toBe(`halfpower: ${message}\n`);
    expect([exitCode, stdout]).toEqual([2, ""]);
  });
});

describe("halfpower without CHAIN", () => {
  it("sets out the strain bridge where there is no full screen", async () => {
    const { exitCode, stdout } = await runWith([]);
    expect(exitCode).toBe(0);
    expect(stdout.split("\n")[0]).toBe("Pump 2, strain bridge");
  });
});
