import { wrapDeg } from "../../core/units/decibel.ts";

export interface Curve {
  readonly freqHz: Float64Array;
  readonly gainDb: Float64Array;
  readonly phaseDeg?: Float64Array;
}

/**
 * Rows by ascending frequency, those of one frequency averaged.
 *
 * Gain: mean of the dB, so that it is the same with and without a phase. Phase: mean direction, the angle of the sum of
 * the unit vectors, since −179° and 179° average to 180°, not 0°; given on the turn nearest to the mean of the angles.
 * Source of the mean direction: K. V. Mardia, P. E. Jupp, Directional Statistics (2000), section 2.2.1.
 */
export function merged(rows: Curve): { curve: Curve; averaged: number } {
  const count = rows.freqHz.length;
  const order = Uint32Array.from({ length: count }, (_, index) => index);
  order.sort((a, b) => rows.freqHz[a] - rows.freqHz[b]);
  const freqHz = new Float64Array(count);
  const gainDb = new Float64Array(count);
  const phaseDeg = rows.phaseDeg && new Float64Array(count);
  let points = 0;
  let averaged = 0;
  for (let from = 0; from < count; points += 1) {
    const to = endOfRun(rows.freqHz, order, from);
    const same = order.subarray(from, to);
    freqHz[points] = rows.freqHz[same[0]];
    gainDb[points] = mean(rows.gainDb, same);
    if (phaseDeg && rows.phaseDeg) phaseDeg[points] = meanAngle(rows.phaseDeg, same);
    if (same.length > 1) averaged += 1;
    from = to;
  }
  const curve = { freqHz: freqHz.slice(0, points), gainDb: gainDb.slice(0, points) };
  return { curve: phaseDeg ? { ...curve, phaseDeg: phaseDeg.slice(0, points) } : curve, averaged };
}

function endOfRun(freqHz: Float64Array, order: Uint32Array, from: number): number {
  let to = from + 1;
  while (to < order.length && freqHz[order[to]] === freqHz[order[from]]) to += 1;
  return to;
}

function mean(values: Float64Array, indices: Uint32Array): number {
  let sum = 0;
  for (const index of indices) sum += values[index];
  return sum / indices.length;
}

function meanAngle(anglesDeg: Float64Array, indices: Uint32Array): number {
  if (indices.length === 1) return anglesDeg[indices[0]];
  const plainDeg = mean(anglesDeg, indices);
  let re = 0;
  let im = 0;
  for (const index of indices) {
    // Relative to the plain mean: equal angles then give exactly that angle.
    const turned = ((anglesDeg[index] - plainDeg) * Math.PI) / 180;
    re += Math.cos(turned);
    im += Math.sin(turned);
  }
  return plainDeg + wrapDeg((Math.atan2(im, re) * 180) / Math.PI);
}
