import { describe, expect, it } from "vitest";
import { makeChain } from "../../../src/core/chain.ts";
import { branchImpedance } from "../../../src/core/elements/branch.ts";
import { readAt } from "../../../src/core/response/exact.ts";
import { Sampler } from "../../../src/core/response/sampled.ts";
import { buildStage } from "../../../src/core/stages/build.ts";
import { STAGE_KINDS, stageKind } from "../../../src/core/stages/index.ts";
import { stageCases } from "../../helpers/netlist-cases.ts";
import { drawnKinds } from "../../helpers/netlist-stages.ts";
import { expectAngle, expectClose } from "../../helpers/nodal-close.ts";
import {
  type Complex,
  complex,
  gainDb,
  logarithm,
  minus,
  phaseDeg,
  scaled,
} from "../../helpers/nodal-complex.ts";
import { closedForms } from "./closed-forms.ts";

// Kinds that are given by their transfer and not by a circuit: gain within 1e-9 dB, phase within 1e-8°, which is what
// rounding leaves of a sum of samples.
const toleranceDb = 1e-9;
const toleranceDeg = 1e-8;
const freqsHz = Float64Array.of(11, 97, 310, 998, 1001, 3_700, 7_100, 9_700, 26_400, 61_234);

const atHz = (freqHz: number): Complex => complex(0, 2 * Math.PI * freqHz);

/** d(ln H)/d(ln f) by central difference, good to about 1e-9 of what H turns by per octave. */
function logSlope(transfer: (s: Complex) => Complex, freqHz: number): Complex {
  const step = 1e-5;
  const ratio = (factor: number) => logarithm(transfer(atHz(freqHz * Math.exp(factor))));
  const { re, im } = minus(ratio(step), ratio(-step));
  return scaled(complex(re, im - 2 * Math.PI * Math.round(im / (2 * Math.PI))), 1 / (2 * step));
}

const named = closedForms.map((form) => [form.kind, JSON.stringify(form.parts).slice(0, 60), form] as const);

describe.each(named)("%s %s", (_, __, { kind, parts, transfer }) => {
  const chain = makeChain({ stages: [buildStage(kind, parts)] });

  it("reads and samples its transfer", () => {
    const sampled = new Sampler(freqsHz).response(chain);
    for (const [k, freqHz] of freqsHz.entries()) {
      const expected = transfer(atHz(freqHz));
      const exact = readAt(chain, freqHz);
      expectClose(exact.gainDb, gainDb(expected), toleranceDb, `gain in dB at ${freqHz} Hz`);
      expectAngle(exact.phaseDeg, phaseDeg(expected), toleranceDeg, `phase at ${freqHz} Hz`);
      expectClose(sampled.gainDb[k], gainDb(expected), toleranceDb, `sampled gain in dB at ${freqHz} Hz`);
      expectAngle(sampled.phaseDeg[k], phaseDeg(expected), toleranceDeg, `sampled phase at ${freqHz} Hz`);
    }
  });

  it("reads its slope and group delay", () => {
    for (const freqHz of freqsHz) {
      const expected = logSlope(transfer, freqHz);
      const { slopeDbPerDecade, groupDelayS } = readAt(chain, freqHz);
      const size = Math.max(1, Math.hypot(expected.re, expected.im));
      expectClose(
        slopeDbPerDecade / 20,
        expected.re,
        1e-6 * size,
        `slope in decades per decade at ${freqHz} Hz`,
      );
      expectClose(-2 * Math.PI * freqHz * groupDelayS, expected.im, 1e-6 * size, `-ω·delay at ${freqHz} Hz`);
    }
  });

  it("neither loads its source nor is loaded, unless ports are given", () => {
    const sourceOhm = 600;
    const loadOhm = 2200;
    const between = (ports: object) =>
      makeChain({
        source: branchImpedance({ R: sourceOhm, joined: "series" }),
        stages: [buildStage(kind, { ...parts, ...ports })],
        load: branchImpedance({ R: loadOhm, joined: "parallel" }),
      });
    const alone = gainDb(transfer(atHz(1001)));
    expectClose(readAt(between({}), 1001).gainDb, alone, toleranceDb, "without ports");
    const hasPorts = stageKind(kind)?.parts.some(({ name }) => name === "Rin");
    expect(hasPorts).toBe(stageKind(kind)?.group === "ideal");
    if (!hasPorts) return;
    // Two dividers, by hand.
    const dividers = (10e3 / (10e3 + sourceOhm)) * (loadOhm / (loadOhm + 330));
    const loaded = readAt(between({ Rin: 10e3, Rout: 330 }), 1001).gainDb;
    expectClose(loaded, alone + 20 * Math.log10(dividers), toleranceDb, "with ports");
  });
});

describe("every stage kind is held against something", () => {
  const inCases = new Set(stageCases.map(({ kind }) => kind));
  const inForms = new Set(closedForms.map(({ kind }) => kind));

  it("passive and active ones against the nodal analysis, driven from sources into loads", () => {
    const circuits = STAGE_KINDS.filter(({ group }) => group === "passive" || group === "active");
    expect(circuits.map(({ kind }) => kind).filter((kind) => !inCases.has(kind))).toEqual([]);
    expect([...inCases].filter((kind) => !drawnKinds.includes(kind))).toEqual([]);
  });

  it("ideal and sampled ones against their closed forms", () => {
    const given = STAGE_KINDS.filter(({ group }) => group === "ideal" || group === "sampled");
    expect(given.map(({ kind }) => kind).filter((kind) => !inForms.has(kind))).toEqual([]);
    expect(STAGE_KINDS).toHaveLength(inCases.size + inForms.size);
  });
});
