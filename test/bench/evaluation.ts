import { Sampler } from "../../src/core/response/sampled.ts";
import { chainOf, editedStages, FREQS_HZ, freshStages } from "./chain.ts";
import { complexObjectsResponse } from "./complex-objects.ts";
import { type Numpy, startNumpy } from "./numpy.ts";
import { notMeasured, type Row } from "./report.ts";
import { least, median, ms, timed } from "./timing.ts";

const ROUNDS = 40;
const RUNS = 25;
/** Slow, so it takes part in a few rounds only. */
const OBJECTS_EVERY = 4;

/** From part values to gain and phase, and an edit, against NumPy and mathjs on the same chain. */
export async function evaluationRows(root: string): Promise<readonly Row[]> {
  const numpy = startNumpy(root);
  try {
    await expectSame(numpy);
    return rowsOf(await race(numpy), numpy?.version);
  } finally {
    numpy?.stop();
  }
}

// The grid stands, as with the other contenders; every stage is new to it.
const sampler = new Sampler(FREQS_HZ);
const full = () => sampler.response(chainOf(freshStages()));
let edits = 0;
/** A part of one stage has a value that has not been seen before. */
const edit = () => sampler.response(chainOf(editedStages(1 + ++edits * 1e-6)));

interface Times {
  readonly full: number[][];
  readonly edit: number[][];
  readonly matrices: number[][];
  readonly pair: number[][];
  readonly objects: number[][];
}

/** The contenders take turns, so that whatever else the machine does falls on all of them. */
async function race(numpy: Numpy | undefined): Promise<Times> {
  const times: Times = { full: [], edit: [], matrices: [], pair: [], objects: [] };
  timed(400, full);
  timed(400, edit);
  timed(1, complexObjectsResponse);
  for (let round = 0; round < ROUNDS; round++) {
    times.objects.push(round % OBJECTS_EVERY === 0 ? timed(1, complexObjectsResponse) : []);
    times.full.push(timed(RUNS, full));
    times.matrices.push([...((await numpy?.time("matrices", RUNS)) ?? [])]);
    times.edit.push(timed(RUNS, edit));
    times.pair.push([...((await numpy?.time("pair", RUNS)) ?? [])]);
  }
  return times;
}

function rowsOf({ full, edit, matrices, pair, objects }: Times, version: string | undefined): readonly Row[] {
  const times = (name: string, rounds: readonly number[][], found = "", rest: Partial<Row> = {}): Row => ({
    what: name,
    least: ms(least(rounds.flat())),
    median: ms(median(rounds.flat())),
    found,
    ...rest,
  });
  const slower = (name: string, rounds: readonly number[][], bar?: number): Row => {
    const ratio = ratioOf(rounds, full);
    const verdict = bar === undefined ? {} : { bar: `at least ${bar} times`, met: ratio >= bar };
    return times(name, rounds, `${ratio.toFixed(1)} times`, verdict);
  };
  return [
    times("full evaluation, 12 loaded second-order sections × 1000", full),
    ...(version === undefined
      ? [notMeasured("the same in NumPy", "at least 4 times")]
      : [
          slower(`the same in NumPy ${version}, 2×2 matrices`, matrices, 4),
          slower(`the same in NumPy ${version}, only V and I`, pair),
        ]),
    slower("the same in mathjs complex objects", objects, 500),
    times("one part edited, to new gain and phase", edit, ms(median(edit.flat())), {
      bar: "under 200 µs",
      met: median(edit.flat()) < 0.2,
    }),
  ];
}

/** Of the medians of one round after the other, the middle one: what disturbs a round falls on both. */
function ratioOf(slow: readonly number[][], fast: readonly number[][]): number {
  const ratios = slow.flatMap((round, k) => (round.length === 0 ? [] : [median(round) / median(fast[k])]));
  return median(ratios);
}

/** A race of contenders that do not compute the same thing would say nothing. */
async function expectSame(numpy: Numpy | undefined): Promise<void> {
  const { gainDb, phaseDeg } = full();
  const others = [complexObjectsResponse()];
  if (numpy !== undefined) others.push(await numpy.response("matrices"), await numpy.response("pair"));
  for (const other of others) {
    const apartDb = Math.max(...other.gainDb.map((value, k) => Math.abs(value - gainDb[k])));
    const apartDeg = Math.max(...other.phaseDeg.map((value, k) => Math.abs(value - phaseDeg[k])));
    if (!(apartDb < 1e-9 && apartDeg < 1e-9))
      throw new Error(`the contenders are ${apartDb} dB and ${apartDeg}° apart`);
  }
}
