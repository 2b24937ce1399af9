import { isAbsolute } from "node:path";
import { presetName } from "./preset-name.ts";
import type { SettingsData } from "./settings-data.ts";

export const MAX_OWN_PRESETS = 1000;
export const MAX_PRESET_BYTES = 1_000_000;

/** A preset of the user's as the settings hold it, its text as it was saved. */
export interface OwnPreset {
  readonly name: string;
  readonly text: string;
  /** That files named in the text are relative to; absolute. */
  readonly folder: string;
}

/** What the settings have under "presets", in the order in which they were saved. */
export const presetRecords = ({ presets }: SettingsData): readonly unknown[] =>
  Array.isArray(presets) ? presets : [];

/** The user's presets; of two with one name, which only another program can have written, the first. */
export function ownPresets(data: SettingsData): ReadonlyMap<string, OwnPreset> {
  const byName = new Map<string, OwnPreset>();
  for (const record of presetRecords(data)) {
    if (isOwnPreset(record) && !byName.has(record.name)) byName.set(record.name, record);
  }
  return byName;
}

/** How many records are no presets. They are left as they are. */
export const strangeRecordCount = (data: SettingsData): number =>
  presetRecords(data).filter((record) => !isOwnPreset(record)).length;

/** The settings with a preset in the place of the one of that name, or at the end. */
export function withPreset(data: SettingsData, preset: OwnPreset): SettingsData {
  const isKnown = ownPresets(data).has(preset.name);
  return isKnown
    ? replaced(data, preset.name, [preset])
    : { ...data, presets: [...presetRecords(data), preset] };
}

export const withoutPreset = (data: SettingsData, name: string): SettingsData => replaced(data, name, []);

export function withPresetRenamed(data: SettingsData, from: string, to: string): SettingsData {
  const preset = ownPresets(data).get(from);
  return preset === undefined ? data : replaced(data, from, [{ ...preset, name: to }]);
}

const replaced = (data: SettingsData, name: string, instead: readonly OwnPreset[]): SettingsData => ({
  ...data,
  presets: presetRecords(data).flatMap((record): readonly unknown[] =>
    isOwnPreset(record) && record.name === name ? instead : [record],
  ),
});

function isOwnPreset(record: unknown): record is OwnPreset {
  if (typeof record !== "object" || record === null) return false;
  const { name, text, folder } = record as Partial<Record<keyof OwnPreset, unknown>>;
  if (typeof name !== "string" || typeof text !== "string" || typeof folder !== "string") return false;
  const tidy = presetName(name);
  return tidy.ok && tidy.value === name && fitsPreset(text) && isAbsolute(folder);
}

export const fitsPreset = (text: string): boolean => Buffer.byteLength(text) <= MAX_PRESET_BYTES;
