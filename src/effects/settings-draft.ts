import { accessSync, chmodSync, constants, renameSync, rmSync, statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fail, ok, type Result } from "../core/result.ts";
import { type FileProblem, fileProblem, systemProblem } from "./file-problem.ts";
import { bytesText } from "./read-file.ts";
import {
  MAX_SETTINGS_BYTES,
  readSettingsData,
  type SettingsContent,
  type SettingsData,
} from "./settings-data.ts";
import { linkedPath } from "./write-file.ts";

const DRAFT = "settings.draft";
const OWNER_ONLY = 0o600;
const PERMISSION_BITS = 0o7777;

/**
 * Puts new settings in the place of those that were read; false where they are no longer those. Only for who holds the
 * lock. `conf` writes into a draft, which is read again before it is exchanged: on a disk that fills up the library
 * leaves a file cut short and says nothing.
 */
export async function exchangeSettings(
  path: string,
  before: SettingsContent,
  data: SettingsData,
): Promise<Result<boolean, FileProblem>> {
  const expected = JSON.stringify(data);
  if (Buffer.byteLength(expected) > MAX_SETTINGS_BYTES) return fail(tooLarge(path));
  let draft: string | undefined;
  try {
    const target = linkedPath(path);
    const mode = modeOf(target);
    draft = await draftOf(dirname(target), data);
    const written = readSettingsData(draft);
    if (!written.ok || JSON.stringify(written.value.data) !== expected) return fail(cutShort(path));
    chmodSync(draft, mode);
    const now = readSettingsData(path);
    if (!now.ok || now.value.text !== before.text) return ok(false);
    renameSync(draft, target);
    return ok(true);
  } catch (error) {
    return fail(systemProblem(error, path));
  } finally {
    if (draft !== undefined) rmSync(draft, { force: true });
  }
}

let conf: Promise<typeof import("conf")> | undefined;

/** With a validator that takes long to load, so that it is loaded when something is written, and before the lock is taken. */
export function loadConf(): Promise<typeof import("conf")> {
  if (conf !== undefined) return conf;
  // With it comes a listener (when-exit) that would pass this signal on to end the program, where a file meets the
  // limit of `ulimit -f`; writing fails with EFBIG then, which is enough.
  process.on("SIGXFSZ", () => {});
  conf = import("conf");
  return conf;
}

async function draftOf(folder: string, data: SettingsData): Promise<string> {
  const { default: Conf } = await loadConf();
  // Left by a copy that was killed; `conf` would begin by reading it.
  rmSync(join(folder, `${DRAFT}.json`), { force: true });
  const draft = new Conf<Record<string, unknown>>({
    cwd: folder,
    configName: DRAFT,
    configFileMode: OWNER_ONLY,
    accessPropertiesByDotNotation: false,
    serialize: (value) => `${JSON.stringify(value, null, 2)}\n`,
  });
  draft.store = { ...data };
  return draft.path;
}

function modeOf(target: string): number {
  const status = statSync(target, { throwIfNoEntry: false });
  if (status === undefined) return OWNER_ONLY;
  // A file marked as read-only is not written, though its folder would allow it to be exchanged.
  accessSync(target, constants.W_OK);
  return status.mode & PERMISSION_BITS;
}

const tooLarge = (path: string): FileProblem =>
  fileProblem(
    path,
    "with this the settings would be too large",
    `settings and presets of at most ${bytesText(MAX_SETTINGS_BYTES)}`,
  );

const cutShort = (path: string): FileProblem =>
  fileProblem(path, "the disk did not take all of it; nothing was changed", "a disk with free space");
