import { mkdtempSync, rmSync, utimesSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { beforeEach, describe, expect, it } from "vitest";
import { documentContext, fileContext } from "../../src/effects/document-context.ts";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "halfpower-context-"));
});

const put = (name: string, text: string) => writeFileSync(join(folder, name), text);

describe("the context of a chain file", () => {
  it("reads a measured response once, and again when its file has changed", () => {
    put("cable.csv", "10,-1,-2\n1000,-3,-45\n");
    const context = fileContext(folder, undefined);
    const first = context.table("cable.csv");
    expect(first).toMatchObject({ ok: true });
    expect(context.table("cable.csv")).toBe(first);
    expect(context.isCurrent()).toBe(true);
    put("cable.csv", "10,-1,-2\n1000,-6,-45\n");
    // As a clock would: not within the resolution of the file system's times.
    utimesSync(join(folder, "cable.csv"), 1, 1);
    expect(context.isCurrent()).toBe(false);
    const renewed = context.renewed();
    expect(renewed).not.toBe(context);
    expect(renewed.table("cable.csv")).not.toBe(first);
    expect(renewed.isCurrent()).toBe(true);
  });

  it("notices a table that goes and one that comes", () => {
    const context = fileContext(folder, undefined);
    expect(context.table("cable.csv")).toMatchObject({ ok: false });
    expect(context.isCurrent()).toBe(true);
    put("cable.csv", "10,-1,-2\n1000,-3,-45\n");
    expect(context.isCurrent()).toBe(false);
    const renewed = context.renewed();
    expect(renewed.table("cable.csv")).toMatchObject({ ok: true });
    rmSync(join(folder, "cable.csv"));
    expect(renewed.isCurrent()).toBe(false);
  });

  it.each([
    ["nowhere.csv", "nowhere.csv: there is no such file or folder"],
    ["", ": it is a folder"],
    ["/dev/zero", "/dev/zero: it is a device or socket"],
    ["a\0b", "the name holds a NUL character"],
    ["empty.csv", "empty.csv"],
    ["words.csv", "words.csv:2"],
  ])("says what is wrong with the table %j", (name, found) => {
    put("empty.csv", "");
    put("words.csv", "10,-1,-2\nten,-1,-2\n100,-3,-4\n");
    const table = fileContext(folder, undefined).table(name);
    expect(!table.ok && table.problem.found).toContain(found);
  });

  it("loads the parser of formulas for a chain that may need it", async () => {
    expect((await documentContext(folder, '{"kind":"rc-lowpass"}')).formula).toBeUndefined();
    expect((await documentContext(folder, '{"kind":"formula"}')).formula).toBeDefined();
  });
});
