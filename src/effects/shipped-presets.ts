import { readdirSync } from "node:fs";
import { join } from "node:path";
import type { Result } from "../core/result.ts";
import { type FileProblem, systemProblem } from "./file-problem.ts";
import { MAX_PRESET_BYTES } from "./own-presets.ts";
import type { PresetType } from "./preset-text.ts";
import { readTextFile } from "./read-file.ts";

/** A file that came with the program, as `strain-bridge.chain.json`. */
export interface ShippedPreset {
  readonly name: string;
  readonly type: PresetType;
  readonly path: string;
}

const FILE_NAME = /^(.+)\.(chain|stage)\.json$/;

/** By name. A name is only ever looked up here, so that none can lead to another file. */
export function shippedPresets(folder: string): Result<ReadonlyMap<string, ShippedPreset>, FileProblem> {
  let fileNames: readonly string[];
  try {
    fileNames = readdirSync(folder).sort();
  } catch (error) {
    return { ok: false, problem: systemProblem(error, folder) };
  }
  const byName = new Map<string, ShippedPreset>();
  for (const fileName of fileNames) {
    const [, name, type] = FILE_NAME.exec(fileName) ?? [];
    if (name === undefined || byName.has(name)) continue;
    byName.set(name, { name, type: type as PresetType, path: join(folder, fileName) });
  }
  return { ok: true, value: byName };
}

export function shippedText({ path }: ShippedPreset): Result<string, FileProblem> {
  const read = readTextFile(path, MAX_PRESET_BYTES);
  return read.ok ? { ok: true, value: read.value.text } : read;
}
