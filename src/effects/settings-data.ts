import { statSync } from "node:fs";
import { fail, ok, type Result } from "../core/result.ts";
import { type FileProblem, fileProblem } from "./file-problem.ts";
import { decoded, readRegularFile } from "./read-file.ts";

/** Everything in the settings file, by key. */
export type SettingsData = Readonly<Record<string, unknown>>;

/** What is in the way of reading the settings; a damaged file can be set aside, one that is denied cannot. */
export interface SettingsProblem {
  readonly problem: FileProblem;
  readonly isDamaged: boolean;
}

/** Settings as text and data; without a file no text and no data. */
export interface SettingsContent {
  readonly text: string | undefined;
  readonly data: SettingsData;
}

/** A hundred presets of the largest size. */
export const MAX_SETTINGS_BYTES = 100_000_000;

/** Reads the settings file. Never throws and makes nothing. */
export function readSettingsData(path: string): Result<SettingsContent, SettingsProblem> {
  if (!isThere(path)) return ok({ text: undefined, data: {} });
  const read = readRegularFile(path, MAX_SETTINGS_BYTES);
  if (!read.ok) return fail({ problem: read.problem, isDamaged: false });
  const text = decoded(read.value.bytes);
  const data = text === undefined ? undefined : settingsOf(text);
  if (data !== undefined) return ok({ text, data });
  const problem = fileProblem(path, "it does not hold settings", "a JSON object, as the program writes it");
  return fail({ problem, isDamaged: true });
}

/** Also where it cannot be looked at; reading then says why. */
function isThere(path: string): boolean {
  try {
    return statSync(path, { throwIfNoEntry: false }) !== undefined;
  } catch {
    return true;
  }
}

function settingsOf(text: string): SettingsData | undefined {
  try {
    const data: unknown = JSON.parse(text);
    // What is nested too deep to be written again counts as damaged.
    JSON.stringify(data);
    return isSettings(data) ? data : undefined;
  } catch {
    return undefined;
  }
}

function isSettings(data: unknown): data is SettingsData {
  if (typeof data !== "object" || data === null || Array.isArray(data)) return false;
  const { presets = [] } = data as SettingsData;
  return Array.isArray(presets);
}
