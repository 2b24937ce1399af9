import fc from "fast-check";
import type { Branch, Parts } from "./netlist-parts.ts";
import type { FileChain, FileStage } from "./netlists.ts";

/** Random parts for every passive and active kind, in SI units, spread evenly over decades. */
const between = (from: number, to: number): fc.Arbitrary<number> =>
  fc.double({ min: Math.log10(from), max: Math.log10(to), noNaN: true }).map((exponent) => 10 ** exponent);

const R = between(10, 1e6);
const L = between(1e-6, 1);
const C = between(1e-11, 1e-6);
const loss = fc.oneof(fc.constant(0), between(0.01, 100));
const gbw = between(1e5, 1e8);
const frequency = between(1, 1e7);
const signed = (size: fc.Arbitrary<number>) =>
  fc.tuple(size, fc.boolean()).map(([x, minus]) => (minus ? -x : x));

type PartArbitraries = Readonly<Record<string, fc.Arbitrary<number | string>>>;

/** Parts that must be there, and parts that may be left out. */
function parts(needed: PartArbitraries, optional: PartArbitraries = {}): fc.Arbitrary<Parts> {
  const requiredKeys = Object.keys(needed);
  return fc.record({ ...needed, ...optional }, { requiredKeys }) as fc.Arbitrary<Parts>;
}

/** At least one of R, L and C. */
const branchParts = parts({ joined: fc.constantFrom("series", "parallel") }, { R, L, C }).filter(
  (found) => Object.keys(found).length > 1,
);

const ladderParts = (family: PartArbitraries): fc.Arbitrary<Parts> =>
  parts(
    {
      shape: fc.constantFrom("lowpass", "highpass"),
      order: fc.integer({ min: 1, max: 9 }),
      corner: between(100, 1e6),
      Z0: between(10, 1000),
      first: fc.constantFrom("L", "C"),
      ...family,
    },
    { QL: between(5, 500) },
  );

const lineParts = { Z0: between(20, 600), length: between(0.1, 300), velocity: between(0.4, 1) };

export const partsOf: Readonly<Record<string, fc.Arbitrary<Parts>>> = {
  series: branchParts,
  shunt: branchParts,
  "rc-lowpass": parts({ R, C }),
  "rc-highpass": parts({ R, C }),
  "rl-lowpass": parts({ R, L }, { Rw: loss }),
  "rl-highpass": parts({ R, L }, { Rw: loss }),
  "lc-lowpass": parts({ L, C }, { Rw: loss, Rc: loss }),
  "lc-highpass": parts({ L, C }, { Rw: loss }),
  divider: parts({ R1: R, R2: R }),
  lead: parts({ R1: R, C1: C, R2: R }, { C2: C }),
  lag: parts({ R1: R, R2: R, C }),
  "twin-t": parts({ R1: R, R2: R, R3: R, C1: C, C2: C, C3: C }),
  pad: parts({ loss: between(0.1, 60), Z0: between(20, 1000) }),
  ladder: fc.oneof(
    ladderParts({ family: fc.constant("butterworth") }),
    ladderParts({ family: fc.constant("chebyshev"), ripple: between(0.01, 3) }),
  ),
  line: fc.oneof(
    parts(lineParts),
    parts({ ...lineParts, loss: between(0.1, 50), lossAt: between(1e5, 1e9) }),
  ),
  transformer: parts({ ratio: between(0.05, 20) }, { Lm: L, Lk: between(1e-7, 1e-3), Rp: loss, Rs: loss }),
  amplifier: parts(
    { gain: signed(between(0.01, 1000)) },
    { bandwidth: between(1e3, 1e7), Rin: between(1e3, 1e8), Cin: C, Rout: loss },
  ),
  inverting: parts({ Rg: R, Rf: R }, { Cg: C, Cf: C, gbw }),
  noninverting: parts({ Rg: R, Rf: R }, { Cg: C, Cf: C, gbw, Rin: between(1e3, 1e8), Cin: C }),
  "sallen-key-lowpass": parts({ R1: R, R2: R, C1: C, C2: C }, { gain: signed(between(0.2, 5)), gbw }),
  "sallen-key-highpass": parts({ R1: R, R2: R, C1: C, C2: C }, { gain: signed(between(0.2, 5)), gbw }),
  "mfb-lowpass": parts({ R1: R, R2: R, R3: R, C1: C, C2: C }, { gbw }),
  "mfb-bandpass": parts({ R1: R, R2: R, R3: R, C1: C, C2: C }, { gbw }),
};

const anySource: fc.Arbitrary<Branch> = fc.oneof(
  fc.constant({}),
  fc.record({ R }),
  fc.record({ R, L }),
  fc.record({ R, C, joined: fc.constant("parallel") }),
);

const anyLoad: fc.Arbitrary<Branch> = fc.oneof(
  fc.constant({}),
  fc.record({ R }),
  fc.record({ R, C }),
  fc.record({ R, C, joined: fc.constant("series") }),
);

export const stageOf = (kind: string): fc.Arbitrary<FileStage> =>
  partsOf[kind].map((found) => ({ kind, parts: found }));

const anyStage = fc.constantFrom(...Object.keys(partsOf)).chain(stageOf);

const chainOf = (stages: fc.Arbitrary<FileStage[]>): fc.Arbitrary<FileChain> =>
  fc.record({ source: anySource, stages, load: anyLoad });

/** One stage of the kind between a random source and load, read at a random frequency. */
export const loneStage = (kind: string) =>
  fc.tuple(chainOf(stageOf(kind).map((stage) => [stage])), frequency);

/** Two to six stages of any kind between a random source and load, read at a random frequency. */
export const mixedChain = fc.tuple(chainOf(fc.array(anyStage, { minLength: 2, maxLength: 6 })), frequency);
