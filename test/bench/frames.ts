import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { FORMAT, VERSION } from "../../src/document/types.ts";
import type { Size } from "../helpers/emulator.ts";
import { LOAD_OHM, SECTIONS, SOURCE_OHM } from "./chain.ts";
import { withHome } from "./home.ts";
import type { Row } from "./report.ts";
import { openTimed, type TimedTerminal } from "./terminal.ts";
import { least, median, ms, quantile } from "./timing.ts";

const TWELVE_SECTIONS = JSON.stringify({
  format: FORMAT,
  version: VERSION,
  title: "twelve sections",
  source: { R: SOURCE_OHM },
  stages: SECTIONS.map((parts, k) => ({ kind: "lc-lowpass", name: `section ${k + 1}`, parts })),
  load: { R: LOAD_OHM },
  sweep: { from: 10, to: 1e6 },
});

const TO_AND_FRO = ["\u001b[C", "\u001b[D"] as const;
const UP_AND_DOWN = ["+", "-"] as const;
const SMALL: Size = { columns: 100, rows: 30 };
const LARGE: Size = { columns: 160, rows: 48 };
/** Until the program is as warm as one that is being worked with. */
const FIRST_KEYS = 60;
const KEYS = 80;
const SAME_KEYS = 20;
const IDLE_MS = 1_000;

/** From a key to its frame at the terminal, the bytes of a cursor step, and those of a second without a key. */
export const frameRows = (root: string): Promise<readonly Row[]> =>
  withHome(async (env, folder) => {
    const program = join(root, "dist/halfpower.js");
    const preset = join(root, "presets/strain-bridge.chain.json");
    const twelve = join(folder, "twelve.chain.json");
    writeFileSync(twelve, TWELVE_SECTIONS);
    const open = (chain: string, size: Size) => openTimed([program, chain], size, env);
    const small = await using(open(preset, SMALL), (terminal) => answers(terminal, TO_AND_FRO));
    const large = await using(open(preset, LARGE), (terminal) => answers(terminal, TO_AND_FRO));
    const cursor = await using(open(twelve, LARGE), (terminal) => answers(terminal, TO_AND_FRO));
    const edit = await using(open(twelve, LARGE), (terminal) => answers(terminal, UP_AND_DOWN));
    const idle = await using(open(twelve, LARGE), (terminal) => terminal.idleBytes(IDLE_MS));
    return [
      timeRow("cursor step to its frame, 12 stages at 160×48", cursor),
      timeRow("edit of a part to its frame, 12 stages at 160×48", edit),
      bytesRow("cursor step, strain bridge at 100×30", small, 300),
      bytesRow("cursor step, strain bridge at 160×48", large),
      { what: "a second without a key", ...bytes(idle, idle, idle), bar: "nothing", met: idle === 0 },
    ];
  });

async function using<T>(terminal: TimedTerminal, work: (terminal: TimedTerminal) => Promise<T>): Promise<T> {
  try {
    await terminal.shows("cursor");
    // What is judged and looked for after the first frame is drawn later.
    await terminal.quiet(IDLE_MS);
    return await work(terminal);
  } finally {
    await terminal.quit();
  }
}

interface Answer {
  readonly timeMs: number;
  readonly bytes: number;
}

/** Twenty times the one key, then twenty times the other, so that no end is reached. */
async function answers(terminal: TimedTerminal, keys: readonly [string, string]): Promise<readonly Answer[]> {
  const all: Answer[] = [];
  for (let k = 0; k < FIRST_KEYS + KEYS; k++) {
    all.push(await terminal.press(keys[Math.floor(k / SAME_KEYS) % 2]));
  }
  return all.slice(FIRST_KEYS);
}

function timeRow(what: string, all: readonly Answer[]): Row {
  const times = all.map(({ timeMs }) => timeMs);
  const late = quantile(times, 0.95);
  return {
    what,
    least: ms(least(times)),
    median: ms(median(times)),
    found: `95 % within ${ms(late)}`,
    bar: "95 % within 16 ms",
    met: late < 16,
  };
}

function bytesRow(what: string, all: readonly Answer[], most?: number): Row {
  const counts = all.map(({ bytes }) => bytes);
  const middle = median(counts);
  const verdict =
    most === undefined ? {} : { bar: `at most ${most} bytes`, met: middle > 0 && middle <= most };
  return { what, ...bytes(least(counts), middle, middle), ...verdict };
}

const bytes = (lowest: number, middle: number, found: number) => ({
  least: `${lowest} bytes`,
  median: `${middle} bytes`,
  found: `${found} bytes`,
});
