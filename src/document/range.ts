import { MOST_SWEEP_POINTS, type Sweep, sweepLength } from "../core/response/grid.ts";
import { formatQuantity } from "../core/units/format.ts";
import { type DocumentProblem, described, problemAt } from "./problem.ts";
import type { SweepDocument } from "./types.ts";
import { positive, type ValueReader, type ValueSpec } from "./value.ts";

/** As the engine takes it: `fromHz`, `toHz`, `perDecade`. */
export type ResolvedSweep = Sweep;

export const DEFAULT_SWEEP: ResolvedSweep = { fromHz: 1, toHz: 1e6, perDecade: 50 };
const PER_DECADE: ValueSpec = { unit: "number", range: { from: 1, to: 10_000, whole: true } };

export function resolveSweep(sweep: SweepDocument = {}, reader: ValueReader): ResolvedSweep {
  const fromHz = reader.value(["sweep", "from"], sweep.from, positive("hertz"), DEFAULT_SWEEP.fromHz);
  const toHz = reader.value(["sweep", "to"], sweep.to, positive("hertz"), DEFAULT_SWEEP.toHz);
  const perDecade = reader.value(
    ["sweep", "perDecade"],
    sweep.perDecade,
    PER_DECADE,
    DEFAULT_SWEEP.perDecade,
  );
  if (toHz <= fromHz) {
    reader.refuse(
      sweep.to === undefined
        ? aboveProblem(
            ["sweep", "from"],
            sweep.from,
            `below ${formatQuantity(toHz, "hertz", 6)}, where the sweep ends`,
          )
        : notAbove(["sweep", "to"], sweep.to, fromHz),
    );
  }
  const points = sweepLength({ fromHz, toHz, perDecade });
  if (points > MOST_SWEEP_POINTS) {
    reader.refuse(problemAt(["sweep"], `it has ${points} points`, `at most ${MOST_SWEEP_POINTS} points`));
  }
  return { fromHz, toHz, perDecade };
}

/** The upper end of a range that does not lie above its lower end. */
export const notAbove = (path: DocumentProblem["path"], to: unknown, fromHz: number): DocumentProblem =>
  problemAt(path, `${described(to)} is not above "from"`, `more than ${formatQuantity(fromHz, "hertz", 6)}`);

const aboveProblem = (path: DocumentProblem["path"], raw: unknown, allowed: string): DocumentProblem =>
  problemAt(path, `${described(raw)} is not below "to"`, allowed);
