import { homedir } from "node:os";
import { dirname, join } from "node:path";
import { stagePresetText } from "../document/stage-preset.ts";
import type { ChainDocument, StageDocument } from "../document/types.ts";
import { chainText } from "../document/write.ts";
import type { Command, Message, SaveCommand } from "../editor/message.ts";
import type { EditorState, FileOrigin } from "../editor/state.ts";
import { type OpenedChain as ChainFile, openChainFile, saveChainFile } from "./chain-files.ts";
import type { ContextChain } from "./chain-text.ts";
import { designAll } from "./designing.ts";
import { fileContext, formulaParser } from "./document-context.ts";
import { isFileName } from "./file-name.ts";
import { type FileProblem, fileProblemText } from "./file-problem.ts";
import type { Journal } from "./journal.ts";
import { leftWorkOf, recoveredChain } from "./left-work.ts";
import { openChainPreset, openStagePreset } from "./preset-open.ts";
import type { Presets } from "./presets.ts";
import type { FileStamp } from "./stamp.ts";

/** What the editor's commands are carried out with. */
export interface Means {
  readonly presets: Presets;
  readonly journal: Journal;
  readonly state: () => EditorState;
  readonly dispatch: (message: Message) => void;
  /** Ends the workstation. */
  readonly quit: () => void;
}

/** Carries out one command; what comes of it goes back to the editor as messages. */
export async function perform(command: Command, means: Means): Promise<void> {
  const { dispatch } = means;
  switch (command.type) {
    case "load-formula":
      return loadFormula(command.again, means);
    case "open":
      return open(command.name, means);
    case "save":
      return save(command, means);
    case "list-presets":
      return dispatch({ type: "presets-listed", presets: await means.presets.list(), opens: false });
    case "look-at-preset":
      return lookAtPreset(command.name, means);
    case "take-preset":
      return takePreset(command.name, means);
    case "keep-chain":
      return keep(command, chainText(command.document, command.original), means);
    case "keep-stage":
      return keep(command, presetOfStage(command.stage), means);
    case "rename-preset":
      return changePresets(await means.presets.rename(command.name, command.newName), means);
    case "remove-preset":
      return changePresets(await means.presets.remove(command.name), means);
    case "recover":
      return recover(command.id, means);
    case "discard":
      means.journal.discard({ id: command.id });
      return offerLeftWork(means);
    case "design":
      return design(command, means);
    case "quit":
      return means.quit();
  }
}

async function design(command: Command & { type: "design" }, { state, dispatch }: Means): Promise<void> {
  const designed = await designAll(command, state().context);
  if (designed !== undefined) dispatch({ type: "designed", designed });
}

const refused = (problem: FileProblem): Message => ({
  type: "told",
  text: fileProblemText(problem),
  bad: true,
});

async function loadFormula(again: Message, { state, dispatch }: Means): Promise<void> {
  await formulaParser();
  dispatch({ type: "context-changed", context: fileContext(state().context.folder) });
  dispatch(again);
}

const homeExpanded = (path: string): string =>
  /^~(\/|$)/.test(path) ? join(homedir(), path.slice(1)) : path;

async function open(name: string, means: Means): Promise<void> {
  const path = homeExpanded(name);
  if (!isFileName(path)) return takePreset(name, means);
  const opened = await openChainFile(path);
  means.dispatch(opened.ok ? openedMessage(opened.value, name) : refused(opened.problem));
}

/** A chain for the editor; with a path and a stamp it has a file to be saved to. */
export function openedMessage(chain: ContextChain & Partial<ChainFile>, shownName: string): Message {
  return { type: "chain-opened", chain: { ...chain, file: originOf(chain), shownName } };
}

export const originOf = ({
  path,
  stamp,
  text,
  document,
}: ContextChain & Partial<ChainFile>): FileOrigin | undefined =>
  path === undefined ? undefined : { path, stamp, text, document };

async function save(command: SaveCommand, { dispatch }: Means): Promise<void> {
  const { document, original, overwrite, after } = command;
  const path = homeExpanded(command.path);
  const text = chainText(document, original);
  const stamp = original?.path === path ? (original.stamp as FileStamp) : undefined;
  const outcome = saveChainFile(path, text, stamp, { overwrite });
  if (outcome.type === "saved") {
    dispatch({ type: "saved", file: { path: outcome.path, text, document, stamp: outcome.stamp }, after });
  } else if (outcome.type === "changed") {
    dispatch({ type: "save-held", path, words: outcome.problem.found, after });
  } else dispatch(refused(outcome.problem));
}

