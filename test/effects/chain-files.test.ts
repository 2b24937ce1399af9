import { execFileSync } from "node:child_process";
import {
  chmodSync,
  existsSync,
  linkSync,
  lstatSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  utimesSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { openChainFile, saveChainFile } from "../../src/effects/chain-files.ts";
import { fileProblemText } from "../../src/effects/file-problem.ts";
import { bundledCopies, type Copies } from "./copy.ts";
import { chainOf } from "./texts.ts";

let copies: Copies;
let folder: string;
let file: string;

beforeAll(async () => {
  copies = await bundledCopies();
});
afterAll(() => copies.remove());
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "halfpower-files-"));
  file = join(folder, "pump2.chain.json");
});

const BEFORE = chainOf("before");
const AFTER = chainOf("after");

async function opened(path = file) {
  const chain = await openChainFile(path);
  if (!chain.ok) throw new Error(fileProblemText(chain.problem));
  return chain.value;
}

async function refusal(path: string): Promise<string> {
  const chain = await openChainFile(path);
  return chain.ok ? "it was opened" : fileProblemText(chain.problem);
}

describe("saveChainFile", () => {
  it("writes back to the file that was read, again and again", async () => {
    writeFileSync(file, BEFORE);
    const { stamp, path } = await opened();
    expect(path).toBe(file);
    const first = saveChainFile(file, AFTER, stamp);
    expect(first.type).toBe("saved");
    expect(readFileSync(file, "utf8")).toBe(AFTER);
    const second = saveChainFile(file, BEFORE, first.type === "saved" ? first.stamp : undefined);
    expect(second.type).toBe("saved");
    expect(readFileSync(file, "utf8")).toBe(BEFORE);
    expect(readdirSync(folder)).toEqual(["pump2.chain.json"]);
  });

  // POSIX chmod: the twelve bits of a mode.
  it.each([0o600, 0o644, 0o660, 0o755])("keeps the mode %o", async (mode) => {
    writeFileSync(file, BEFORE);
    chmodSync(file, mode);
    expect(saveChainFile(file, AFTER, (await opened()).stamp).type).toBe("saved");
    expect(statSync(file).mode & 0o7777).toBe(mode);
  });

  it("gives a new file what the umask leaves", () => {
    const umask = process.umask();
    expect(saveChainFile(file, AFTER, undefined).type).toBe("saved");
    expect(statSync(file).mode & 0o777).toBe(0o666 & ~umask);
  });

  it("exchanges the file as a whole: who has the old one open or linked still has all of it", async () => {
    writeFileSync(file, BEFORE);
    const other = join(folder, "linked.json");
    linkSync(file, other);
    saveChainFile(file, AFTER, (await opened()).stamp);
    expect(readFileSync(other, "utf8")).toBe(BEFORE);
    expect(readFileSync(file, "utf8")).toBe(AFTER);
  });

  it("does not overwrite what was changed on the disk, unless asked to", async () => {
    writeFileSync(file, BEFORE);
    const { stamp } = await opened();
    const theirs = chainOf("theirs");
    writeFileSync(file, theirs);
    const held = saveChainFile(file, AFTER, stamp);
    expect(held.type).toBe("changed");
    expect(readFileSync(file, "utf8")).toBe(theirs);
    expect(saveChainFile(file, AFTER, stamp, { overwrite: true }).type).toBe("saved");
    expect(readFileSync(file, "utf8")).toBe(AFTER);
  });

  it("notices a change that kept size and time", async () => {
    writeFileSync(file, BEFORE);
    const { stamp } = await opened();
    const { atime, mtime } = statSync(file);
    writeFileSync(file, BEFORE.replace("before", "behind"));
    utimesSync(file, atime, mtime);
    expect(saveChainFile(file, AFTER, stamp).type).toBe("changed");
  });

  it("takes a file that was only touched, or written again with the same content, as unchanged", async () => {
    writeFileSync(file, BEFORE);
    const { stamp } = await opened();
    rmSync(file);
    writeFileSync(file, BEFORE);
    utimesSync(file, 1, 1);
    expect(saveChainFile(file, AFTER, stamp).type).toBe("saved");
  });

  it("asks before it writes where the file was removed, and where one appeared", async () => {
    writeFileSync(file, BEFORE);
    const { stamp } = await opened();
    expect(saveChainFile(file, AFTER, undefined).type).toBe("changed");
    rmSync(file);
    expect(saveChainFile(file, AFTER, stamp).type).toBe("changed");
    expect(existsSync(file)).toBe(false);
    expect(saveChainFile(file, AFTER, stamp, { overwrite: true }).type).toBe("saved");
  });

  it("writes through links and leaves them links", async () => {
    const link = join(folder, "link.json");
    mkdirSync(join(folder, "far"));
    writeFileSync(join(folder, "far", "real.json"), BEFORE);
    symlinkSync("far/real.json", link);
    expect(saveChainFile(link, AFTER, (await opened(link)).stamp).type).toBe("saved");
    expect(lstatSync(link).isSymbolicLink()).toBe(true);
    expect(readFileSync(join(folder, "far", "real.json"), "utf8")).toBe(AFTER);
    expect(readdirSync(join(folder, "far"))).toEqual(["real.json"]);
  });

  it("makes the file that a link leads to in vain", () => {
    const link = join(folder, "link.json");
    symlinkSync("not-there.json", link);
    expect(saveChainFile(link, AFTER, undefined).type).toBe("saved");
    expect(lstatSync(link).isSymbolicLink()).toBe(true);
    expect(readFileSync(join(folder, "not-there.json"), "utf8")).toBe(AFTER);
  });

  it.each([
    ["/dev/full", "it is a device or socket"],
    ["/dev/null", "it is a device or socket"],
    ["nowhere/new.json", "there is no such file or folder"],
    ["", "it is a folder"],
    ["a\0b.json", "the name holds a NUL character"],
    [`${"n".repeat(300)}.json`, "the name is too long for the file system"],
    ["circle.json", "its links lead round in a circle"],
  ])("refuses to write to %j", (name, found) => {
    symlinkSync("circle.json", join(folder, "circle.json"));
    const path = name.startsWith("/dev") ? name : join(folder, name);
    const outcome = saveChainFile(path, AFTER, undefined);
    expect(outcome).toMatchObject({ type: "failed", problem: { found } });
    expect(readdirSync(folder)).toEqual(["circle.json"]);
  });

  it("does not write a file that is marked as read-only, nor where the folder is closed", async () => {
    chmodSync(folder, 0o777);
    writeFileSync(file, BEFORE);
    const write = () => copies.run(["write", file, BEFORE, "10"], { asNobody: true });
    const denied = { type: "failed", problem: { found: "access to it is denied" } };
    chmodSync(file, 0o444);
    expect(await write()).toMatchObject(denied);
    chmodSync(file, 0o666);
    chmodSync(folder, 0o555);
    expect(await write()).toMatchObject(denied);
    expect(readFileSync(file, "utf8")).toBe(BEFORE);
    chmodSync(folder, 0o777);
    expect(await write()).toMatchObject({ type: "saved" });
    expect(statSync(file).mode & 0o777).toBe(0o666);
    expect(readdirSync(folder)).toEqual(["pump2.chain.json"]);
  });

  it("leaves the old file whole and nothing else where the disk takes only a part", async () => {
    writeFileSync(file, BEFORE);
    const outcome = await copies.run(["write", file, BEFORE, "100000"], { fileLimitKb: 16 });
    // setrlimit(2): writing beyond RLIMIT_FSIZE fails with EFBIG, after a part was taken.
    expect(outcome).toMatchObject({
      type: "failed",
      problem: { found: expect.stringContaining("nothing was changed") },
    });
    expect(readFileSync(file, "utf8")).toBe(BEFORE);
    expect(readdirSync(folder)).toEqual(["pump2.chain.json"]);
    expect(await copies.run(["write", file, BEFORE, "10000"], { fileLimitKb: 16 })).toMatchObject({
      type: "saved",
    });
    expect(statSync(file).size).toBeGreaterThan(10_000);
  });
});

