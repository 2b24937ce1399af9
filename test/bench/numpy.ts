import { type ChildProcess, spawn, spawnSync } from "node:child_process";
import { join } from "node:path";
import { createInterface } from "node:readline";
import { type Form, FREQS_HZ, LOAD_OHM, SECTIONS, SOURCE_OHM } from "./chain.ts";

/** NumPy on the benchmark's chain, warm and in a process of its own; see numpy_chain.py. */
export interface Numpy {
  readonly version: string;
  /** Times of so many evaluations in ms. */
  time(form: Form, runs: number): Promise<readonly number[]>;
  response(form: Form): Promise<{ readonly gainDb: number[]; readonly phaseDeg: number[] }>;
  stop(): void;
}

/** Undefined where `python3 -c "import numpy"` does not work. */
export function startNumpy(root: string): Numpy | undefined {
  const found = spawnSync("python3", ["-c", "import numpy; print(numpy.__version__)"], { encoding: "utf8" });
  if (found.status !== 0) return undefined;
  const child: ChildProcess = spawn("python3", [join(root, "test/bench/numpy_chain.py")], {
    stdio: ["pipe", "pipe", "inherit"],
    // One thread, as the other contenders have.
    env: { ...process.env, OMP_NUM_THREADS: "1", OPENBLAS_NUM_THREADS: "1" },
  });
  const lines = createInterface({ input: child.stdout! })[Symbol.asyncIterator]();
  const tell = (value: unknown) => child.stdin?.write(`${JSON.stringify(value)}\n`);
  const ask = async (question: unknown) => {
    tell(question);
    return JSON.parse(String((await lines.next()).value));
  };
  tell({ freqsHz: [...FREQS_HZ], sections: SECTIONS, sourceOhm: SOURCE_OHM, loadOhm: LOAD_OHM });
  return {
    version: found.stdout.trim(),
    time: (form, runs) => ask({ form, runs }),
    response: (form) => ask({ form }),
    stop: () => void child.stdin?.end(),
  };
}
