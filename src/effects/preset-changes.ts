import { fail, ok, type Result } from "../core/result.ts";
import { quoted } from "../core/text.ts";
import { type FileProblem, fileProblem, refuseFile } from "./file-problem.ts";
import {
  fitsPreset,
  MAX_OWN_PRESETS,
  MAX_PRESET_BYTES,
  ownPresets,
  presetRecords,
  withoutPreset,
  withPreset,
  withPresetRenamed,
} from "./own-presets.ts";
import { presetName, tidyName } from "./preset-name.ts";
import { presetHead } from "./preset-text.ts";
import { bytesText } from "./read-file.ts";
import type { Settings } from "./settings.ts";
import type { SettingsData } from "./settings-data.ts";

export interface SavePresetOptions {
  /** Whether one of the user's with that name may be replaced. */
  readonly replace?: boolean;
}

export type SaveEffect = "added" | "replaced";

type Answer<T> = Promise<Result<T, FileProblem>>;

/** What can be done to the user's presets; those that came with the program stay as they are. */
export interface PresetChanges {
  /**
   * Keeps the text of a chain or of a stage preset; which of the two is told by its "format". Files named in it are
   * relative to `folder`, which is absolute.
   */
  readonly save: (
    name: string,
    text: string,
    folder: string,
    options?: SavePresetOptions,
  ) => Answer<SaveEffect>;
  readonly rename: (from: string, to: string) => Answer<void>;
  readonly remove: (name: string) => Answer<void>;
}

export function presetChanges(settings: Settings, isShipped: (name: string) => boolean): PresetChanges {
  /** A name that is none of the shipped ones, so that there is never a doubt which of two is meant. */
  const freeName = (given: string): Result<string, FileProblem> => {
    const name = presetName(given);
    if (!name.ok || !isShipped(name.value)) return name;
    return refuseFile(place(name.value), "a preset of that name came with the program", "another name");
  };

  const changeOwn = (name: string, change: (data: SettingsData) => Result<SettingsData, FileProblem>) =>
    settings.change((data) =>
      ownPresets(data).has(name) ? change(data) : fail(notOwn(name, isShipped(name))),
    );

  return {
    save: async (given, text, folder, { replace = false } = {}) => {
      const name = freeName(given);
      if (!name.ok) return name;
      const unfit = textProblem(name.value, text);
      if (unfit !== undefined) return fail(unfit);
      let effect: SaveEffect = "added";
      const changed = await settings.change((data) => {
        effect = ownPresets(data).has(name.value) ? "replaced" : "added";
        if (effect === "replaced" && !replace) return fail(taken(name.value));
        if (effect === "added" && presetRecords(data).length >= MAX_OWN_PRESETS) return fail(TOO_MANY);
        return ok(withPreset(data, { name: name.value, text, folder }));
      });
      return changed.ok ? ok(effect) : changed;
    },
    rename: async (given, wanted) => {
      const from = tidyName(given);
      const to = freeName(wanted);
      if (!to.ok) return to;
      return changeOwn(from, (data) => {
        if (to.value === from) return ok(data);
        if (ownPresets(data).has(to.value)) return fail(taken(to.value));
        return ok(withPresetRenamed(data, from, to.value));
      });
    },
    remove: async (given) => {
      const name = tidyName(given);
      return changeOwn(name, (data) => ok(withoutPreset(data, name)));
    },
  };
}

function textProblem(name: string, text: string): FileProblem | undefined {
  const most = bytesText(MAX_PRESET_BYTES);
  if (!fitsPreset(text))
    return fileProblem(place(name), `the text is larger than ${most}`, `at most ${most}`);
  if (presetHead(text) !== undefined) return undefined;
  return fileProblem(place(name), "the text is no preset", "the text of a chain or of a stage preset");
}

const place = (name: string): string => `preset ${quoted(name)}`;

const taken = (name: string): FileProblem =>
  fileProblem(
    place(name),
    "there is a preset of that name already",
    "replacing it on request, or another name",
  );

const notOwn = (name: string, isShipped: boolean): FileProblem =>
  fileProblem(
    place(name),
    isShipped ? "it came with the program and stays as it is" : "there is no preset of that name",
    "a preset of your own",
  );

const TOO_MANY = fileProblem(
  "presets",
  `there are ${MAX_OWN_PRESETS} of your own already`,
  `at most ${MAX_OWN_PRESETS}`,
);
