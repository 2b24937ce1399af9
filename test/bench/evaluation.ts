import { Sampler } from "../../src/core/response/sampled.ts";
import { chainOf, editedStages, FREQS_HZ, freshStages } from "./chain.ts";
import { complexObjectsResponse } from "./complex-objects.ts";
import { type Numpy, startNumpy } from "./numpy.ts";
import { notMeasured, type Row } from "./report.ts";
import { least, median, ms, timed } from "./timing.ts";

const ROUNDS = 40;
/** About as much time for each in a round, since the first runs of a turn find the processor cold. */
const OWN_RUNS = 100;
const NUMPY_RUNS = 25;
/** Slow ones take part in a few rounds only. */
const SLOW_EVERY = 5;

// The grid stands, as with the other contenders; every stage is new to it.
const sampler = new Sampler(FREQS_HZ);
const full = () => sampler.response(chainOf(freshStages()));
let edits = 0;
/** A part of one stage has a value that has not been seen before. */
const edit = () => sampler.response(chainOf(editedStages(1 + ++edits * 1e-6)));

/** From part values to gain and phase, and an edit, against NumPy and mathjs on the same chain. */
export async function evaluationRows(root: string): Promise<readonly Row[]> {
  const numpy = startNumpy(root);
  try {
    await expectSame(numpy);
    timed(400, full);
    timed(400, edit);
    return await race([...mathjsContenders(), ...numpyContenders(numpy)], numpy === undefined);
  } finally {
    numpy?.stop();
  }
}

interface Contender {
  readonly name: string;
  /** The program is to be at least so many times as fast; absent where no bar is set. */
  readonly bar?: number;
  readonly every: number;
  time(): Promise<readonly number[]> | readonly number[];
}

/** Whole matrices are the plain way to multiply a cascade; the pair alone is the least there is to do. */
const mathjsContenders = (): readonly Contender[] => [
  {
    name: "the same in mathjs complex objects, 2×2 matrices",
    bar: 500,
    every: SLOW_EVERY,
    time: () => timed(1, () => complexObjectsResponse("matrices")),
  },
  {
    name: "the same in mathjs complex objects, only V and I",
    every: SLOW_EVERY,
    time: () => timed(1, () => complexObjectsResponse("pair")),
  },
];

function numpyContenders(numpy: Numpy | undefined): readonly Contender[] {
  if (numpy === undefined) return [];
  const name = `the same in NumPy ${numpy.version}`;
  return [
    { name: `${name}, 2×2 matrices`, bar: 4, every: 1, time: () => numpy.time("matrices", NUMPY_RUNS) },
    { name: `${name}, only V and I`, every: 1, time: () => numpy.time("pair", NUMPY_RUNS) },
  ];
}

/** All take turns, each right beside the program itself, so that whatever else the machine does falls on both. */
async function race(contenders: readonly Contender[], withoutNumpy: boolean): Promise<readonly Row[]> {
  const own: number[] = [];
  const edited: number[] = [];
  const others = contenders.map(() => ({ times: [] as number[], ratios: [] as number[] }));
  for (let round = 0; round < ROUNDS; round++) {
    for (const [k, { every, time }] of contenders.entries()) {
      if (round % every !== 0) continue;
      const beside = timed(OWN_RUNS, full);
      const times = await time();
      own.push(...beside);
      others[k].times.push(...times);
      others[k].ratios.push(median(times) / median(beside));
    }
    edited.push(...timed(OWN_RUNS, edit));
  }
  return [
    timesRow("full evaluation, 12 loaded second-order sections × 1000", own),
    timesRow("one part edited, to new gain and phase", edited, {
      found: ms(median(edited)),
      bar: "under 200 µs",
      met: median(edited) < 0.2,
    }),
    ...contenders.map(({ name, bar }, k) => ratioRow(name, bar, others[k].times, median(others[k].ratios))),
    ...(withoutNumpy ? [notMeasured("the same in NumPy", "at least 4 times")] : []),
  ];
}

const timesRow = (what: string, times: readonly number[], rest: Partial<Row> = {}): Row => ({
  what,
  least: ms(least(times)),
  median: ms(median(times)),
  found: "",
  ...rest,
});

const ratioRow = (what: string, bar: number | undefined, times: readonly number[], ratio: number): Row =>
  timesRow(what, times, {
    found: `${ratio.toFixed(1)} times`,
    ...(bar === undefined ? {} : { bar: `at least ${bar} times`, met: ratio >= bar }),
  });

/** A race of contenders that do not compute the same thing would say nothing. */
async function expectSame(numpy: Numpy | undefined): Promise<void> {
  const { gainDb, phaseDeg } = full();
  const others = [complexObjectsResponse("matrices"), complexObjectsResponse("pair")];
  if (numpy !== undefined) others.push(await numpy.response("matrices"), await numpy.response("pair"));
  for (const other of others) {
    const apartDb = Math.max(...other.gainDb.map((value, k) => Math.abs(value - gainDb[k])));
    const apartDeg = Math.max(...other.phaseDeg.map((value, k) => Math.abs(value - phaseDeg[k])));
    if (!(apartDb < 1e-9 && apartDeg < 1e-9))
      throw new Error(`the contenders are ${apartDb} dB and ${apartDeg}° apart`);
  }
}
