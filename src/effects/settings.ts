import { join } from "node:path";
import { fail, ok, type Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import { type FileProblem, fileProblem, fileProblemText, systemProblem } from "./file-problem.ts";
import { setAside } from "./set-aside.ts";
import { readSettingsData, type SettingsContent, type SettingsData } from "./settings-data.ts";
import { exchangeSettings, loadConf } from "./settings-draft.ts";
import { whileLocked } from "./settings-lock.ts";

/** The settings file. Other copies of the program write it too, so that it is read anew each time. */
export interface Settings {
  readonly path: string;
  /** Empty where the file cannot be read, which is noted; a damaged one is set aside. */
  readonly read: () => Promise<SettingsData>;
  /**
   * Writes what `change` makes of the settings as they are now; no other copy can write in between. `change` may be
   * called again if the file was changed by something else meanwhile.
   */
  readonly change: (
    change: (data: SettingsData) => Result<SettingsData, FileProblem>,
  ) => Promise<Result<void, FileProblem>>;
  /** What was found amiss so far, each once; safe to show. */
  readonly notes: () => readonly string[];
}

const MOST_TRIES = 20;

/** Settings in a folder, which need not exist yet. */
export function openSettings(folder: string): Settings {
  const path = join(folder, "settings.json");
  const notes = new Set<string>();
  const note = (text: string) => {
    notes.add(plainText(text, 1000));
  };

  const read = async (): Promise<SettingsData> => {
    const content = readSettingsData(path);
    if (content.ok) return content.value.data;
    if (!content.problem.isDamaged) note(fileProblemText(content.problem.problem));
    else {
      // Read again while no other copy can do the same.
      const sound = await whileLocked(path, async () => soundContent(path, note));
      if (!sound.ok) note(fileProblemText(sound.problem));
      else return sound.value.data;
    }
    return {};
  };

  const change: Settings["change"] = async (make) => {
    await loadConf();
    return whileLocked(path, async () => {
      for (let tries = 0; tries < MOST_TRIES; tries++) {
        const before = soundContent(path, note);
        if (!before.ok) return before;
        const after = make(before.value.data);
        if (!after.ok) return after;
        if (after.value === before.value.data) return ok(undefined);
        const exchanged = await exchangeSettings(path, before.value, after.value);
        if (!exchanged.ok) return exchanged;
        if (exchanged.value) return ok(undefined);
      }
      return fail(fileProblem(path, "something else keeps changing it", "a try later on"));
    });
  };

  return { path, read, change, notes: () => [...notes] };
}

/** The content, a damaged file set aside. Only for who holds the lock. */
function soundContent(path: string, note: (text: string) => void): Result<SettingsContent, FileProblem> {
  const content = readSettingsData(path);
  if (content.ok) return content;
  const { problem, isDamaged } = content.problem;
  if (!isDamaged) return fail(problem);
  try {
    note(`${path}: ${problem.found}; it is kept as ${setAside(path)}, and new settings begin`);
    return ok({ text: undefined, data: {} });
  } catch (error) {
    return fail(systemProblem(error, path));
  }
}
