import { chmodSync, mkdtempSync, readdirSync, readFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { openPresets } from "../../src/effects/presets.ts";
import { bundledCopies, type Copies, killed } from "./copy.ts";
import { chainOf } from "./texts.ts";

let copies: Copies;
let folder: string;

beforeAll(async () => {
  copies = await bundledCopies();
});
afterAll(() => copies.remove());
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "halfpower-copies-"));
});

const names = async (): Promise<readonly string[]> =>
  (await openPresets({ config: folder, shipped: folder }).list()).map(({ name }) => name);

describe("copies of the program that run at once", () => {
  it("lose none of each other's presets", async () => {
    const prefixes = ["a", "b", "c", "d"];
    const answers = await Promise.all(prefixes.map((prefix) => copies.run(["keep", folder, prefix, "10"])));
    expect(answers.flat()).toEqual(Array(40).fill({ ok: true, value: "added" }));
    const expected = prefixes.flatMap((prefix) => Array.from({ length: 10 }, (_, k) => `${prefix}-${k}`));
    expect(await names()).toEqual(expected);
    expect(readdirSync(folder)).toEqual(["settings.json"]);
  });

  it("lose nothing to one that is killed while it saves", async () => {
    const presets = openPresets({ config: folder, shipped: folder });
    await presets.save("mine", chainOf("mine"), folder);
    const { child } = await copies.start(["keep-on", folder, "theirs"]);
    await killed(child);
    // Also where the lock was left: it is taken over once it has not been renewed for long enough.
    expect(await presets.save("after", chainOf("after"), folder)).toEqual({ ok: true, value: "added" });
    expect(await names()).toEqual(expect.arrayContaining(["after", "mine", "theirs-0"]));
    expect(presets.notes()).toEqual([]);
  });
});

describe("settings that are closed", () => {
  it("are not read, not set aside and not written, which is said at once", async () => {
    await copies.run(["keep", folder, "mine", "1"]);
    const file = join(folder, "settings.json");
    const before = readFileSync(file);
    const keep = () => copies.run(["keep", folder, "other", "1"], { asNobody: true });
    const denied = [{ ok: false, problem: { found: "access to it is denied" } }];
    chmodSync(folder, 0o755);
    expect(await keep()).toMatchObject(denied);
    chmodSync(folder, 0o777);
    chmodSync(file, 0o000);
    expect(await keep()).toMatchObject(denied);
    chmodSync(file, 0o444);
    expect(await keep()).toMatchObject(denied);
    chmodSync(file, 0o600);
    expect(readFileSync(file)).toEqual(before);
    expect(readdirSync(folder)).toEqual(["settings.json"]);
  });
});

describe("a disk that takes only a part", () => {
  it("leaves the settings as they were, and says so", async () => {
    await copies.run(["keep", folder, "small", "2"]);
    const before = readFileSync(join(folder, "settings.json"));
    const [answer] = (await copies.run(["keep", folder, "large", "1", "100000"], { fileLimitKb: 16 })) as [
      { ok: boolean; problem: { found: string } },
    ];
    expect(answer.ok).toBe(false);
    expect(answer.problem.found).toContain("nothing was changed");
    expect(readFileSync(join(folder, "settings.json"))).toEqual(before);
    expect(readdirSync(folder)).toEqual(["settings.json"]);
    expect(await names()).toEqual(["small-0", "small-1"]);
  });
});
