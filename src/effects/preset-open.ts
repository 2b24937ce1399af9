import { fail, ok, type Result } from "../core/result.ts";
import { type LoadedStagePreset, readStagePresetText } from "../document/stage-preset.ts";
import { type ContextChain, chainFromText } from "./chain-text.ts";
import { documentContext } from "./document-context.ts";
import { contentProblem, type FileProblem } from "./file-problem.ts";
import type { Preset } from "./presets.ts";

type Source = Pick<Preset, "name" | "text" | "folder">;

/** The chain that a preset holds, checked like that of a file. */
export const openChainPreset = ({ name, text, folder }: Source): Promise<Result<ContextChain, FileProblem>> =>
  chainFromText(text, `preset ${name}`, folder);

/** The stage that a preset holds, checked and resolved. */
export async function openStagePreset({
  name,
  text,
  folder,
}: Source): Promise<Result<LoadedStagePreset, FileProblem>> {
  const shownName = `preset ${name}`;
  const stage = readStagePresetText(text, shownName, await documentContext(folder, text));
  return stage.ok ? ok(stage.value) : fail(contentProblem(stage.problem, shownName));
}
