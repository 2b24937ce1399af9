import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { drawChart, drawFrequencyAxis } from "../../src/chart/chart.ts";
import { frequencyTicks } from "../../src/chart/frequency-ticks.ts";
import { columnOfFrequency, frequencyOfColumn, MARGIN_COLUMNS, plotColumns } from "../../src/chart/scale.ts";
import type { Span } from "../../src/chart/spans.ts";
import { rowOf } from "../../src/chart/trace-lines.ts";
import { TraceMaker } from "../../src/chart/traces.ts";
import { fixedAxis, gainAxis, phaseAxis } from "../../src/chart/value-axis.ts";
import { makeChain } from "../../src/core/chain.ts";
import { rational } from "../../src/core/rational.ts";
import { buildStage } from "../../src/core/stages/build.ts";

const textOf = (spans: readonly Span[]): string => spans.map(({ text }) => text).join("");
const scaleOf = (columns: number) => ({ fromHz: 1, toHz: 1e4, columns: plotColumns(columns) });
const charset = fc.constantFrom("unicode" as const, "ascii" as const);

describe("drawChart(options)", () => {
  it("is exactly as wide and as high as it is asked to be, at any size, and never throws", () => {
    const value = fc.oneof(
      fc.double({ min: -400, max: 400 }),
      fc.constantFrom(-Infinity, Number.NaN, Infinity, 0),
    );
    fc.assert(
      fc.property(
        fc.nat(120),
        fc.nat(40),
        charset,
        fc.array(value, { minLength: 120, maxLength: 120 }),
        fc.boolean(),
        (columns, rows, signs, values, isGain) => {
          const scale = scaleOf(columns);
          const drawn = drawChart({
            quantity: isGain ? "gain" : "phase",
            columns,
            rows,
            scale,
            values: values.slice(0, scale.columns),
            cursorColumn: 3,
            pinColumn: 200,
            charset: signs,
            overlays: {
              limits: [{ fromHz: 10, toHz: 100, atLeast: -3, atMost: 3 }],
              levels: [-3],
              edges: [{ freqHz: 50, kind: "fold" }],
              ghost: values.slice(0, scale.columns),
              bench: [{ freqHz: 20, value: -1 }],
            },
          });
          expect(drawn).toHaveLength(columns === 0 ? 0 : rows);
          for (const row of drawn) {
            expect([...textOf(row)]).toHaveLength(columns);
            if (signs === "ascii") expect(textOf(row)).toMatch(/^[ -~]*$/);
          }
          for (const row of drawFrequencyAxis({ columns, scale, cursorColumn: 3, charset: signs })) {
            expect([...textOf(row)]).toHaveLength(columns);
          }
        },
      ),
      { numRuns: 300 },
    );
  });

  it("draws these rows for a slope with a cursor and a level", () => {
    const scale = { fromHz: 1, toHz: 100, columns: 11 };
    const values = Array.from({ length: 11 }, (_, k) => -4 * k);
    const rows = drawChart({
      quantity: "gain",
      columns: 11 + MARGIN_COLUMNS,
      rows: 5,
      scale,
      values,
      cursorColumn: 5,
      charset: "ascii",
      overlays: { levels: [-20] },
    });
    expect(rows.map(textOf)).toEqual(
      [
        "      0+-+   .    .",
        "     dB|.+-+ .    .",
        "    -20+___+-*+____",
        "       |.    .+-+ .",
        "    -40+.    .  +--",
      ].map((row) => row.padEnd(19)),
    );
  });

  it("puts the cursor on the row of the value, and overlays on the rows of theirs", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -60, max: 20, noNaN: true }),
        fc.integer({ min: 3, max: 30 }),
        (value, rows) => {
          const axis = { low: -60, high: 20 };
          const drawn = drawChart({
            quantity: "gain",
            columns: 30,
            rows,
            scale: scaleOf(30),
            values: Array(plotColumns(30)).fill(value),
            axis,
            cursorColumn: 4,
            charset: "unicode",
            overlays: { bench: [{ freqHz: frequencyOfColumn(scaleOf(30), 9), value }] },
          });
          const row = rowOf({ ...axis, rows }, value) as number;
          const text = [...textOf(drawn[row] as Span[])];
          expect(text[MARGIN_COLUMNS + 4]).toBe("◆");
          expect(text[MARGIN_COLUMNS + 9]).toBe("×");
        },
      ),
    );
  });

  it("says with arrows where the trace leaves a fixed axis", () => {
    const scale = { fromHz: 1, toHz: 10, columns: 4 };
    const rows = drawChart({
      quantity: "gain",
      columns: 4 + MARGIN_COLUMNS,
      rows: 3,
      scale,
      values: [50, 0, -50, -Infinity],
      axis: { low: -10, high: 10 },
      charset: "unicode",
    });
    expect(textOf(rows[0] as Span[])[MARGIN_COLUMNS]).toBe("▴");
    expect(textOf(rows[2] as Span[]).slice(MARGIN_COLUMNS + 2)).toBe("▾▾");
  });
});

