import fc from "fast-check";
import { describe, it } from "vitest";
import { countings, expectNodalReading, expectNodalSlope } from "../../helpers/netlist-expect.ts";
import { loneStage, mixedChain, partsOf } from "../../helpers/netlist-random.ts";

// Random parts over four to six decades, the same on every run: seed below.
const lone = { seed: 1977, numRuns: 40 };
const mixed = { seed: 2024, numRuns: 200 };
/** Each takes a few dozen solutions of the network. */
const sloped = { seed: 2025, numRuns: 60 };

describe("each kind with random parts agrees with the nodal analysis", () => {
  it.each(Object.keys(partsOf))("%s", (kind) => {
    fc.assert(
      fc.property(loneStage(kind), fc.constantFrom(...countings), ([chain, freqHz], against) => {
        expectNodalReading(chain, freqHz);
        expectNodalSlope(chain, freqHz, against);
      }),
      lone,
    );
  });
});

describe("random chains of two to six stages agree with the nodal analysis", () => {
  it("in gain, phase and shares", () => {
    fc.assert(
      fc.property(mixedChain, ([chain, freqHz]) => {
        expectNodalReading(chain, freqHz);
      }),
      mixed,
    );
  });

  it("in slope and group delay", () => {
    fc.assert(
      fc.property(mixedChain, fc.constantFrom(...countings), ([chain, freqHz], against) =>
        expectNodalSlope(chain, freqHz, against),
      ),
      sloped,
    );
  });
});