describe("openChainFile", () => {
  it("reads a byte order mark and gives the text back with it", async () => {
    writeFileSync(file, `\ufeff${BEFORE}`);
    expect((await opened()).text).toBe(`\ufeff${BEFORE}`);
  });

  it("neither waits for a pipe nor reads a device, a folder or what is not text", async () => {
    const pipe = join(folder, "pipe");
    execFileSync("mkfifo", [pipe]);
    expect(await refusal(pipe)).toContain("it is a pipe; allowed is a file, or - for standard input");
    expect(await refusal("/dev/zero")).toContain("it is a device or socket; allowed is a file");
    expect(await refusal(folder)).toContain("it is a folder; allowed is a file");
    writeFileSync(file, Buffer.from([0x7b, 0xff, 0xfe, 0x7d]));
    expect(await refusal(file)).toContain("it is not text in UTF-8");
    expect(await refusal(join(file, "inside"))).toContain("a part of the path is a file");
  });

  it("refuses a file that is too large without reading it", async () => {
    writeFileSync(file, "");
    execFileSync("truncate", ["-s", "1T", file]);
    expect(await refusal(file)).toContain("it is larger than 20 MB; allowed is a file of at most 20 MB");
  });

  it("names the place inside the file, and nothing of a name reaches the terminal raw", async () => {
    const hostile = join(folder, "pump\u001b[2J\r\u202egnp.json");
    writeFileSync(hostile, '{\n  "format": "halfpower-chain",\n  "version": 2\n}');
    const said = await refusal(hostile);
    expect(said).toContain("pump[2J gnp.json:3:14: version");
    expect(said).not.toMatch(/[\u0000-\u001f\u202e]/);
  });

  it("finds tables beside the file, wherever the program was started", async () => {
    writeFileSync(join(folder, "cable.csv"), "10,-0.1,-1\n1000,-3,-45\n");
    const stages = [{ kind: "table", name: "cable", parts: { file: "cable.csv" } }];
    writeFileSync(file, JSON.stringify({ format: "halfpower-chain", version: 1, stages }));
    expect((await opened()).context.folder).toBe(folder);
    rmSync(join(folder, "cable.csv"));
    expect(await refusal(file)).toContain("cable.csv: there is no such file");
  });
});
