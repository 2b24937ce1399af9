import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { startPty } from "../helpers/pty.ts";
import { ms, type Row, timed, timingOf } from "./timing.ts";

const RUNS = 15;

/** Whole processes against an empty one: `halfpower read`, and the workstation up to its first frame. */
export async function startingRows(root: string): Promise<readonly Row[]> {
  const program = join(root, "dist/halfpower.js");
  const chain = join(root, "presets/strain-bridge.chain.json");
  const home = mkdtempSync(join(tmpdir(), "halfpower-bench-"));
  const env = { HOME: home, XDG_CONFIG_HOME: join(home, "config"), XDG_STATE_HOME: join(home, "state") };
  const run = (...args: string[]) =>
    spawnSync(process.execPath, args, { env: { ...process.env, ...env }, stdio: "ignore" });
  const times = { empty: [] as number[], read: [] as number[], frame: [] as number[] };
  try {
    run(program, "read", chain, "1k");
    for (let k = 0; k < RUNS; k++) {
      times.empty.push(...timed(1, () => run("-e", "0")));
      times.read.push(...timed(1, () => run(program, "read", chain, "1k")));
      times.frame.push(await firstFrame(program, chain, env));
    }
  } finally {
    rmSync(home, { recursive: true, force: true });
  }
  const empty = timingOf(times.empty).median;
  const more = (what: string, all: readonly number[], bar: number): Row => {
    const { median } = timingOf(all);
    return {
      what,
      measured: `${ms(median)}, ${ms(median - empty)} more than node -e 0`,
      bar: `at most ${bar} ms more`,
      met: median - empty <= bar,
    };
  };
  return [
    more("halfpower read as a whole process", times.read, 150),
    more("halfpower to the first frame", times.frame, 250),
  ];
}

/** From the start of the process to the last row of the first frame, at 100x30. */
async function firstFrame(program: string, chain: string, env: Record<string, string>): Promise<number> {
  const start = performance.now();
  const running = startPty(process.execPath, [program, chain], { columns: 100, rows: 30, env });
  // The hint line is the last row.
  await running.shows("Tab");
  const time = performance.now() - start;
  running.write("q");
  await running.ended;
  return time;
}
