import { nearestInSeries, type SeriesName, stepInSeries, valuesInSeries } from "../../units/e-series.ts";

/** Members of a series from half a decade below to half a decade above a value. */
export const around = (value: number, series: SeriesName, ratio = Math.sqrt(10)): readonly number[] =>
  valuesInSeries(series, value / ratio, value * ratio);

/** The member nearest to a value with its neighbours on both sides. */
export function neighbours(value: number, series: SeriesName): readonly number[] {
  const nearest = nearestInSeries(value, series);
  if (nearest === undefined) return [];
  return [stepInSeries(nearest, series, "down"), nearest, stepInSeries(nearest, series, "up")].filter(
    (member): member is number => member !== undefined,
  );
}

/** The first `count` members of a series from a value on. */
export function fromUp(value: number, series: SeriesName, count: number): readonly number[] {
  return valuesInSeries(series, value, value * 1e3).slice(0, count);
}
