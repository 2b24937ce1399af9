/** Where a frequency lands when sampled at `rateHz`: `|f − rate·round(f/rate)|`. Source: Shannon (1949). */
export function foldHz(freqHz: number, rateHz: number): number {
  return Math.abs(freqHz - rateHz * Math.round(freqHz / rateHz));
}
