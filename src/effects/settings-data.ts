import { statSync } from "node:fs";
import { ok, type Result } from "../core/result.ts";
import { type FileProblem, fileProblem } from "./file-problem.ts";
import { bytesText, readTextFile } from "./read-file.ts";

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

const MAX_SETTINGS_BYTES = 100_000_000;
export const SETTINGS_TOO_LARGE = `settings and presets of at most ${bytesText(MAX_SETTINGS_BYTES)}`;
export const fitsSettings = (text: string): boolean => Buffer.byteLength(text) <= MAX_SETTINGS_BYTES;

/** Reads the settings file. Never throws and makes nothing. */
export function readSettingsData(path: string): Result<SettingsContent, SettingsProblem> {
  const kind = kindOf(path);
  if (kind === "none") return ok({ text: undefined, data: {} });
  const read = readTextFile(path, MAX_SETTINGS_BYTES);
  if (!read.ok) return { ok: false, problem: { problem: read.problem, isDamaged: kind !== "unknown" && isFault(read.problem) } };
  const data = objectOf(read.value.text);
  if (data !== undefined) return ok({ text: read.value.text, data });
  const problem = fileProblem(path, "it does not hold settings", "a JSON object, as the program writes it");
  return { ok: false, problem: { problem, isDamaged: true } };
}
