/** So many runs of `work`, each timed by itself, in ms. */
export function timed(runs: number, work: () => void): number[] {
  return Array.from({ length: runs }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  });
}

export const least = (values: readonly number[]): number => Math.min(...values);

export const median = (values: readonly number[]): number => quantile(values, 0.5);

/** The value that this part of all is not above. */
export function quantile(values: readonly number[], part: number): number {
  const ascending = [...values].sort((a, b) => a - b);
  return ascending[Math.max(0, Math.ceil(part * ascending.length) - 1)] ?? Number.NaN;
}

export const ms = (value: number): string =>
  value < 1 ? `${(value * 1000).toFixed(0)} µs` : `${value.toFixed(1)} ms`;
