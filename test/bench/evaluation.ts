import { type ChildProcess, spawn, spawnSync } from "node:child_process";
import { join } from "node:path";
import { createInterface } from "node:readline";
import { abs, add, type Complex, complex, divide, multiply } from "mathjs";
import { Sampler } from "../../src/core/response/sampled.ts";
import {
  chainOf,
  editedStages,
  FREQS_HZ,
  freshStages,
  LOAD_OHM,
  SECTIONS,
  SOURCE_OHM,
  STAGES,
} from "./chain.ts";
import { ms, type Row, timed, timingOf } from "./timing.ts";

const ROUNDS = 12;
const RUNS_A_ROUND = 60;

/**
 * Full evaluation and an edit of one part, against NumPy and mathjs on the same chain. The contenders take turns, so
 * that whatever else the machine does falls on all of them.
 */
export async function evaluationRows(root: string): Promise<readonly Row[]> {
  const chain = chainOf(STAGES);
  const warm = new Sampler(FREQS_HZ);
  // On a grid that stands, as with the other contenders; every stage is new to it.
  const full = () => void warm.response(chainOf(freshStages()));
  const variants = Array.from({ length: 8 }, (_, k) => chainOf(editedStages(1 + 0.01 * k)));
  // Each edit is new to the sampler: a stage object of its own.
  const edit = () => void warm.response(chainOf(editedStages(1 + Math.random())));
  timed(300, full);
  timed(300, edit);
  warm.response(variants[0]!);
  const numpy = startNumpy(root);
  const gainDb = new Sampler(FREQS_HZ).response(chain).gainDb;
  if (numpy !== undefined) sameGain(JSON.parse(await numpy.ask("gain")), gainDb, "NumPy");
  sameGain(mathjsGain(), gainDb, "mathjs");
  const times = { full: [] as number[], edit: [] as number[], numpy: [] as number[], mathjs: [] as number[] };
  await numpy?.ask("20");
  for (let round = 0; round < ROUNDS; round++) {
    times.full.push(...timed(RUNS_A_ROUND, full));
    if (numpy !== undefined) {
      const { min, median } = JSON.parse(await numpy.ask(String(RUNS_A_ROUND)));
      times.numpy.push(min, median);
    }
    times.edit.push(...timed(RUNS_A_ROUND, edit));
    if (round % 4 === 0) times.mathjs.push(...timed(1, () => void mathjsGain()));
  }
  numpy?.stop();
  return rowsOf(times);
}

function rowsOf(times: Record<"full" | "edit" | "numpy" | "mathjs", number[]>): readonly Row[] {
  const full = timingOf(times.full);
  const edit = timingOf(times.edit);
  const numpy = timingOf(times.numpy);
  const mathjs = timingOf(times.mathjs);
  const against = (name: string, other: number, bar: number): Row => ({
    what: `full evaluation, 12 loaded LC sections x 1000, against ${name}`,
    measured: Number.isNaN(other)
      ? "-"
      : `${ms(full.median)} to ${ms(other)}: ${(other / full.median).toFixed(1)} times`,
    bar: `at least ${bar} times`,
    met: Number.isNaN(other) ? undefined : other / full.median >= bar,
  });
  return [
    against("NumPy", numpy.median, 4),
    against("mathjs complex objects", mathjs.median, 500),
    {
      what: "one part edited, to new gain and phase",
      measured: `median ${ms(edit.median)}, least ${ms(edit.min)}`,
      bar: "under 200 µs",
      met: edit.median < 0.2,
    },
  ];
}

/** The contenders have to compute the same thing. */
function sameGain(found: readonly number[], expected: ArrayLike<number>, name: string): void {
  const worst = Math.max(...found.map((value, k) => Math.abs(value - (expected[k] as number))));
  if (!(worst < 1e-8)) throw new Error(`${name} differs by ${worst} dB`);
}

/** The chain with complex objects: the pair (V, I) carried from the load to the source at one frequency after the other. */
function mathjsGain(): number[] {
  const times = (p: Complex | number, q: Complex | number) => multiply(p, q) as Complex;
  const plus = (p: Complex | number, q: Complex | number) => add(p, q) as Complex;
  return Array.from(FREQS_HZ, (freqHz) => {
    const s = complex(0, 2 * Math.PI * freqHz);
    let v: Complex = complex(1, 0);
    let i: Complex = complex(1 / LOAD_OHM, 0);
    for (const { L, Rw, C, Rc } of [...SECTIONS].reverse()) {
      i = plus(i, divide(v, plus(Rc, divide(1, times(s, C)) as Complex)) as Complex);
      v = plus(v, times(plus(Rw, times(s, L)), i));
    }
    const h = divide(1, plus(v, times(SOURCE_OHM, i))) as Complex;
    return 20 * Math.log10(abs(h) as unknown as number);
  });
}

interface Numpy {
  readonly ask: (line: string) => Promise<string>;
  readonly stop: () => void;
}

/** NumPy in a process of its own, warm; undefined where there is none. */
function startNumpy(root: string): Numpy | undefined {
  if (spawnSync("python3", ["-c", "import numpy"]).status !== 0) return undefined;
  const child: ChildProcess = spawn("python3", [join(root, "test/bench/numpy_chain.py")], {
    stdio: ["pipe", "pipe", "inherit"],
    env: { ...process.env, OMP_NUM_THREADS: "1" },
  });
  const lines = createInterface({ input: child.stdout! })[Symbol.asyncIterator]();
  const task = { freqsHz: [...FREQS_HZ], sections: SECTIONS, sourceOhm: SOURCE_OHM, loadOhm: LOAD_OHM };
  child.stdin?.write(`${JSON.stringify(task)}\n`);
  return {
    ask: async (line) => {
      child.stdin?.write(`${line}\n`);
      return String((await lines.next()).value);
    },
    stop: () => void child.stdin?.end(),
  };
}
