import { ok } from "../core/result.ts";
import type { Presets } from "../effects/presets.ts";
import type { PresetStore } from "./preset-store.ts";

/** The presets on the disk as the commands want them. */
export const presetStore = (presets: Presets): PresetStore => ({
  list: async () => ok(await presets.list()),
  find: (name) => presets.find(name),
  save: async (name, chainText, folder) => {
    // Whoever types the name of a preset again means it, as with the name of a file to write to.
    const saved = await presets.save(name, chainText, folder, { replace: true });
    return saved.ok ? ok(undefined) : saved;
  },
  remove: (name) => presets.remove(name),
  notes: () => presets.notes(),
});
