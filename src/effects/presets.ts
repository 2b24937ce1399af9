import { ok, type Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import { type FileProblem, fileProblemText } from "./file-problem.ts";
import { type OwnPreset, ownPresets, strangeRecordCount } from "./own-presets.ts";
import type { AppFolders } from "./paths.ts";
import { type PresetChanges, presetChanges } from "./preset-changes.ts";
import { tidyName } from "./preset-name.ts";
import { type PresetHead, presetHead } from "./preset-text.ts";
import { openSettings, type Settings } from "./settings.ts";
import { type ShippedPreset, shippedPresets, shippedText } from "./shipped-presets.ts";

export type PresetOrigin = "own" | "shipped";

/** A preset as it is listed. Texts are safe to show. */
export interface PresetEntry extends PresetHead {
  readonly name: string;
  readonly origin: PresetOrigin;
}

export interface Preset extends PresetEntry {
  /** Of a chain file or a stage preset, as it was saved. */
  readonly text: string;
  /** That files named in it are relative to; absolute. */
  readonly folder: string;
}

/**
 * Presets that came with the program, which are only read, and the user's own, which the settings hold. Each call looks
 * at the disk anew, since other copies of the program may be running.
 */
export interface Presets extends PresetChanges {
  /**
   * Shipped ones first, each sort in the order of names. No name stands there twice: where a later program brings one
   * along that the user has already, the user's own hides it until it is renamed.
   */
  readonly list: () => Promise<readonly PresetEntry[]>;
  readonly find: (name: string) => Promise<Result<Preset | undefined, FileProblem>>;
  /** What was found amiss so far, such as a damaged settings file that was set aside; each once, safe to show. */
  readonly notes: () => readonly string[];
}

export function openPresets(folders: Pick<AppFolders, "config" | "shipped">): Presets {
  const settings = openSettings(folders.config);
  const notes = new Set<string>();
  const own = () => ownOf(settings, notes);
  const shipped = () => shippedOf(folders.shipped, notes);
  return {
    ...presetChanges(settings, (name) => shipped().has(name)),
    list: async () => {
      const mine = await own();
      const theirs = [...shipped().values()].filter(({ name }) => !mine.has(name));
      return [...theirs.map(shippedEntry), ...[...mine.values()].sort(byName).map(ownEntry)];
    },
    find: async (given) => {
      const name = tidyName(given);
      const mine = (await own()).get(name);
      if (mine !== undefined) return ok({ ...ownEntry(mine), text: mine.text, folder: mine.folder });
      const theirs = shipped().get(name);
      if (theirs === undefined) return ok(undefined);
      const text = shippedText(theirs);
      return text.ok ? ok({ ...shippedEntry(theirs), text: text.value, folder: folders.shipped }) : text;
    },
    notes: () => [...settings.notes(), ...notes],
  };
}

async function ownOf(settings: Settings, notes: Set<string>): Promise<ReadonlyMap<string, OwnPreset>> {
  const data = await settings.read();
  const count = strangeRecordCount(data);
  const left = `${count} of the presets cannot be read and are left as they are`;
  if (count > 0) notes.add(plainText(`${settings.path}: ${left}`, 1000));
  return ownPresets(data);
}

function shippedOf(folder: string, notes: Set<string>): ReadonlyMap<string, ShippedPreset> {
  const found = shippedPresets(folder);
  if (found.ok) return found.value;
  notes.add(fileProblemText(found.problem));
  return new Map();
}

/** `channel 2` before `channel 10`. Made when it is wanted: the language data take longer to load than most commands. */
let collator: Intl.Collator | undefined;
function byName(one: OwnPreset, other: OwnPreset): number {
  collator ??= new Intl.Collator("en", { numeric: true });
  return collator.compare(one.name, other.name);
}

function ownEntry({ name, text }: OwnPreset): PresetEntry {
  return { ...(presetHead(text) ?? { type: "chain", title: "" }), name, origin: "own" };
}

function shippedEntry(preset: ShippedPreset): PresetEntry {
  const text = shippedText(preset);
  const head = text.ok ? presetHead(text.value) : undefined;
  return { title: "", ...head, type: preset.type, name: preset.name, origin: "shipped" };
}