describe("axes", () => {
  it("label gain at round decibels and phase at multiples of 45 degrees, each right on a row", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -300, max: 100, noNaN: true }),
        fc.double({ min: 0.1, max: 300, noNaN: true }),
        fc.integer({ min: 4, max: 40 }),
        (low, span, rows) => {
          for (const axis of [gainAxis(rows, [[low, low + span]]), phaseAxis(rows, [[low, low + span]])]) {
            const step = (axis.high - axis.low) / (rows - 1);
            for (const tick of axis.ticks) {
              const row = (axis.high - tick) / step;
              expect(Math.abs(row - Math.round(row))).toBeLessThan(1e-6);
            }
          }
          for (const tick of phaseAxis(rows, [[low, low + span]]).ticks) expect(Math.abs(tick % 45)).toBe(0);
        },
      ),
    );
    expect(fixedAxis("gain", 9, { low: -80, high: 0 }).ticks).toContain(-40);
  });

  it("mark decades with SI prefixes and keep labels apart", () => {
    const scale = { fromHz: 1, toHz: 1e6, columns: 61 };
    const decades = frequencyTicks(scale).filter(({ kind }) => kind === "decade");
    expect(decades.map(({ label }) => label)).toEqual(["1", "10", "100", "1k", "10k", "100k", "1M"]);
    const [, labels] = drawFrequencyAxis({ columns: 61 + MARGIN_COLUMNS, scale, charset: "unicode" });
    expect(textOf(labels as Span[])).toMatch(/Hz 1 +10 +100 +1k +10k +100k +1M/);
  });

  it("columns and frequencies are each other's inverse", () => {
    const scale = { fromHz: 3, toHz: 7e5, columns: 83 };
    for (let column = 0; column < 83; column++) {
      expect(columnOfFrequency(scale, frequencyOfColumn(scale, column))).toBe(column);
    }
    expect(columnOfFrequency(scale, 1)).toBeUndefined();
  });
});

const notch = (q: number, f0: number) =>
  makeChain({ source: rational([0]), stages: [buildStage("notch-2", { f0, Q: q })] });

describe("TraceMaker", () => {
  const scale = { fromHz: 1, toHz: 1e6, columns: 61 };

  it("shows a notch a thousand times narrower than a column in its column", () => {
    // A column is a tenth of a decade, 26 % wide; the notch 0.02 %, between the middles of two columns.
    const { gainDb } = new TraceMaker().traces(notch(5000, 1150), scale);
    const column = columnOfFrequency(scale, 1150) as number;
    expect(gainDb[column]).toBe(-Infinity);
    expect(gainDb.filter((value) => value < -1)).toHaveLength(1);
  });

  it("shows 1 kΩ and 100 nF as worked out by hand", () => {
    // |H|² = 1/(1 + x²), phase −atan x, x = f/1591.549 Hz: Kirchhoff's laws.
    const chain = makeChain({
      source: rational([0]),
      stages: [buildStage("rc-lowpass", { R: 1e3, C: 1e-7 })],
    });
    const { freqHz, gainDb, phaseDeg } = new TraceMaker().traces(chain, scale);
    for (const [k, frequency] of freqHz.entries()) {
      const x = frequency * 2 * Math.PI * 1e-4;
      expect(gainDb[k]).toBeCloseTo(-10 * Math.log10(1 + x * x), 9);
      expect(phaseDeg[k]).toBeCloseTo((-Math.atan(x) * 180) / Math.PI, 9);
    }
  });

  it("gives after an edit what it gives afresh", () => {
    const maker = new TraceMaker();
    const stages = [1, 2, 3].map((k) => buildStage("lc-lowpass", { L: 1e-3 * k, C: 1e-7, Rw: 1 }));
    const chainOf = (last: number) =>
      makeChain({
        source: rational([50]),
        stages: [...stages, buildStage("rc-lowpass", { R: last, C: 1e-8 })],
        load: rational([600]),
      });
    maker.traces(chainOf(100), scale);
    const edited = maker.traces(chainOf(220), scale);
    const afresh = new TraceMaker().traces(chainOf(220), scale);
    expect(edited.gainDb).toEqual(afresh.gainDb);
    expect(edited.phaseDeg).toEqual(afresh.phaseDeg);
  });
});
