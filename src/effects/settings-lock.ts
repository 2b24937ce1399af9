import { mkdirSync } from "node:fs";
import { dirname } from "node:path";
import { fail, ok, type Result } from "../core/result.ts";
import { codeOf, type FileProblem, fileProblem, systemProblem } from "./file-problem.ts";

/** A lock whose holder was killed is taken over after this time; a living holder renews it. */
const STALE_MS = 5000;
/** Together well above the time after which a lock is stale. */
const RETRIES = { retries: 150, factor: 1.2, minTimeout: 5, maxTimeout: 80, randomize: true };

const BUSY = "another copy of the program keeps the settings to itself";

/** Does `work` while no other copy of the program does any on the same file; makes the folder of the file. */
export async function whileLocked<T>(path: string, work: () => Promise<T>): Promise<Result<T, FileProblem>> {
  let release: () => Promise<void>;
  try {
    mkdirSync(dirname(path), { recursive: true, mode: 0o700 });
    const { lock } = (await import("proper-lockfile")).default;
    release = await lock(path, {
      realpath: false,
      stale: STALE_MS,
      retries: RETRIES,
      onCompromised: () => {
        // Only after a sleep longer than the time above; what is written is read again before and after anyway.
      },
    });
  } catch (error) {
    if (codeOf(error) !== "ELOCKED") return fail(systemProblem(error, path));
    return fail(fileProblem(path, BUSY, "a try later on"));
  }
  try {
    return ok(await work());
  } finally {
    await release().catch(() => undefined);
  }
}
