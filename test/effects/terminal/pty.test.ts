import { readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { bundleProgram, type PtyProgram, startPty } from "../../helpers/pty.ts";

let bundle: Awaited<ReturnType<typeof bundleProgram>>;
let journal: string;

beforeAll(async () => {
  bundle = await bundleProgram(new URL("fixture/program.ts", import.meta.url).pathname);
  journal = join(bundle.directory, "journal");
});
afterAll(() => bundle.remove());
beforeEach(() => rmSync(journal, { force: true }));

/**
 * A shell that notes the terminal's modes before and after the program, and how it ended: the modes have to be the
 * same again. `stty -g` prints every mode of POSIX general terminal interface (XBD 11).
 */
const shell =
  'before=$(stty -g); "$0" "$1"; code=$?; [ "$before" = "$(stty -g)" ] && echo "same modes, code $code." || echo "other modes."';

async function start(env: Record<string, string> = {}): Promise<{ program: PtyProgram; childPid: number }> {
  const program = startPty("/bin/sh", ["-c", shell, process.execPath, bundle.file], {
    env: { JOURNAL: journal, ...env },
  });
  await program.shows("key none.");
  const children = readFileSync(`/proc/${program.pid}/task/${program.pid}/children`, "utf8")
    .trim()
    .split(" ");
  return { program, childPid: Number(children[0]) };
}

const lost = (): unknown[] =>
  readFileSync(journal, "utf8")
    .trim()
    .split("\n")
    .map((line) => JSON.parse(line));

/** What is true after every end: first screen, cursor shown, wrapping on, pasting plain, modes as before. */
async function expectRestored(program: PtyProgram, code: number) {
  await program.shows(`same modes, code ${code}.`);
  expect(await program.isAlternate()).toBe(false);
  const tail = program.output().slice(program.output().lastIndexOf("\u001b[?1049l") - 40);
  for (const mode of ["\u001b[?25h", "\u001b[?7h", "\u001b[?2004l"]) expect(tail).toContain(mode);
  expect(program.output().split("\u001b[?1049l")).toHaveLength(2);
  await program.ended;
}

describe("in a pseudo-terminal", () => {
  it("the program draws, reads keys, and gives the terminal back", async () => {
    const { program } = await start();
    expect(await program.isAlternate()).toBe(true);
    expect((await program.screen()).slice(0, 2)).toEqual(["size 80x24", "key none."]);
    program.write("\u001b[1;5C");
    await program.shows("key ctrl+right.");
    program.write("\u001b");
    await program.shows("key escape.");
    program.write("\u0003");
    await program.shows("key ctrl+c.");
    program.write("q");
    await expectRestored(program, 0);
  });

  it("it redraws at a new size", async () => {
    const { program } = await start();
    program.resize({ columns: 61, rows: 19 });
    await program.shows("size 61x19");
    expect((await program.screen()).slice(0, 2)).toEqual(["size 61x19", "key none."]);
    program.write("q");
    await expectRestored(program, 0);
  });

  it.each([
    ["SIGTERM", 143],
    ["SIGINT", 130],
    ["SIGQUIT", 131],
    ["SIGHUP", 129],
  ] as const)("%s is journalled, the terminal given back, and the exit code is %i", async (signal, code) => {
    const { program, childPid } = await start();
    process.kill(childPid, signal);
    await expectRestored(program, code);
    expect(lost()).toEqual([{ type: "signal", signal }]);
  });

  it("an exception is journalled and told in one line on the first screen", async () => {
    const { program } = await start();
    program.write("e");
    await expectRestored(program, 1);
    expect(lost()).toEqual([{ type: "exception" }]);
    expect((await program.screen())[0]).toBe("halfpower stopped: Error: the gain went missing");
  });

  it("so is a promise that nobody caught", async () => {
    const { program } = await start();
    program.write("r");
    await expectRestored(program, 1);
    expect(lost()).toEqual([{ type: "exception" }]);
    expect((await program.screen())[0]).toBe("halfpower stopped: Error: nobody caught it");
  });

  it("an exit nobody announced is journalled and keeps its code", async () => {
    const { program } = await start();
    program.write("x");
    await expectRestored(program, 7);
    expect(lost()).toEqual([{ type: "exit", code: 7 }]);
  });

  it("console output and warnings wait until the screen is given back", async () => {
    const { program } = await start();
    program.write("p");
    await program.shows("key p.");
    program.write("w");
    await program.shows("key w.");
    expect((await program.screen()).join("")).not.toContain("meanwhile");
    program.write("q");
    await expectRestored(program, 0);
    const text = (await program.screen()).join("\n");
    expect(text).toContain("printed meanwhile");
    expect(text).toContain("warned meanwhile");
  });

  it("a hang-up is journalled once and leaves no process behind", async () => {
    const { program, childPid } = await start();
    program.hangUp();
    await program.ended;
    await expect.poll(() => isRunning(childPid), { timeout: 10_000 }).toBe(false);
    expect(lost()).toHaveLength(1);
    expect(["hangup", "signal"]).toContain((lost()[0] as { type: string }).type);
  });

  it("TERM=dumb gives the sheet", async () => {
    const program = startPty(process.execPath, [bundle.file], { env: { TERM: "dumb" } });
    await program.shows("sheet");
    await program.ended;
  });
});

describe("under a shell with job control", () => {
  it("Ctrl+Z gives the terminal to the shell, and fg brings the screen back", async () => {
    const program = startPty("/bin/bash", ["--norc", "--noprofile", "-i"], {
      env: { PS1: "> ", JOURNAL: journal },
    });
    program.write(`${process.execPath} ${bundle.file}; echo code $?.\r`);
    await program.shows("key none.");
    program.write("k");
    await program.shows("key k.");
    program.write("\u001a");
    await program.shows("Stopped");
    expect(await program.isAlternate()).toBe(false);
    program.write("stty -a | grep -o ' icanon'\r");
    await program.shows(" icanon");
    program.write("fg\r");
    await program.shows("key k.");
    expect((await program.screen()).slice(0, 3)).toEqual(["size 80x24", "key k.", ""]);
    program.write("u");
    await program.shows("key u.");
    program.write("q");
    await program.shows("fg");
    program.write("stty -a | grep -o ' echo '; echo l''eft\r");
    await program.shows("left");
    expect(await program.isAlternate()).toBe(false);
    program.write("exit\r");
    await program.ended;
  });

  it("without one, Ctrl+Z comes back at once", async () => {
    const program = startPty(process.execPath, [bundle.file], { env: { JOURNAL: journal } });
    await program.shows("key none.");
    program.write("\u001a");
    await expect.poll(() => program.output().split("\u001b[?1049h").length).toBe(3);
    program.write("k");
    await program.shows("key k.");
    program.write("q");
    expect((await program.ended).exitCode).toBe(0);
  });
});

/** A process that has ended but was not waited for (state Z) no longer runs. */
function isRunning(pid: number): boolean {
  try {
    return !/\) Z /.test(readFileSync(`/proc/${pid}/stat`, "utf8"));
  } catch {
    return false;
  }
}
