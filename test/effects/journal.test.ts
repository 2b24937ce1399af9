import { execFileSync, spawn, spawnSync } from "node:child_process";
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  statSync,
  utimesSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { openJournal } from "../../src/effects/journal.ts";
import { identityOf, isRunning } from "../../src/effects/process-identity.ts";
import { stampOfText } from "../../src/effects/stamp.ts";
import { bundledCopies, type Copies, killed } from "./copy.ts";
import { chainOf } from "./texts.ts";

let copies: Copies;
let folder: string;

beforeAll(async () => {
  copies = await bundledCopies();
});
afterAll(() => copies.remove());
beforeEach(() => {
  folder = join(mkdtempSync(join(tmpdir(), "halfpower-journal-")), "state", "halfpower");
});

/** The number of a process that has ended. */
const endedPid = (): number => spawnSync("/bin/true").pid;

/** A journal as a program that has ended left it. */
const ended = (timeMs = 0) => openJournal(folder, { pid: endedPid(), now: () => timeMs });

const work = { text: chainOf("unsaved, Ω\n"), title: "Pump 2" };
const onlyFile = (): string => join(folder, readdirSync(folder)[0] as string);

describe("a journal", () => {
  it("gives the work of a program that has ended, all of it as it was recorded", () => {
    const full = {
      ...work,
      path: "/stand/pump2.chain.json",
      stamp: { ...stampOfText("before"), mtimeMs: 1234.5 },
      preset: "strain-bridge",
      folder: "/stand",
    };
    expect(ended(1_700_000_000_000).record(full)).toEqual({ ok: true, value: undefined });
    expect(openJournal(folder).leftBehind()).toEqual([
      { ...full, timeMs: 1_700_000_000_000, id: expect.any(String) },
    ]);
  });

  it("gives back a stamp whose time is not known", () => {
    ended().record({ ...work, path: "/a.json", stamp: stampOfText("before") });
    expect(openJournal(folder).leftBehind()[0].stamp).toEqual(stampOfText("before"));
  });

  it("holds the last edit alone", () => {
    const journal = ended();
    for (let k = 0; k < 5; k++) journal.record({ ...work, text: `edit ${k}` });
    expect(
      openJournal(folder)
        .leftBehind()
        .map(({ text }) => text),
    ).toEqual(["edit 4"]);
    expect(readdirSync(folder)).toHaveLength(1);
  });

  it("is gone once there is nothing unsaved, and when it is not wanted", () => {
    const [one, other] = [ended(), ended()];
    one.record(work);
    other.record({ ...work, text: "other" });
    expect(one.clear().ok).toBe(true);
    expect(one.clear().ok).toBe(true);
    const mine = openJournal(folder);
    const [left, ...none] = mine.leftBehind();
    expect([left.text, none]).toEqual(["other", []]);
    expect(mine.discard(left).ok).toBe(true);
    expect([mine.leftBehind(), readdirSync(folder)]).toEqual([[], []]);
  });

  it("is never offered while its program runs, to itself or to another", () => {
    const mine = openJournal(folder);
    mine.record(work);
    expect(mine.leftBehind()).toEqual([]);
    expect(openJournal(folder).leftBehind()).toEqual([]);
  });

  it("makes nothing until something is recorded, and is its owner's alone then", () => {
    const journal = openJournal(folder);
    expect([journal.leftBehind(), journal.clear().ok, existsSync(folder)]).toEqual([[], true, false]);
    journal.record(work);
    expect(statSync(folder).mode & 0o777).toBe(0o700);
    expect(statSync(onlyFile()).mode & 0o777).toBe(0o600);
  });

  it("discards nothing but journals", () => {
    const mine = openJournal(folder);
    mine.record(work);
    const other = join(folder, "..", "other.json");
    writeFileSync(other, "");
    mine.discard({ id: "../other.json" });
    expect(existsSync(other)).toBe(true);
  });
});

