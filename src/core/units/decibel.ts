/** Logarithmic measure and angle. */

/** dB of one neper: `20 / ln 10`. */
export const DB_PER_NEPER = 20 / Math.LN10;

/** `20·log10(ratio)`; −Infinity for zero. */
export const toDb = (ratio: number): number => 20 * Math.log10(ratio);

export const fromDb = (gainDb: number): number => 10 ** (gainDb / 20);

export const toDegrees = (radians: number): number => (radians * 180) / Math.PI;

/** An angle brought into (−180, 180]. */
export function wrapDeg(angleDeg: number): number {
  const turned = angleDeg - 360 * Math.round(angleDeg / 360);
  return turned <= -180 ? turned + 360 : turned;
}
