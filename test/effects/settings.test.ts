import {
  chmodSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  statSync,
  symlinkSync,
  utimesSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { beforeEach, describe, expect, it } from "vitest";
import { ok } from "../../src/core/result.ts";
import { fileProblemText } from "../../src/effects/file-problem.ts";
import { appFolders } from "../../src/effects/paths.ts";
import { openSettings } from "../../src/effects/settings.ts";
import type { SettingsData } from "../../src/effects/settings-data.ts";

let folder: string;
let file: string;

beforeEach(() => {
  folder = join(mkdtempSync(join(tmpdir(), "halfpower-settings-")), "halfpower");
  file = join(folder, "settings.json");
});

const put = (text: string | Buffer) => {
  mkdirSync(folder, { recursive: true });
  writeFileSync(file, text);
};

/** Sets one key and leaves the rest. */
const set = (key: string, value: unknown, settings = openSettings(folder)) =>
  settings.change((data) => ok({ ...data, [key]: value }));

const onDisk = (): SettingsData => JSON.parse(readFileSync(file, "utf8"));

describe("the settings file", () => {
  it("is not there until something is set, and is its owner's alone then", async () => {
    const settings = openSettings(folder);
    expect(await settings.read()).toEqual({});
    expect(() => statSync(folder)).toThrow();
    expect((await set("a", 1)).ok).toBe(true);
    // XDG Base Directory Specification 0.8: a folder that is made gets the mode 0700.
    expect(statSync(folder).mode & 0o777).toBe(0o700);
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(await settings.read()).toEqual({ a: 1 });
    expect(readdirSync(folder)).toEqual(["settings.json"]);
    expect(settings.notes()).toEqual([]);
  });

  it("keeps what it does not know, also names that objects have of their own", async () => {
    put('{"later":{"x":[1,null]},"__proto__":{"y":2},"constructor":3}');
    await set("a", "b");
    expect(readFileSync(file, "utf8")).toContain('"__proto__"');
    const { later, constructor: third, a } = onDisk();
    expect([later, third, a]).toEqual([{ x: [1, null] }, 3, "b"]);
  });

  it("keeps its mode, and a link a link", async () => {
    const elsewhere = join(folder, "..", "mine.json");
    mkdirSync(folder);
    writeFileSync(elsewhere, "{}");
    chmodSync(elsewhere, 0o640);
    symlinkSync("../mine.json", file);
    expect((await set("a", 1)).ok).toBe(true);
    expect(JSON.parse(readFileSync(elsewhere, "utf8"))).toEqual({ a: 1 });
    expect(statSync(elsewhere).mode & 0o777).toBe(0o640);
    expect(readdirSync(folder)).toEqual(["settings.json"]);
  });

  it("does not write what is unchanged", async () => {
    put('{ "a" :  1 }');
    expect((await openSettings(folder).change((data) => ok(data))).ok).toBe(true);
    expect(readFileSync(file, "utf8")).toBe('{ "a" :  1 }');
  });

  it("is changed again from what something else wrote meanwhile", async () => {
    put('{"a":1}');
    let calls = 0;
    const changed = await openSettings(folder).change((data) => {
      calls++;
      if (calls === 1) writeFileSync(file, '{"a":2,"theirs":true}');
      return ok({ ...data, mine: true });
    });
    expect([changed.ok, calls]).toEqual([true, 2]);
    expect(onDisk()).toEqual({ a: 2, theirs: true, mine: true });
  });

  it("takes over the lock of a copy that was killed, and the draft that it left", async () => {
    put("{}");
    mkdirSync(`${file}.lock`);
    utimesSync(`${file}.lock`, 1, 1);
    writeFileSync(join(folder, "settings.draft.json"), '{"half');
    expect((await set("a", 1)).ok).toBe(true);
    expect(onDisk()).toEqual({ a: 1 });
    expect(readdirSync(folder)).toEqual(["settings.json"]);
  });
});

describe("a settings file that is damaged", () => {
  const tooDeep = `{"a":${"[".repeat(200_000)}${"]".repeat(200_000)}}`;

  it.each([
    ["cut short", '{"presets": [{"name": "pump-3", "te'],
    ["empty", ""],
    ["no object", "[1, 2]"],
    ["null", "null"],
    ["presets that are no list", '{"presets": {"pump-3": "text"}}'],
    ["no UTF-8", Buffer.from([0x7b, 0xff, 0x7d])],
    ["nested too deep to be written", tooDeep],
  ])("is set aside whole and said so: %s", async (_, content) => {
    put(content);
    const settings = openSettings(folder);
    expect(await settings.read()).toEqual({});
    expect(settings.notes()).toEqual([
      `${file}: it does not hold settings; it is kept as ${file}.damaged, and new settings begin`,
    ]);
    expect(readFileSync(`${file}.damaged`).equals(Buffer.from(content as string))).toBe(true);
    expect((await set("a", 1)).ok).toBe(true);
    expect(onDisk()).toEqual({ a: 1 });
  });

  it("is set aside by a change too, and never in the place of one set aside before", async () => {
    for (const [content, name] of [
      ["one", "settings.json.damaged"],
      ["two", "settings.json.damaged-2"],
      ["three", "settings.json.damaged-3"],
    ] as const) {
      put(content);
      const settings = openSettings(folder);
      expect((await set("a", content, settings)).ok).toBe(true);
      expect(settings.notes()).toHaveLength(1);
      expect(readFileSync(join(folder, name), "utf8")).toBe(content);
      expect(onDisk()).toEqual({ a: content });
    }
    expect(readFileSync(join(folder, "settings.json.damaged"), "utf8")).toBe("one");
  });

  it("is set aside once by two that find it at once", async () => {
    put("{");
    const both = [openSettings(folder), openSettings(folder)];
    expect(await Promise.all(both.map((settings) => settings.read()))).toEqual([{}, {}]);
    expect(both.flatMap((settings) => settings.notes())).toHaveLength(1);
    expect(readdirSync(folder)).toEqual(["settings.json.damaged"]);
  });
});

describe("a settings file that cannot be used", () => {
  it("is a folder: read as empty with a note, left alone, and a change is refused", async () => {
    mkdirSync(file, { recursive: true });
    const settings = openSettings(folder);
    expect(await settings.read()).toEqual({});
    expect(await settings.read()).toEqual({});
    expect(settings.notes()).toEqual([`${file}: it is a folder; allowed is a file`]);
    const changed = await set("a", 1, settings);
    expect(!changed.ok && fileProblemText(changed.problem)).toBe(
      `${file}: it is a folder; allowed is a file`,
    );
    expect(readdirSync(folder)).toEqual(["settings.json"]);
  });

  it("has a file where its folder should be: refused at once, and reading goes on without", async () => {
    writeFileSync(folder, "");
    const settings = openSettings(folder);
    expect(await settings.read()).toEqual({});
    const changed = await set("a", 1, settings);
    expect(!changed.ok && changed.problem.found).toMatch(/a file, not a folder|something of that name/);
  });
});

describe("appFolders", () => {
  // XDG Base Directory Specification 0.8: defaults; "all paths must be absolute", relative ones are ignored.
  it.each([
    [{}, "/home/an/.config/halfpower", "/home/an/.local/state/halfpower"],
    [{ XDG_CONFIG_HOME: "/c", XDG_STATE_HOME: "/s" }, "/c/halfpower", "/s/halfpower"],
    [
      { XDG_CONFIG_HOME: "", XDG_STATE_HOME: "rel/s" },
      "/home/an/.config/halfpower",
      "/home/an/.local/state/halfpower",
    ],
  ])("of %j", (environment, config, state) => {
    expect(appFolders(environment, "/home/an")).toMatchObject({ config, state });
  });
});
