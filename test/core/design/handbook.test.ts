import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { leastDesign } from "../../../src/core/design/least-order.ts";
import { sectionTargets } from "../../../src/core/design/realise/targets.ts";
import { stopEdge } from "../../../src/core/filters/prototype.ts";
import type { FilterSpec } from "../../../src/core/filters/transform.ts";

interface Section {
  readonly order: number;
  readonly q: number | null;
  readonly f0?: number;
  readonly f0_ripple_edge?: number;
  readonly handbook_q?: number | null;
}
interface Row {
  readonly kind: string;
  readonly n: number;
  readonly ripple_db?: number;
  readonly stop_db?: number;
  readonly stop_edge?: number;
  readonly sections: readonly Section[];
}

// Op Amps for Everyone, ch. 16, section tables, and closed forms; see the file's own source and status.
const { rows } = JSON.parse(
  readFileSync(new URL("../../reference/prototypes.json", import.meta.url), "utf8"),
) as { readonly rows: readonly Row[] };

const KINDS = {
  bessel: "bessel",
  butterworth_sections: "butterworth",
  chebyshev_sections: "chebyshev",
} as const;

describe("sections that a filter is made of", () => {
  it.each(Object.entries(KINDS))(
    "%s: frequency and Q of every section of the handbook's tables",
    (kind, family) => {
      const found = rows.filter((row) => row.kind === kind);
      expect(found.length).toBeGreaterThanOrEqual(6);
      for (const row of found) {
        const spec: FilterSpec = {
          shape: "lowpass",
          family,
          order: row.n,
          cornerHz: 1,
          rippleDb: row.ripple_db,
        };
        const targets = sectionTargets(spec);
        if (!targets.ok) throw new Error(targets.problem.found);
        const expected = [...row.sections].sort((one, other) => (one.q ?? 0) - (other.q ?? 0));
        expect(targets.value).toHaveLength(expected.length);
        for (const [k, section] of expected.entries()) {
          const { f0Hz, q } = targets.value[k] as { f0Hz: number; q?: number };
          expect(f0Hz).toBeCloseTo((section.f0 ?? section.f0_ripple_edge) as number, 6);
          if (section.q === null) expect(q).toBeUndefined();
          else expect(q).toBeCloseTo(section.q, 6);
          if (section.handbook_q)
            expect(Math.abs((q as number) - section.handbook_q)).toBeLessThanOrEqual(0.0051);
        }
      }
    },
  );
});

describe("the degree equation", () => {
  it("takes SciPy's elliptic orders for SciPy's own stop edges", () => {
    const found = rows.filter((row) => row.kind === "elliptic_scipy" && row.stop_edge !== undefined);
    expect(found.length).toBeGreaterThanOrEqual(8);
    for (const { n, ripple_db, stop_db, stop_edge } of found) {
      const requirement = (stopHz: number) => ({
        passHz: 1,
        passLossDb: ripple_db as number,
        stopHz,
        stopLossDb: stop_db as number,
      });
      // Right at the edge that order n reaches, n is enough; a hair closer it is not.
      const at = leastDesign("elliptic", requirement((stop_edge as number) * (1 + 1e-7)));
      const closer = leastDesign("elliptic", requirement((stop_edge as number) * (1 - 1e-4)));
      expect(at.ok && at.value.order).toBe(n);
      expect(closer.ok && closer.value.order).toBe(n + 1);
      const own = stopEdge({ family: "elliptic", order: n, rippleDb: ripple_db, stopDb: stop_db });
      expect(own.ok && own.value).toBeCloseTo(stop_edge as number, 6);
    }
  });
});