describe("the journal of a program that is killed", () => {
  it("holds the last edit, and is offered only once the program is gone", async () => {
    const { child, answer } = await copies.start(["journal", folder, work.text, "/stand/pump2.chain.json"]);
    expect(answer).toEqual({ recorded: { ok: true }, pid: child.pid });
    const mine = openJournal(folder);
    expect(mine.leftBehind()).toEqual([]);
    await killed(child);
    expect(mine.leftBehind()).toMatchObject([
      {
        text: work.text,
        path: "/stand/pump2.chain.json",
        stamp: { hash: stampOfText("as it was read").hash },
      },
    ]);
  });

  it("is offered where its number now belongs to another program", () => {
    ended().record(work);
    const [name] = readdirSync(folder) as [string];
    // As if this very process had got the number: it started at another time.
    const { pid, startTicks } = identityOf(process.pid);
    const reused = `work-${pid}-${startTicks - 1}-0123abcd.json`;
    const running = `work-${pid}-${startTicks}-0123abcd.json`;
    const text = readFileSync(join(folder, name));
    writeFileSync(join(folder, reused), text);
    writeFileSync(join(folder, running), text);
    const ids = openJournal(folder)
      .leftBehind()
      .map(({ id }) => id);
    expect(ids.sort()).toEqual([name, reused].sort());
  });

  it("leaves a half-written draft, which is removed", () => {
    ended().record(work);
    const draft = `${onlyFile()}.tmp`;
    writeFileSync(draft, '{"format": "halfp');
    const mine = openJournal(folder);
    mine.record(work);
    expect(mine.leftBehind()).toHaveLength(1);
    expect(existsSync(draft)).toBe(false);
    expect(mine.notes()).toEqual([]);
  });
});

describe("isRunning", () => {
  it("tells a process from one that ended and one that merely had its number", async () => {
    const child = spawn("/bin/sleep", ["60"]);
    const identity = identityOf(child.pid as number);
    // ps(1) reads the same table by itself: the process is there.
    expect(execFileSync("ps", ["-o", "comm=", "-p", String(child.pid)], { encoding: "utf8" }).trim()).toBe(
      "sleep",
    );
    expect(isRunning(identity)).toBe(true);
    expect(isRunning({ ...identity, startTicks: identity.startTicks + 1 })).toBe(false);
    await killed(child);
    expect(isRunning(identity)).toBe(false);
  });

  it("takes the first process of the system as running, whoever it belongs to", () => {
    expect(isRunning(identityOf(1))).toBe(true);
  });

  it("takes one that has ended and was not yet waited for as ended", async () => {
    // The shell starts a child, is replaced by a program that never waits, and only then does the child end.
    const parent = spawn("/bin/sh", ["-c", "sleep 0.5 & echo $!; exec sleep 60"], {
      stdio: ["ignore", "pipe", "inherit"],
    });
    try {
      const pid = Number(String(await new Promise((resolve) => parent.stdout.once("data", resolve))));
      while (isRunning({ pid, startTicks: 0 })) await new Promise((again) => setTimeout(again, 10));
      // proc(5): the third field is the state, Z a zombie.
      expect(readFileSync(`/proc/${pid}/stat`, "utf8")).toMatch(/^\d+ \(.*\) Z /);
    } finally {
      await killed(parent);
    }
  });
});

