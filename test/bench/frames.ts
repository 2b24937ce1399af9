import { FORMAT, VERSION } from "../../src/document/types.ts";
import { makeHome, openStation } from "../helpers/station.ts";
import { SECTIONS } from "./chain.ts";
import { ms, type Row } from "./timing.ts";

const CHAIN = JSON.stringify({
  format: FORMAT,
  version: VERSION,
  title: "twelve sections",
  source: { R: 50 },
  stages: SECTIONS.map((parts, k) => ({ kind: "lc-lowpass", name: `section ${k + 1}`, parts })),
  load: { R: 600 },
  sweep: { from: 10, to: 1e6 },
});

const STEPS = 120;
const MOST_TURNS = 20;

/** From a key to the finished frame in the stream to the terminal, and the bytes of a cursor step. */
export async function frameRows(): Promise<readonly Row[]> {
  const home = makeHome();
  try {
    const chain = home.write("twelve.chain.json", CHAIN);
    const small = await steps(home, "strain-bridge", { columns: 100, rows: 30 }, ["right", "left"]);
    const large = await steps(home, "strain-bridge", { columns: 160, rows: 48 }, ["right", "left"]);
    const cursor = await steps(home, chain, { columns: 160, rows: 48 }, ["right", "left"]);
    const edit = await steps(home, chain, { columns: 160, rows: 48 }, ["+", "-"]);
    return [
      time("cursor step to finished frame, 12 stages at 160x48", cursor.timesMs),
      time("edit of a part to finished frame, 12 stages at 160x48", edit.timesMs),
      bytes("cursor step at 100x30", small.bytes, 300),
      bytes("cursor step at 160x48", large.bytes, 400),
    ];
  } finally {
    home.remove();
  }
}

/** Twenty presses of the one key, then twenty of the other, so that no end is reached. */
async function steps(
  home: ReturnType<typeof makeHome>,
  chain: string,
  size: { columns: number; rows: number },
  keys: readonly [string, string],
) {
  const station = await openStation({ home, chain, size });
  const timesMs: number[] = [];
  const bytes: number[] = [];
  for (let k = 0; k < STEPS; k++) {
    const before = station.emulator.bytesWritten;
    const start = performance.now();
    station.emulator.press(keys[Math.floor(k / 20) % 2] as string);
    // The frame is drawn in a turn of its own; what is judged later comes after it.
    for (let turn = 0; turn < MOST_TURNS && station.emulator.bytesWritten === before; turn++) {
      await new Promise((resolve) => setImmediate(resolve));
    }
    timesMs.push(performance.now() - start);
    await station.settled();
    bytes.push(station.emulator.bytesWritten - before);
  }
  station.close();
  return { timesMs, bytes };
}

const at = (values: readonly number[], part: number): number =>
  [...values].sort((a, b) => a - b)[Math.floor(part * (values.length - 1))] as number;

const time = (what: string, timesMs: readonly number[]): Row => ({
  what,
  measured: `median ${ms(at(timesMs, 0.5))}, 95 % ${ms(at(timesMs, 0.95))}`,
  bar: "95 % under 16 ms",
  met: at(timesMs, 0.95) < 16,
});

const bytes = (what: string, counts: readonly number[], most: number): Row => ({
  what,
  measured: `median ${at(counts, 0.5)} bytes`,
  bar: `at most ${most} bytes`,
  met: at(counts, 0.5) <= most && at(counts, 0.5) > 0,
});
