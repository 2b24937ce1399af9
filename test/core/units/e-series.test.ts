import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  nearestInSeries,
  SERIES_NAMES,
  type SeriesName,
  seriesMantissas,
  stepInSeries,
  valuesInSeries,
} from "../../../src/core/units/e-series.ts";
import reference from "../../reference/e-series.json" with { type: "json" };

const seriesNames = fc.constantFrom(...SERIES_NAMES);
const servedValues = fc.tuple(
  fc.double({ min: 1, max: 9.99, noNaN: true }),
  fc.integer({ min: -290, max: 290 }),
);

// IEC 60063:2015 as published in several independent copies; see the file's status.
describe("mantissas of IEC 60063", () => {
  test("all series are in the reference", () => {
    expect(reference.rows.map(({ series }) => series)).toEqual([...SERIES_NAMES]);
  });

  test.each(reference.rows)("$series", ({ series, count, mantissas }) => {
    expect(mantissas).toHaveLength(count);
    expect(seriesMantissas(series as SeriesName)).toEqual(mantissas);
  });
});

describe("nearestInSeries(value, series)", () => {
  test.each([
    [4800, "E12", 4700],
    [4.6e-9, "E6", 4.7e-9],
    [9.6, "E12", 10],
    [9.0, "E12", 8.2], // 9.0/8.2 = 1.098, 10/9.0 = 1.111
    [9.1, "E12", 10], // 9.1/8.2 = 1.110, 10/9.1 = 1.099: nearer by ratio, though 8.2 and 10 are equally far
    [0.999, "E192", 1],
    [9.195, "E192", 9.2],
    [1e3, "E3", 1e3],
  ] as const)("of %d in %s is %d", (value, series, nearest) => {
    expect(nearestInSeries(value, series)).toBe(nearest);
  });

  test("no member of the printed table is nearer", () => {
    fc.assert(
      fc.property(
        servedValues,
        fc.constantFrom(...reference.rows),
        ([mantissa, decade], { series, mantissas }) => {
          const value = Number(`${mantissa}e${decade}`);
          const printed = [...mantissas, 10].map((each) => Math.abs(Math.log(mantissa / each)));
          const distance = Math.abs(Math.log(value / nearestInSeries(value, series as SeriesName)!));
          expect(distance).toBeLessThanOrEqual(Math.min(...printed) + 1e-12);
        },
      ),
    );
  });
});

describe("stepInSeries(value, series, direction)", () => {
  test.each([
    [4700, "E12", "up", 5600],
    [4700, "E12", "down", 3900],
    [4.7e-9, "E24", "up", 5.1e-9],
    [8.2e-12, "E12", "up", 1e-11],
    [1e-11, "E12", "down", 8.2e-12],
    [5000, "E12", "up", 5600],
    [5000, "E12", "down", 4700],
    [9.5e5, "E12", "up", 1e6],
    [9.09e3, "E192", "up", 9.2e3],
    [976, "E96", "up", 1000],
    [1, "E3", "down", 0.47],
  ] as const)("%d in %s %s is %d", (value, series, direction, next) => {
    expect(stepInSeries(value, series, direction)).toBe(next);
  });

  test("a member missed by rounding errors is left all the same", () => {
    for (const value of [47 * 1e-10, 4.7e-9 * (1 + 1e-15), 4.7e-9 * (1 - 1e-15)]) {
      expect(stepInSeries(value, "E12", "up")).toBe(5.6e-9);
      expect(stepInSeries(value, "E12", "down")).toBe(3.9e-9);
    }
  });

  test("up and down undo each other on the series", () => {
    fc.assert(
      fc.property(servedValues, seriesNames, ([mantissa, decade], series) => {
        const member = nearestInSeries(Number(`${mantissa}e${decade}`), series)!;
        expect(stepInSeries(stepInSeries(member, series, "up")!, series, "down")).toBe(member);
        expect(stepInSeries(stepInSeries(member, series, "down")!, series, "up")).toBe(member);
      }),
    );
  });

  test.each(SERIES_NAMES)("%s has its count of steps in a decade", (series) => {
    let value = 1e-9;
    let steps = 0;
    for (; value < 1e-8; steps++) value = stepInSeries(value, series, "up")!;
    expect(value).toBe(1e-8);
    expect(steps).toBe(Number(series.slice(1)));
  });
});

describe("valuesInSeries(series, from, to)", () => {
  test("both ends included, across decades, exact decimals", () => {
    expect(valuesInSeries("E6", 3300, 22000)).toEqual([3300, 4700, 6800, 10000, 15000, 22000]);
    expect(valuesInSeries("E3", 1e-9, 1e-8)).toEqual([1e-9, 2.2e-9, 4.7e-9, 1e-8]);
    expect(valuesInSeries("E12", 4.71e-9, 5.59e-9)).toEqual([]);
  });

  test("no values where there is no range", () => {
    expect(valuesInSeries("E6", 10, 1)).toEqual([]);
    expect(valuesInSeries("E6", 0, 1)).toEqual([]);
    expect(valuesInSeries("E6", 1, Infinity)).toEqual([]);
    expect(valuesInSeries("E6", NaN, 1)).toEqual([]);
  });
});

test.each([0, -1, NaN, Infinity, 1e-310, 1e300])("%d has no place in a series", (value) => {
  expect(nearestInSeries(value, "E24")).toBeUndefined();
  expect(stepInSeries(value, "E24", "up")).toBeUndefined();
  expect(stepInSeries(value, "E24", "down")).toBeUndefined();
});
