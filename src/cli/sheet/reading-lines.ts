import { type ChainReading, readings } from "../../core/readings.ts";
import { type Charset, formatQuantity } from "../../core/units/format.ts";
import type { UnitTag } from "../../core/units/unit.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
import { type Column, tableLines } from "../table.ts";
import { measuredRange, rangeWords } from "../without-value.ts";
import { sheetPoints } from "./points.ts";

interface Row extends ChainReading {
  readonly what: string;
}

/** A table of readings at the decades and wherever the response does something. */
export async function readingLines(resolved: ResolvedChain, charset: Charset): Promise<readonly string[]> {
  const { chain, sweep, converter } = resolved;
  const { points, leftOut } = sheetPoints(resolved);
  const found = readings(
    chain,
    sweep,
    points.map(({ freqHz }) => freqHz),
    converter?.rateHz,
  );
  const withoutValue = new Set(found.withoutValueHz);
  const shown = points.filter(({ freqHz }) => !withoutValue.has(freqHz));
  const rows = found.readings.map((reading, k) => ({ ...reading, what: shown[k].what }));
  return [
    ...(await tableLines(columnsOf(charset, converter !== undefined), rows, charset)),
    ...(leftOut > 0 ? [`and ${leftOut} more half-power points, peaks, dips or nulls`] : []),
    ...missing(resolved, found.withoutValueHz),
  ];
}

function missing(resolved: ResolvedChain, withoutValueHz: readonly number[]): readonly string[] {
  const range = measuredRange(resolved);
  return withoutValueHz.length > 0 && range !== undefined ? [`values from ${rangeWords(range)}`] : [];
}

function columnsOf(charset: Charset, hasConverter: boolean): readonly Column<Row>[] {
  const shown = (value: number | null | undefined, unit: UnitTag) =>
    value === null || value === undefined ? "-" : formatQuantity(value, unit, 4, charset);
  const right = (head: string, cell: Column<Row>["cell"]) => ({ head, cell, side: "right" as const });
  return [
    right("frequency", ({ freqHz }) => formatQuantity(freqHz, "hertz", 5, charset)),
    right("gain", ({ gainDb }) => shown(gainDb ?? -Infinity, "level")),
    right("phase", ({ phaseDeg }) => shown(phaseDeg, "degree")),
    right("delay", ({ groupDelayS }) => shown(groupDelayS, "second")),
    right("dB/decade", ({ slopeDbPerDecade }) =>
      slopeDbPerDecade === null ? "-" : String(Number(slopeDbPerDecade.toFixed(2)) + 0),
    ),
    ...(hasConverter ? [right("folds to", ({ foldHz }) => shown(foldHz, "hertz"))] : []),
    { head: "", side: "left", cell: ({ what }) => what },
  ];
}
