import { fail, ok, type Result } from "../core/result.ts";
import { quoted } from "../core/text.ts";
import { nearNames, orList } from "../document/words.ts";
import { type FileProblem, fileProblem } from "../effects/file-problem.ts";
import type { FoundPreset, PresetStore } from "./preset-store.ts";

/** The preset of that name, or what names there are that are near to it; `otherwise` is what else would do. */
export async function presetNamed(
  name: string,
  store: PresetStore,
  place: string,
  otherwise: string,
): Promise<Result<FoundPreset, FileProblem>> {
  const found = await store.find(name);
  if (!found.ok) return found;
  if (found.value !== undefined) return ok(found.value);
  const listed = await store.list();
  const near = listed.ok
    ? nearNames(
        name,
        listed.value.map((preset) => preset.name),
      )
    : [];
  const allowed = near.length > 0 ? `for example ${orList(near)}` : otherwise;
  return fail(fileProblem(place, `there is no preset ${quoted(name)}`, allowed));
}
