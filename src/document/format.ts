import { type DocumentProblem, described, problemAt } from "./problem.ts";
import { FORMAT, VERSION } from "./types.ts";

/**
 * Whether this is a chain file of a version that can be read: asked before anything else, since what is wrong with a
 * foreign file is that it is foreign.
 */
export function versionProblem(data: unknown): DocumentProblem | undefined {
  if (typeof data !== "object" || data === null || Array.isArray(data)) {
    return problemAt([], `found ${described(data)}`, `an object with "format", "version" and "stages"`);
  }
  const { format, version } = data as { readonly format?: unknown; readonly version?: unknown };
  if (format !== FORMAT) return problemAt(["format"], foundText(format), `"${FORMAT}"`);
  if (version === VERSION) return undefined;
  if (typeof version !== "number" || !(version > VERSION)) {
    return problemAt(["version"], foundText(version), `${VERSION}`);
  }
  const allowed = `${VERSION}, the version that this program reads; a newer program is needed for this file`;
  return problemAt(["version"], `found ${version}, a newer version of the format`, allowed);
}

const foundText = (value: unknown): string =>
  value === undefined ? "it is missing" : `found ${described(value)}`;
