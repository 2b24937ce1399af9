import { mkdirSync } from "node:fs";
import { dirname } from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { fail, ok, type Result } from "../core/result.ts";
import { codeOf, type FileProblem, fileProblem, systemProblem } from "./file-problem.ts";

/** A lock whose holder was killed is taken over after this time; a living holder renews it. */
const STALE_MS = 5000;
/** Well above the time after which a lock is stale. */
const PATIENCE_MS = 15_000;
const PAUSE_MS = 10;

const BUSY = "another copy of the program keeps the settings to itself";

type Release = () => Promise<void>;

/** Does `work` while no other copy of the program does any on the same file; makes the folder of the file. */
export async function whileLocked<T>(
  path: string,
  work: () => Promise<Result<T, FileProblem>>,
): Promise<Result<T, FileProblem>> {
  const lock = await lockOf(path);
  if (!lock.ok) return lock;
  try {
    return await work();
  } finally {
    await lock.value().catch(() => undefined);
  }
}

/** The library's own retries would also repeat what is denied for good. */
async function lockOf(path: string): Promise<Result<Release, FileProblem>> {
  const { lock } = (await import("proper-lockfile")).default;
  const options = { realpath: false, stale: STALE_MS, onCompromised: leftToTheExchange };
  for (const until = performance.now() + PATIENCE_MS; ; ) {
    try {
      mkdirSync(dirname(path), { recursive: true, mode: 0o700 });
      return ok(await lock(path, options));
    } catch (error) {
      if (codeOf(error) !== "ELOCKED") return fail(systemProblem(error, path));
    }
    if (performance.now() > until) return fail(fileProblem(path, BUSY, "a try later on"));
    await sleep(PAUSE_MS * (1 + Math.random()));
  }
}

/** Lost only by a sleep longer than the time above; what changed meanwhile is noticed before anything is exchanged. */
function leftToTheExchange(): void {}
