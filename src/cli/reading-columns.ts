import type { ChainReading } from "../core/readings.ts";
import { type Charset, formatQuantity } from "../core/units/format.ts";
import type { UnitTag } from "../core/units/unit.ts";
import type { CsvCell } from "./csv.ts";
import type { Column } from "./table.ts";

const FREQUENCY_DIGITS = 6;
const DIGITS = 5;
const NOTHING = "-";

/** The columns of a table of readings for people. */
export function readingColumns(charset: Charset, hasConverter: boolean): readonly Column<ChainReading>[] {
  const shown = (value: number | null | undefined, unit: UnitTag, digits = DIGITS) =>
    value === null || value === undefined ? NOTHING : formatQuantity(value, unit, digits, charset);
  const column = (head: string, cell: Column<ChainReading>["cell"]) => ({
    head,
    cell,
    side: "right" as const,
  });
  return [
    column("frequency", ({ freqHz }) => shown(freqHz, "hertz", FREQUENCY_DIGITS)),
    column("gain", ({ gainDb }) => shown(gainDb ?? -Infinity, "level")),
    column("attenuation", ({ attenuationDb }) => shown(attenuationDb, "level")),
    column("ratio", ({ ratio }) => shown(ratio, "gain")),
    column("phase", ({ phaseDeg }) => shown(phaseDeg, "degree")),
    column("unwrapped", ({ phaseUnwrappedDeg }) => shown(phaseUnwrappedDeg, "degree", FREQUENCY_DIGITS)),
    column("group delay", ({ groupDelayS }) => shown(groupDelayS, "second")),
    column("slope", ({ slopeDbPerDecade }) =>
      slopeDbPerDecade === null ? NOTHING : `${shown(slopeDbPerDecade, "level", 4)}/dec`,
    ),
    ...(hasConverter ? [column("folds to", ({ foldHz }) => shown(foldHz, "hertz", FREQUENCY_DIGITS))] : []),
  ];
}

const CSV_FIELDS = [
  "freqHz",
  "gainDb",
  "attenuationDb",
  "ratio",
  "phaseDeg",
  "phaseUnwrappedDeg",
  "groupDelayS",
  "slopeDbPerDecade",
] as const satisfies readonly (keyof ChainReading)[];

/** The header of a CSV of readings: the names of the JSON fields, one column for each share. */
export const csvHeader = (shareNames: readonly string[], hasConverter: boolean): readonly string[] => [
  ...CSV_FIELDS,
  // The words in front also keep a spreadsheet from taking a name such as "=1+1" for a formula.
  ...shareNames.map((name) => `share gainDb: ${name}`),
  ...(hasConverter ? ["foldHz"] : []),
];

export const csvRow = (reading: ChainReading): readonly CsvCell[] => [
  ...CSV_FIELDS.map((field) => reading[field]),
  ...(reading.shares ?? []).map(({ gainDb }) => gainDb),
  ...(reading.foldHz === undefined ? [] : [reading.foldHz]),
];
