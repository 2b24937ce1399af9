import { describe, expect, it } from "vitest";
import { STAGE_KINDS } from "../../../src/core/stages/index.ts";
import { mixedCases, stageCases, surroundings } from "../../helpers/netlist-cases.ts";
import { countings, expectNodalReading, expectNodalSlope } from "../../helpers/netlist-expect.ts";
import type { FileStage } from "../../helpers/netlists.ts";

// The engine against the nodal analysis of test/helpers, which is held against computed and published tables in
// test/core/nodal*.test.ts: gain within 1e-6 dB, phase within 1e-5°.
const frequenciesHz = [7, 310, 1_590, 5_033, 20_000, 147_000, 2_100_000];

function expectNodal(stages: readonly FileStage[]): void {
  surroundings.forEach((around, index) => {
    for (const freqHz of frequenciesHz) {
      expectNodalReading({ ...around, stages }, freqHz);
    }
    const freqHz = frequenciesHz[(index * 2) % frequenciesHz.length];
    expectNodalSlope({ ...around, stages }, freqHz, countings[index % countings.length]);
  });
}

describe("each kind alone, between every source and load", () => {
  it.each(stageCases.map((stage) => [stage.kind, JSON.stringify(stage.parts), stage] as const))(
    "%s %s",
    (_kind, _parts, stage) => expectNodal([stage]),
  );

  it("is there for every passive and active kind", () => {
    const kinds = STAGE_KINDS.filter(({ group }) => group === "passive" || group === "active");
    const drawn = new Set(stageCases.map(({ kind }) => kind));
    expect(kinds.map(({ kind }) => kind).filter((kind) => !drawn.has(kind))).toEqual([]);
  });
});

describe("chains of several stages", () => {
  it.each(Object.entries(mixedCases))("%s", (_, stages) => expectNodal(stages));

  it("a stage that is off is out of the line", () => {
    const [first, second] = mixedCases["a transformer into a ladder"];
    const chain = { source: { R: 350 }, stages: [first, { ...second, off: true }], load: { R: 1e3 } };
    expectNodalReading(chain, 1_000);
  });
});
