import { describe, expect, it } from "vitest";
import { makeChain } from "../../../src/core/chain.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { logSpaced } from "../../../src/core/response/grid.ts";
import { Sampler } from "../../../src/core/response/sampled.ts";
import { BLOCK_SIZE } from "../../../src/core/response/working.ts";
import { buildStage } from "../../../src/core/stages/build.ts";
import { mixedCases, stageCases, surroundings } from "../../helpers/netlist-cases.ts";
import { engineChain } from "../../helpers/netlist-engine.ts";
import { countings } from "../../helpers/netlist-expect.ts";
import { type FileStage, gainsOf, readNodes } from "../../helpers/netlists.ts";
import { expectAngle, expectClose } from "../../helpers/nodal-close.ts";
import { gainDb, phaseDeg } from "../../helpers/nodal-complex.ts";

// The response over a grid against the nodal analysis of test/helpers, within 1e-6 dB and 1e-5°, and within 1e-9 dB
// and 1e-9° of the reading at one frequency. The grid takes two blocks and a part of a third, looked at on both sides
// of their edges.
const grid = logSpaced(5, 5e6, 2 * BLOCK_SIZE + 77);
const sampler = new Sampler(grid);
const looked = [0, 200, BLOCK_SIZE - 1, BLOCK_SIZE, 700, 2 * BLOCK_SIZE - 1, 2 * BLOCK_SIZE, grid.length - 1];

function expectSampled(stages: readonly FileStage[]): void {
  for (const around of surroundings) {
    const file = { ...around, stages };
    const nodal = looked.map((k) => gainsOf(readNodes(file, grid[k]), file, grid[k]));
    for (const against of countings) {
      const chain = engineChain(file, against);
      const sampled = sampler.response(chain);
      looked.forEach((k, place) => {
        const what = `against ${against} at ${grid[k]} Hz`;
        expectClose(sampled.gainDb[k], gainDb(nodal[place][against]), 1e-6, `gain in dB ${what}`);
        expectAngle(sampled.phaseDeg[k], phaseDeg(nodal[place][against]), 1e-5, `phase ${what}`);
        const reading = readAt(chain, grid[k]);
        expectClose(sampled.gainDb[k], reading.gainDb, 1e-9, `gain and reading ${what}`);
        expectAngle(sampled.phaseDeg[k], reading.phaseDeg, 1e-9, `phase and reading ${what}`);
      });
    }
  }
}

describe("over a grid, each kind between every source and load", () => {
  it.each(stageCases.map((stage) => [stage.kind, JSON.stringify(stage.parts), stage] as const))(
    "%s %s",
    (_kind, _parts, stage) => expectSampled([stage]),
  );
});

describe("over a grid, chains of several stages", () => {
  it.each(Object.entries(mixedCases))("%s", (_, stages) => expectSampled(stages));
});

describe("over a grid, chains beyond the range of a double", () => {
  // Closed forms: an integrator is f0/jf, gains multiply.
  it("fifty integrators are (f0/f)⁵⁰, a quarter turn back each", () => {
    const stages = Array.from({ length: 50 }, () => buildStage("integrator", { f0: 1e-9 }));
    const { gainDb: found, phaseDeg: angle } = new Sampler(Float64Array.of(1, 1e12)).response(
      makeChain({ stages }),
    );
    expectClose(found[0], -50 * 20 * 9, 1e-9, "gain at 1 Hz");
    expectClose(found[1], -50 * 20 * 21, 1e-9, "gain at 1e12 Hz");
    // −4500° is half a turn.
    expectAngle(angle[1], 180, 1e-9, "phase at 1e12 Hz");
  });

  it("amplifiers of 1e150 in a row multiply, and what follows takes it back", () => {
    const gain = (value: number) => buildStage("gain", { gain: value });
    const up = Array.from({ length: 30 }, () => gain(1e150));
    const down = Array.from({ length: 30 }, () => gain(1e-150));
    const at = (stages: readonly ReturnType<typeof gain>[]) =>
      new Sampler(Float64Array.of(1000)).response(makeChain({ stages })).gainDb[0];
    expectClose(at(up), 30 * 3000, 1e-9, "gain of thirty");
    expectClose(at([...up, ...down]), 0, 1e-9, "gain of sixty");
  });
});

describe("Sampler.response(chain) after an edit", () => {
  it("is that of a sampler that has not seen the chain before", () => {
    const stages = [3, 5, 8].map((n) => buildStage("lc-lowpass", { L: n * 1e-3, C: n * 1e-8, Rw: n }));
    const chain = makeChain({ stages });
    sampler.response(chain);
    const edited = makeChain({ stages: stages.with(1, buildStage("rc-lowpass", { R: 470, C: 2e-9 })) });
    const fresh = new Sampler(grid).response(edited);
    expect(sampler.response(edited)).toEqual(fresh);
    expect(sampler.response(chain).gainDb).not.toEqual(fresh.gainDb);
  });
});
