/** One line of the result. */
export interface Row {
  readonly what: string;
  /** Of all runs, as texts with units. */
  readonly least: string;
  readonly median: string;
  /** What is held against the bar. */
  readonly found: string;
  /** Absent where none is set. */
  readonly bar?: string;
  /** Absent where there is no bar, or where it could not be measured here. */
  readonly met?: boolean;
}

export const notMeasured = (what: string, bar: string): Row => ({
  what,
  least: "-",
  median: "-",
  found: "not available",
  bar,
});

const HEAD = ["what", "least", "median", "found", "bar", ""];

/** The rows as a table for the terminal. */
export function report(rows: readonly Row[]): string {
  const cells = [HEAD, ...rows.map(cellsOf)];
  const widths = HEAD.map((_, column) => Math.max(...cells.map((row) => row[column].length)));
  return cells
    .map((row) =>
      row
        .map((cell, column) => cell.padEnd(widths[column]))
        .join("  ")
        .trimEnd(),
    )
    .join("\n");
}

const cellsOf = ({ what, least, median, found, bar = "", met }: Row): string[] => [
  what,
  least,
  median,
  found,
  bar,
  met === undefined ? "" : met ? "met" : "NOT met",
];
