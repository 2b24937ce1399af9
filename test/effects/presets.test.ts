import { mkdirSync, mkdtempSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { beforeEach, describe, expect, it } from "vitest";
import type { Result } from "../../src/core/result.ts";
import { type FileProblem, fileProblemText } from "../../src/effects/file-problem.ts";
import { openChainPreset, openStagePreset } from "../../src/effects/preset-open.ts";
import { openPresets, type Presets } from "../../src/effects/presets.ts";
import { chainOf, stageOf } from "./texts.ts";

let config: string;
let shipped: string;
let presets: Presets;

beforeEach(() => {
  const folder = mkdtempSync(join(tmpdir(), "halfpower-presets-"));
  [config, shipped] = [join(folder, "config"), join(folder, "presets")];
  mkdirSync(shipped);
  writeFileSync(join(shipped, "strain-bridge.chain.json"), chainOf("", "Pump 2, strain bridge"));
  writeFileSync(join(shipped, "rfi-filter.stage.json"), stageOf());
  presets = openPresets({ config, shipped });
});

const said = (result: Result<unknown, FileProblem>): string =>
  result.ok ? "done" : fileProblemText(result.problem);

const save = (name: string, text = chainOf(""), replace = false) =>
  presets.save(name, text, "/stand", { replace });

const own = async () => (await presets.list()).filter(({ origin }) => origin === "own");

async function found(name: string) {
  const result = await presets.find(name);
  return result.ok ? result.value : undefined;
}

describe("presets", () => {
  it("are listed, shipped before own, by name, with title and kind", async () => {
    await save("pump-3 line", chainOf("", "Pump 3"));
    await save("divider", stageOf("Zähler"));
    expect(await presets.list()).toEqual([
      { name: "rfi-filter", origin: "shipped", type: "stage", title: "RFI filter", kind: "rc-lowpass" },
      { name: "strain-bridge", origin: "shipped", type: "chain", title: "Pump 2, strain bridge" },
      { name: "divider", origin: "own", type: "stage", title: "Zähler", kind: "rc-lowpass" },
      { name: "pump-3 line", origin: "own", type: "chain", title: "Pump 3" },
    ]);
    expect(presets.notes()).toEqual([]);
  });

  it.each([
    ["a chain", chainOf("two\nlines, Ω and \u{1f50a}")],
    ["a stage", stageOf()],
    ["odd layout and line ends", chainOf("").replaceAll(',"', ' ,\r\n\t"')],
    ["a byte order mark", `\ufeff${chainOf("")}`],
  ])("come back as they were written: %s", async (_, text) => {
    expect(said(await save("mine", text))).toBe("done");
    expect(await found("mine")).toMatchObject({ name: "mine", origin: "own", text, folder: "/stand" });
    // As another start of the program finds it.
    const later = await openPresets({ config, shipped }).find("mine");
    expect(later.ok && later.value?.text).toBe(text);
  });

  it("are opened as what they are, files named in them beside where they came from", async () => {
    const folder = mkdtempSync(join(tmpdir(), "halfpower-stand-"));
    writeFileSync(join(folder, "cable.csv"), "10,-0.1,-1\n1000,-3,-45\n");
    const stages = [{ kind: "table", parts: { file: "cable.csv" } }];
    const text = JSON.stringify({ format: "halfpower-chain", version: 1, stages });
    await presets.save("cable", text, folder);
    const chain = await openChainPreset((await found("cable"))!);
    expect(chain.ok && chain.value.context.folder).toBe(folder);
    const bridge = await openChainPreset((await found("strain-bridge"))!);
    expect(bridge.ok && bridge.value.resolved.title).toBe("Pump 2, strain bridge");
    const filter = await openStagePreset((await found("rfi-filter"))!);
    expect(filter.ok && filter.value.preset.stage.parts).toEqual({ R: "1k00", C: "4n7" });
    const wrong = await openStagePreset((await found("strain-bridge"))!);
    expect(said(wrong)).toMatch(/^preset strain-bridge:1:\d+: format: found "halfpower-chain"; allowed is/);
  });

  it("are not replaced unasked", async () => {
    expect(await save("mine", chainOf("one"))).toEqual({ ok: true, value: "added" });
    expect(said(await save("mine", chainOf("two")))).toBe(
      'preset "mine": there is a preset of that name already; allowed is replacing it on request, or another name',
    );
    expect((await found("mine"))?.text).toBe(chainOf("one"));
    expect(await save("mine", chainOf("two"), true)).toEqual({ ok: true, value: "replaced" });
    expect((await found("mine"))?.text).toBe(chainOf("two"));
    expect(await own()).toHaveLength(1);
  });

  it("are renamed and removed", async () => {
    await save("one", chainOf("one"));
    await save("two", chainOf("two"));
    expect(said(await presets.rename("one", " three "))).toBe("done");
    expect((await own()).map(({ name }) => name)).toEqual(["three", "two"]);
    expect((await found("three"))?.text).toBe(chainOf("one"));
    expect(said(await presets.rename("three", "two"))).toContain("there is a preset of that name already");
    expect(said(await presets.rename("three", "strain-bridge"))).toContain("came with the program");
    expect(said(await presets.rename("three", "three"))).toBe("done");
    expect(said(await presets.rename("one", "four"))).toBe(
      'preset "one": there is no preset of that name; allowed is a preset of your own',
    );
    expect(said(await presets.remove("three"))).toBe("done");
    expect(said(await presets.remove("three"))).toContain("there is no preset of that name");
    expect((await own()).map(({ name }) => name)).toEqual(["two"]);
  });

  it("that came with the program stay as they are", async () => {
    const before = readFileSync(join(shipped, "strain-bridge.chain.json"));
    expect(said(await save("strain-bridge"))).toBe(
      'preset "strain-bridge": a preset of that name came with the program; allowed is another name',
    );
    expect(said(await save("strain-bridge", chainOf(""), true))).toContain("came with the program");
    expect(said(await presets.remove("strain-bridge"))).toBe(
      'preset "strain-bridge": it came with the program and stays as it is; allowed is a preset of your own',
    );
    expect(said(await presets.rename("strain-bridge", "mine"))).toContain("stays as it is");
    expect(readFileSync(join(shipped, "strain-bridge.chain.json"))).toEqual(before);
    expect(readdirSync(shipped)).toHaveLength(2);
  });

  it("of the user's come first where a later program brings the same name along, and can be renamed", async () => {
    await save("current-clamp", chainOf("mine"));
    writeFileSync(join(shipped, "current-clamp.chain.json"), chainOf("theirs"));
    expect((await found("current-clamp"))?.text).toBe(chainOf("mine"));
    expect((await presets.list()).filter(({ name }) => name === "current-clamp")).toHaveLength(1);
    expect(said(await presets.rename("current-clamp", "my clamp"))).toBe("done");
    expect((await found("current-clamp"))?.text).toBe(chainOf("theirs"));
  });

  it("are found under any way to write the same name", async () => {
    // Unicode Annex 15: "é" as one character and as e with an accent are the same text.
    await save(" caf\u00e9 ");
    expect((await found("cafe\u0301"))?.name).toBe("caf\u00e9");
    expect(said(await save("cafe\u0301"))).toContain("there is a preset of that name already");
  });
});

describe("names of presets", () => {
  it.each([
    "p",
    "Pump 3, Brücke",
    "x".repeat(80),
    "\u{1f50a}".repeat(80),
    "__proto__",
    "constructor",
    "a.chain",
    "…",
  ])("can be %j", async (name) => {
    expect(said(await save(name))).toBe("done");
    expect((await found(name))?.text).toBe(chainOf(""));
    expect((await own()).map((preset) => preset.name)).toEqual([name]);
    expect(said(await presets.remove(name))).toBe("done");
  });

  it.each([
    ["", "it is empty; allowed is 1 to 80 printable characters"],
    [" \t\n", "it is empty; allowed is 1 to 80 printable characters"],
    ["x".repeat(81), "it has more than 80 characters; allowed is 1 to 80 printable characters"],
    ["x".repeat(1_000_000), "it has more than 80 characters; allowed is 1 to 80 printable characters"],
    ["a\u001b[2Jb", '"a[2Jb" has characters that do not show; allowed is 1 to 80 printable characters'],
    ["a\nb", '"a b" has characters that do not show; allowed is 1 to 80 printable characters'],
    ["a\0b", '"ab" has characters that do not show; allowed is 1 to 80 printable characters'],
    ["a\u202eb", '"ab" has characters that do not show; allowed is 1 to 80 printable characters'],
    ["\ud800", '"\ufffd" has characters that do not show; allowed is 1 to 80 printable characters'],
    ["../../etc/x", '"../../etc/x" has a slash, as files do; allowed is a name without a slash'],
    ["mine.json", '"mine.json" stands for a file; allowed is a name without .json'],
    ["-", '"-" begins like an option; allowed is a name without - in front'],
    ["--json", '"--json" begins like an option; allowed is a name without - in front'],
  ])("cannot be %j", async (name, words) => {
    expect(said(await save(name))).toBe(`preset name: ${words}`);
    await save("mine");
    expect(said(await presets.rename("mine", name))).toBe(`preset name: ${words}`);
  });

  it("lead to no other file", async () => {
    writeFileSync(join(shipped, "..", "secret.chain.json"), chainOf("secret"));
    for (const name of ["../secret", join(shipped, "..", "secret"), "strain-bridge.chain.json", ".", ""]) {
      expect(await found(name)).toBeUndefined();
    }
  });
});

describe("bounds of presets", () => {
  it("hold for a text: one million bytes", async () => {
    const room = 1_000_000 - Buffer.byteLength(chainOf(""));
    expect(said(await save("full", chainOf("x".repeat(room))))).toBe("done");
    expect(said(await save("over", chainOf("x".repeat(room + 1))))).toBe(
      'preset "over": the text is larger than 1 MB; allowed is at most 1 MB',
    );
    expect(said(await save("over", chainOf("Ω".repeat(room - 1))))).toContain("larger than 1 MB");
  });

  it("hold for their number: one thousand", async () => {
    const records = Array.from({ length: 999 }, (_, k) => ({
      name: `p${k}`,
      text: chainOf(""),
      folder: "/stand",
    }));
    mkdirSync(config);
    writeFileSync(join(config, "settings.json"), JSON.stringify({ presets: records }));
    expect(said(await save("last"))).toBe("done");
    expect(said(await save("one more"))).toBe(
      "presets: there are 1000 of your own already; allowed is at most 1000",
    );
    expect(said(await save("last", chainOf("again"), true))).toBe("done");
    expect(await own()).toHaveLength(1000);
  });

  it.each(["", "no JSON", "[]", "null", "{}", '{"format":"toString"}', '{"format":"other"}'])(
    "keep %j out",
    async (text) => {
      expect(said(await save("mine", text))).toBe(
        'preset "mine": the text is no preset; allowed is the text of a chain or of a stage preset',
      );
    },
  );
});

describe("records that are no presets", () => {
  const good = { name: "good", text: chainOf("good"), folder: "/stand" };

  it.each([
    null,
    7,
    { name: "x" },
    { ...good, name: "a/b" },
    { ...good, name: " blank" },
    { ...good, name: "\u001b[31m" },
    { ...good, text: 5 },
    { ...good, folder: "relative" },
    { ...good, text: "x".repeat(1_000_001) },
  ])("are left as they are and said so", async (record) => {
    mkdirSync(config);
    const file = join(config, "settings.json");
    writeFileSync(file, JSON.stringify({ presets: [record, good] }));
    expect((await own()).map(({ name }) => name)).toEqual(["good"]);
    expect(presets.notes()).toEqual([`${file}: 1 of the presets cannot be read and are left as they are`]);
    expect(said(await presets.remove("good"))).toBe("done");
    expect(JSON.parse(readFileSync(file, "utf8")).presets).toEqual([record]);
  });
});

describe("shipped presets that are not as they should be", () => {
  it("are listed all the same, and what is wrong is said when one is opened", async () => {
    writeFileSync(join(shipped, "cut.chain.json"), '{"format": "halfpower-chain", ');
    writeFileSync(join(shipped, "notes.txt"), "no preset");
    mkdirSync(join(shipped, "folder.chain.json"));
    expect((await presets.list()).map(({ name, title }) => [name, title])).toEqual([
      ["cut", ""],
      ["folder", ""],
      ["rfi-filter", "RFI filter"],
      ["strain-bridge", "Pump 2, strain bridge"],
    ]);
    expect(said(await openChainPreset((await found("cut"))!))).toMatch(/^preset cut:1:\d+: /);
    expect(said(await presets.find("folder"))).toContain("it is a folder");
  });

  it("are missing altogether: noted, and the user's own go on", async () => {
    presets = openPresets({ config, shipped: join(shipped, "nowhere") });
    expect(said(await save("mine"))).toBe("done");
    expect((await presets.list()).map(({ name }) => name)).toEqual(["mine"]);
    expect(presets.notes()).toEqual([expect.stringContaining("nowhere: there is no such file or folder")]);
  });
});
