import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { type PtyProgram, startPty } from "../helpers/pty.ts";
import { type Home, makeHome } from "../helpers/station.ts";

const PROGRAM = fileURLToPath(new URL("../../dist/halfpower.js", import.meta.url));
const RC = `{
  "format": "halfpower-chain", "version": 1, "title": "hydrophone input",
  "stages": [ { "kind": "rc-lowpass", "name": "input filter", "parts": { "R": "1k", "C": "100n" } } ]
}
`;

let home: Home;
const running: PtyProgram[] = [];
beforeEach(() => {
  home = makeHome();
});
afterEach(() => {
  for (const program of running.splice(0)) {
    try {
      process.kill(program.pid, "SIGKILL");
    } catch {
      // It has ended.
    }
  }
  home.remove();
});

const environment = () => ({
  HOME: home.folder,
  XDG_CONFIG_HOME: home.path("config"),
  XDG_STATE_HOME: home.path("state"),
});

/** The built program in a pseudo-terminal, in a shell that tells how the terminal was left. */
function start(chain: string, size = { columns: 100, rows: 30 }): PtyProgram {
  const script = `node '${PROGRAM}' '${chain}'; echo "status $?"; stty -a | tr ';' '\\n' | grep -ow -e '-\\?echo' -e '-\\?icanon'`;
  const program = startPty("sh", ["-c", `${script}; sleep 0.2`], { ...size, env: environment() });
  running.push(program);
  return program;
}

/** The program's own process, below the shell. */
function childOf(shell: PtyProgram): number {
  const children = readFileSync(`/proc/${shell.pid}/task/${shell.pid}/children`, "utf8").trim().split(" ");
  return Number(children[0]);
}

const chainFile = () => home.write("hydrophone.chain.json", RC);

async function editing(): Promise<PtyProgram> {
  const program = start(chainFile());
  await program.shows("input filter");
  program.write("\t220n");
  await program.shows("220n");
  await program.shows("unsaved");
  return program;
}

async function isGivenBack(program: PtyProgram): Promise<void> {
  await program.shows("status");
  await program.shows("icanon");
  expect(await program.isAlternate()).toBe(false);
  // The cursor is shown again after it was hidden for the last time.
  expect(program.output().lastIndexOf("\u001b[?25h")).toBeGreaterThan(
    program.output().lastIndexOf("\u001b[?25l"),
  );
  const shown = (await program.screen()).join("\n");
  expect(shown).toMatch(/^echo$/m);
  expect(shown).toMatch(/^icanon$/m);
}

describe("the built program in a pseudo-terminal", () => {
  it("opens on a chain, and q leaves the terminal as it was", async () => {
    const program = start(chainFile());
    await program.shows("hydrophone input");
    await program.shows("at 1.0000 kHz");
    program.write("q");
    await isGivenBack(program);
    expect((await program.screen()).join("\n")).toContain("status 0");
  });

  it.each(["SIGTERM", "SIGINT", "SIGHUP", "SIGQUIT"] as const)(
    "gives the terminal back on %s in the middle of an edit, and the next start offers the work",
    async (signal) => {
      const program = await editing();
      process.kill(childOf(program), signal);
      await isGivenBack(program);
      await offersTheWork();
    },
  );

  it("offers the work again after kill -9 in the middle of an edit", async () => {
    const program = await editing();
    process.kill(childOf(program), "SIGKILL");
    await program.shows("status 137");
    await offersTheWork();
  });

  it("offers the work again after the line was lost", async () => {
    const program = await editing();
    program.hangUp();
    await program.ended;
    await offersTheWork();
  });

  async function offersTheWork(): Promise<void> {
    const next = start(home.path("hydrophone.chain.json"));
    await next.shows("left behind");
    next.write("t");
    await next.shows("taken up again");
    await next.shows("220n");
    next.write("q");
    await next.shows("unsaved work");
    next.write("d");
    await next.shows("status 0");
    expect(readFileSync(home.path("hydrophone.chain.json"), "utf8")).toBe(RC);
  }

  it("is suspended by Ctrl+Z and comes back repainted", async () => {
    // A shell with job control of its own, as a person has.
    const program = startPty("bash", ["--norc", "-i"], {
      columns: 100,
      rows: 30,
      env: { ...environment(), PS1: "ready> " },
    });
    running.push(program);
    await program.shows("ready>");
    program.write(`node '${PROGRAM}' '${chainFile()}'\n`);
    await program.shows("at 1.0000 kHz");
    program.write("\u001a");
    await program.shows("Stopped");
    expect(await program.isAlternate()).toBe(false);
    program.write("fg\n");
    await program.shows("at 1.0000 kHz");
    expect(await program.isAlternate()).toBe(true);
    program.write("q");
    await program.shows("ready>");
  });

  it.each([
    [{ columns: 100, rows: 30 }, 300],
    [{ columns: 160, rows: 48 }, 400],
  ])(
    "writes few bytes for a cursor step at %o, at most %i in the median, and none while idle",
    async (size, most) => {
      const program = start("strain-bridge", size);
      await program.shows("strain");
      await program.shows("attenuation");
      await quiet(program);
      const bytes: number[] = [];
      for (let k = 0; k < 21; k++) {
        const before = Buffer.byteLength(program.output());
        program.write("\u001b[C");
        await quiet(program);
        bytes.push(Buffer.byteLength(program.output()) - before);
      }
      bytes.sort((a, b) => a - b);
      expect(bytes[10]).toBeGreaterThan(0);
      expect(bytes[10]).toBeLessThanOrEqual(most);
      const before = program.output().length;
      await new Promise((resolve) => setTimeout(resolve, 1000));
      expect(program.output().length).toBe(before);
      program.write("q");
    },
  );

  it.each([{ TERM: "dumb" }, { TERM: "unknown" }])(
    "prints the sheet where the terminal cannot move its cursor: %o",
    async (env) => {
      const program = startPty("node", [PROGRAM, chainFile()], {
        columns: 80,
        rows: 40,
        env: { ...environment(), ...env },
      });
      running.push(program);
      await program.ended;
      expect(program.output()).toContain("hydrophone input");
      expect(program.output()).not.toContain("\u001b");
    },
  );
});

/** Resolves when nothing more is written. */
async function quiet(program: PtyProgram): Promise<void> {
  let length = -1;
  while (program.output().length !== length) {
    length = program.output().length;
    await new Promise((resolve) => setTimeout(resolve, 60));
  }
}