describe("journals that are not as they should be", () => {
  const NAME = "work-4194304999-1-0123abcd.json";

  it.each([
    ["cut short", '{"format":"halfpower-journal","version":1,"ti'],
    ["empty", ""],
    ["null", "null"],
    ["a list", "[]"],
    ["foreign", '{"format":"other","version":1,"timeMs":1,"title":"","text":""}'],
    ["of another version", '{"format":"halfpower-journal","version":2,"timeMs":1,"title":"","text":""}'],
    ["without a text", '{"format":"halfpower-journal","version":1,"timeMs":1,"title":""}'],
    ["no UTF-8", Buffer.from([0x22, 0xff, 0x22])],
  ])("are set aside whole and said so: %s", (_, content) => {
    ended().record(work);
    const path = join(folder, NAME);
    writeFileSync(path, content);
    const mine = openJournal(folder);
    expect(mine.leftBehind()).toHaveLength(1);
    expect(mine.notes()).toEqual([`${path}: this journal is damaged; it is kept as ${path}.damaged`]);
    expect(readFileSync(`${path}.damaged`).equals(Buffer.from(content as string))).toBe(true);
    expect(openJournal(folder).notes()).toEqual([]);
  });

  it("give what is sound of them", () => {
    mkdirSync(folder, { recursive: true });
    const fields = {
      path: "relative",
      stamp: { hash: 1 },
      preset: 7,
      folder: [],
      text: "t",
      title: "",
      timeMs: 5,
    };
    writeFileSync(join(folder, NAME), JSON.stringify({ format: "halfpower-journal", version: 1, ...fields }));
    expect(openJournal(folder).leftBehind()).toEqual([{ id: NAME, text: "t", title: "", timeMs: 5 }]);
  });

  it("are left alone where they are no files or too large, and do not hide the others", () => {
    ended().record(work);
    const [folderName, pipe, large, draft] = ["a0000001", "a0000002", "a0000003", "a0000004"].map(
      (distinction) => join(folder, `work-4194304999-1-${distinction}.json`),
    ) as [string, string, string, string];
    mkdirSync(folderName);
    execFileSync("mkfifo", [pipe]);
    writeFileSync(large, "");
    execFileSync("truncate", ["-s", "1T", large]);
    mkdirSync(`${draft}.tmp`);
    writeFileSync(join(folder, "notes.txt"), "");
    const mine = openJournal(folder);
    expect(mine.leftBehind()).toHaveLength(1);
    expect([...mine.notes()].sort()).toEqual([
      expect.stringContaining("it is a folder"),
      expect.stringContaining("it is a pipe"),
      expect.stringContaining("it is larger than 40 MB"),
    ]);
    expect(readdirSync(folder)).toHaveLength(6);
  });

  it("are offered twenty at a time, the latest first, and none is lost", () => {
    for (let k = 0; k < 25; k++) {
      const journal = ended(k);
      journal.record({ ...work, text: `work ${k}` });
    }
    for (const name of readdirSync(folder)) {
      const { timeMs } = JSON.parse(readFileSync(join(folder, name), "utf8"));
      utimesSync(join(folder, name), 1000 + timeMs, 1000 + timeMs);
    }
    const mine = openJournal(folder);
    const first = mine.leftBehind();
    expect(first.map(({ timeMs }) => timeMs)).toEqual(Array.from({ length: 20 }, (_, k) => 24 - k));
    for (const entry of first) mine.discard(entry);
    expect(mine.leftBehind().map(({ timeMs }) => timeMs)).toEqual([4, 3, 2, 1, 0]);
  });
});

describe("a journal that cannot be written", () => {
  it("says so and keeps the one before", async () => {
    const answer = await copies.run(["journal-once", folder, "small", "100000"], { fileLimitKb: 16 });
    expect(answer).toMatchObject([
      { ok: true },
      { ok: false, problem: { found: expect.stringContaining("file grow") } },
    ]);
    expect(
      openJournal(folder)
        .leftBehind()
        .map(({ text }) => text),
    ).toEqual(["small"]);
    expect(readdirSync(folder)).toHaveLength(1);
  });

  it("refuses work beyond all bounds", () => {
    const journal = openJournal(folder);
    expect(journal.record({ ...work, text: "x".repeat(40_000_001) })).toMatchObject({
      ok: false,
      problem: { found: "the work is too large to be journalled" },
    });
  });

  it("has a file where its folder should be", () => {
    mkdirSync(join(folder, ".."), { recursive: true });
    writeFileSync(folder, "");
    const journal = openJournal(folder);
    expect(journal.record(work)).toMatchObject({ ok: false });
    expect(journal.leftBehind()).toEqual([]);
    expect(journal.notes()).toEqual([expect.stringContaining("a part of the path is a file, not a folder")]);
    expect(readFileSync(folder, "utf8")).toBe("");
  });
});
