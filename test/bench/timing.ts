/** Times in ms. */
export interface Timing {
  readonly min: number;
  readonly median: number;
}

export function timingOf(times: readonly number[]): Timing {
  const sorted = [...times].sort((a, b) => a - b);
  return { min: sorted[0] ?? Number.NaN, median: sorted[Math.floor(sorted.length / 2)] ?? Number.NaN };
}

/** So many runs of `work`, each timed by itself. */
export function timed(runs: number, work: (run: number) => void): number[] {
  return Array.from({ length: runs }, (_, run) => {
    const start = performance.now();
    work(run);
    return performance.now() - start;
  });
}

/** One line of the result. */
export interface Row {
  readonly what: string;
  readonly measured: string;
  readonly bar: string;
  /** Undefined where it could not be measured here. */
  readonly met: boolean | undefined;
}

export function report(rows: readonly Row[]): string {
  const cells = rows.map(({ what, measured, bar, met }) => [
    what,
    measured,
    bar,
    met === undefined ? "not measured" : met ? "met" : "NOT MET",
  ]);
  const all = [["what", "measured", "bar", ""], ...cells];
  const widths = [0, 1, 2, 3].map((k) => Math.max(...all.map((row) => (row[k] as string).length)));
  return all
    .map((row) =>
      row
        .map((cell, k) => cell.padEnd(widths[k] as number))
        .join("  ")
        .trimEnd(),
    )
    .join("\n");
}

export const ms = (value: number): string =>
  value < 1 ? `${(value * 1000).toFixed(0)} µs` : `${value.toFixed(1)} ms`;