async function lookAtPreset(name: string, { presets, dispatch }: Means): Promise<void> {
  const see = (problem: FileProblem) =>
    dispatch({ type: "preset-seen", name, look: { ok: false, words: fileProblemText(problem) } });
  const found = await presets.find(name);
  if (!found.ok) return see(found.problem);
  if (found.value === undefined) return;
  if (found.value.type === "chain") {
    const chain = await openChainPreset(found.value);
    if (!chain.ok) return see(chain.problem);
    return dispatch({
      type: "preset-seen",
      name,
      look: { ok: true, type: "chain", document: chain.value.document, context: chain.value.context },
    });
  }
  const stage = await openStagePreset(found.value);
  if (!stage.ok) return see(stage.problem);
  dispatch({
    type: "preset-seen",
    name,
    look: {
      ok: true,
      type: "stage",
      stage: stage.value.preset.stage,
      context: fileContext(found.value.folder),
    },
  });
}

async function takePreset(name: string, { presets, dispatch, state }: Means): Promise<void> {
  const found = await presets.find(name);
  if (!found.ok) return dispatch(refused(found.problem));
  if (found.value === undefined) {
    return dispatch({
      type: "told",
      text: `${name}: there is no file and no preset of that name`,
      bad: true,
    });
  }
  if (found.value.type === "chain") {
    const chain = await openChainPreset(found.value);
    return dispatch(chain.ok ? openedMessage(chain.value, `preset ${name}`) : refused(chain.problem));
  }
  const loaded = await openStagePreset(found.value);
  if (!loaded.ok) return dispatch(refused(loaded.problem));
  const { stage, caution } = loaded.value.preset;
  dispatch({
    type: "stage-taken",
    stage: caution === undefined || stage.caution !== undefined ? stage : { ...stage, caution },
    context: fileContext(state().context.folder),
  });
}

function presetOfStage(stage: StageDocument): string {
  return stagePresetText({ format: "halfpower-stage", version: 1, stage });
}

type Keep = Command & { readonly type: "keep-chain" | "keep-stage" };

async function keep(command: Keep, text: string, { presets, state, dispatch }: Means): Promise<void> {
  const { name, replace = false } = command;
  const isTaken = (await presets.list()).some((each) => each.origin === "own" && each.name === name.trim());
  if (isTaken && !replace)
    return dispatch({ type: "preset-held", name, command: { ...command, replace: true } });
  const saved = await presets.save(name, text, state().context.folder, { replace });
  dispatch(saved.ok ? { type: "told", text: `kept as preset ${name}`, bad: false } : refused(saved.problem));
}

async function changePresets(
  changed: Awaited<ReturnType<Presets["rename"]>>,
  { presets, dispatch }: Means,
): Promise<void> {
  dispatch({ type: "presets-listed", presets: await presets.list(), opens: true });
  if (!changed.ok) dispatch(refused(changed.problem));
}

/** Offers the latest unsaved work of programs that were ended, if there is any. */
export function offerLeftWork({ journal, dispatch }: Pick<Means, "journal" | "dispatch">): void {
  const [latest] = journal.leftBehind();
  if (latest !== undefined) dispatch({ type: "left-behind", work: leftWorkOf(latest) });
}

async function recover(id: string, { journal, dispatch }: Means): Promise<void> {
  const left = journal.leftBehind().find((each) => each.id === id);
  if (left === undefined) return dispatch({ type: "told", text: "that work is no longer there", bad: true });
  const chain = await recoveredChain(left);
  if (!chain.ok) return dispatch(refused(chain.problem));
  dispatch({ type: "chain-opened", chain: chain.value });
  // Only now: this copy's own journal holds it.
  journal.discard({ id });
}

/** The document as it would be saved, into the journal; nothing unsaved clears it. */
export function journalled(state: EditorState, saved: ChainDocument | undefined, journal: Journal): void {
  if (state.document === saved) {
    journal.clear();
    return;
  }
  const { file, document, context, resolved } = state;
  journal.record({
    text: chainText(document, file),
    title: resolved.title || "untitled chain",
    folder: file === undefined ? context.folder : dirname(file.path),
    ...(file === undefined ? {} : { path: file.path, stamp: file.stamp as FileStamp }),
  });
}
