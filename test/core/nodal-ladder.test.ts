import { describe, it } from "vitest";
import { prototype } from "../helpers/netlist-ladder.ts";
import { type FileChain, nodalGain } from "../helpers/netlists.ts";
import { expectClose } from "../helpers/nodal-close.ts";
import { gainDb } from "../helpers/nodal-complex.ts";

// The tests' own ladder elements: a ladder between g_0 and g_(n+1) passes 1/(1 + ε²·T_n²(x)) of the available power
// (Chebyshev), or 1/(1 + x^2n) (Butterworth); the defining closed forms, x = f/corner in a low-pass, corner/f in a
// high-pass.
const corner = 12_000;
const Z0 = 75;

const cases = (["lowpass", "highpass"] as const).flatMap((shape) =>
  (["L", "C"] as const).flatMap((first) =>
    [
      { family: "butterworth" as const, ripple: undefined },
      { family: "chebyshev" as const, ripple: 0.1 },
      { family: "chebyshev" as const, ripple: 3 },
    ].flatMap((family) => [1, 2, 3, 4, 7, 8].map((order) => ({ shape, first, order, ...family }))),
  ),
);

describe("ladder elements give the family's power transfer between their terminations", () => {
  it.each(cases)("$shape, $family $ripple dB, order $order, first $first", (parts) => {
    const { ripple, ...rest } = parts;
    const optional = ripple === undefined ? {} : { ripple };
    const { load } = prototype({ ...rest, ...optional });
    const endsInShunt = (parts.order % 2 === 0) === (parts.first === "L");
    const loadOhm = endsInShunt ? Z0 * load : Z0 / load;
    const chain: FileChain = {
      source: { R: Z0 },
      stages: [{ kind: "ladder", parts: { ...rest, ...optional, corner, Z0 } }],
      load: { R: loadOhm },
    };
    for (const x of [0.01, 0.3, 0.77, 0.999, 1, 1.3, 3]) {
      const freqHz = parts.shape === "lowpass" ? x * corner : corner / x;
      const powerDb = gainDb(nodalGain(chain, freqHz)) + 10 * Math.log10((4 * Z0) / loadOhm);
      expectClose(
        powerDb,
        -10 * Math.log10(1 + excess(parts.order, ripple, x)),
        1e-9,
        `power in dB at x = ${x}`,
      );
    }
  });
});

function excess(order: number, rippleDb: number | undefined, x: number): number {
  if (rippleDb === undefined) return x ** (2 * order);
  const chebyshev = x <= 1 ? Math.cos(order * Math.acos(x)) : Math.cosh(order * Math.acosh(x));
  return (10 ** (rippleDb / 10) - 1) * chebyshev ** 2;
}
