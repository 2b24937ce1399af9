import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { withHome } from "./home.ts";
import type { Row } from "./report.ts";
import { openTimed } from "./terminal.ts";
import { least, median, ms } from "./timing.ts";

const RUNS = 20;

/** Whole processes against an empty one: `halfpower read`, and the workstation up to its first frame. */
export const startingRows = (root: string): Promise<readonly Row[]> =>
  withHome(async (env) => {
    const program = join(root, "dist/halfpower.js");
    const chain = join(root, "presets/strain-bridge.chain.json");
    const run = (...args: string[]) => {
      const start = performance.now();
      const { status } = spawnSync(process.execPath, args, {
        env: { ...process.env, ...env },
        stdio: "ignore",
      });
      if (status !== 0) throw new Error(`node ${args.join(" ")} ended with ${status}`);
      return performance.now() - start;
    };
    const empty = () => run("-e", "0");
    const read = () => run(program, "read", chain, "1k");
    const frame = () => firstFrame([program, chain], env);
    // What is read for the first time comes from the disk.
    empty();
    read();
    await frame();
    const times = { empty: [] as number[], read: [] as number[], frame: [] as number[] };
    for (let k = 0; k < RUNS; k++) {
      times.empty.push(empty());
      times.read.push(read());
      times.frame.push(await frame());
    }
    const moreThanEmpty = (what: string, all: readonly number[], most: number): Row => {
      const more = median(all.map((time, k) => time - times.empty[k]));
      return {
        what,
        least: ms(least(all)),
        median: ms(median(all)),
        found: `${ms(more)} more`,
        bar: `at most ${most} ms more`,
        met: more <= most,
      };
    };
    return [
      {
        what: "node -e 0, a whole process",
        least: ms(least(times.empty)),
        median: ms(median(times.empty)),
        found: "",
      },
      moreThanEmpty("halfpower read, a whole process", times.read, 150),
      moreThanEmpty("halfpower, start to first frame", times.frame, 250),
    ];
  });

/** From the start of the process to the last row of the first frame, the hints, at 100×30. */
async function firstFrame(args: readonly string[], env: Record<string, string>): Promise<number> {
  const start = performance.now();
  const terminal = openTimed(args, { columns: 100, rows: 30 }, env);
  await terminal.shows("cursor");
  const timeMs = performance.now() - start;
  await terminal.quit();
  return timeMs;
}
