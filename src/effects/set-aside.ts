import { closeSync, openSync, renameSync } from "node:fs";
import { codeOf } from "./file-problem.ts";

const MOST_NAMES = 10_000;

/**
 * Gives a damaged file another name, `settings.json.damaged` or the next that is free, and returns it. Nothing is ever
 * overwritten: the name is taken by an empty file of our own first. Throws what the system refuses.
 */
export function setAside(path: string): string {
  for (let number = 1; ; number++) {
    const aside = `${path}.damaged${number === 1 ? "" : `-${number}`}`;
    try {
      closeSync(openSync(aside, "wx", 0o600));
    } catch (error) {
      if (codeOf(error) === "EEXIST" && number < MOST_NAMES) continue;
      throw error;
    }
    renameSync(path, aside);
    return aside;
  }
}
