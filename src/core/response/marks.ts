import type { Chain } from "../chain.ts";
import type { Complex } from "../complex.ts";
import { chainRoots } from "../roots/groups.ts";
import { middleHz } from "./grid.ts";

/** So many frequencies at most are looked at beside the grid; those beside roots come first. */
const MOST_MARKS = 6000;

/** Beside a root, in half bandwidths: enough to see every narrow peak or notch from both sides. */
const OFFSETS = [-8, -3, -1, -0.4, 0, 0.4, 1, 3, 8] as const;

/** A root on the axis has no bandwidth of its own; this one is far above rounding and far below any real part's. */
const LEAST_RELATIVE_WIDTH = 1e-7;

/**
 * Frequencies in Hz, ascending, at which a response between `fromHz` and `toHz` may do something that a grid does not
 * see: complex poles and zeros with points beside them, multiples of a quarter wave of each line, nulls, tops and
 * images of sampled stages, breaks of measured ones.
 */
export function marksOf(chain: Chain, fromHz: number, toHz: number): readonly number[] {
  const omega0 = 2 * Math.PI * middleHz(fromHz, toHz);
  const { zeros, poles } = chainRoots(chain, omega0);
  const marks = [
    ...[...zeros, ...poles].flatMap(besideRoot),
    ...chain.stages.flatMap(({ elements }) =>
      elements.flatMap((element) => {
        if (element.form === "distributed") return quarterWaves(element.delayS, fromHz, toHz);
        if (element.form !== "isolating" || element.transfer.type === "rational") return [];
        return element.transfer.marks(fromHz, toHz);
      }),
    ),
  ];
  const within = marks.filter((freqHz) => freqHz > fromHz && freqHz < toHz).slice(0, MOST_MARKS);
  within.sort((a, b) => a - b);
  return within.filter((freqHz, k) => freqHz !== within[k - 1]);
}

/** A pair of complex roots is looked at once, a real root not at all: it has no narrow features. */
function besideRoot({ re, im }: Complex): readonly number[] {
  if (im <= 0) return [];
  const size = Math.hypot(re, im);
  const halfWidth = Math.max(Math.abs(re), LEAST_RELATIVE_WIDTH * size);
  const centres = Math.abs(re) < 0.01 * size ? [im] : [im, size];
  return centres.flatMap((centre) =>
    OFFSETS.map((offset) => (centre + offset * halfWidth) / (2 * Math.PI)).filter((freqHz) => freqHz > 0),
  );
}

function quarterWaves(delayS: number, fromHz: number, toHz: number): readonly number[] {
  const step = 1 / (4 * delayS);
  const marks: number[] = [];
  for (let k = Math.max(1, Math.ceil(fromHz / step)); k * step < toHz && marks.length < MOST_MARKS; k++) {
    marks.push(k * step);
  }
  return marks;
}
