import type { Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import { MAX_CHAIN_BYTES, openChainFile } from "../effects/chain-files.ts";
import { type ContextChain, chainFromText } from "../effects/chain-text.ts";
import { isFileName } from "../effects/file-name.ts";
import { type FileProblem, refuseFile } from "../effects/file-problem.ts";
import type { FileStamp } from "../effects/stamp.ts";
import { readStandardInput } from "../effects/standard-input.ts";
import type { Session } from "./io.ts";
import type { PresetStore } from "./preset-store.ts";
import { presetNamed } from "./unknown-preset.ts";

/** A chain that was named on the command line. */
export interface NamedChain extends ContextChain {
  /** For messages, safe to show: the file as it was typed, `standard input`, or the preset. */
  readonly shownName: string;
  /** Of a chain that came from a file. */
  readonly path?: string;
  readonly stamp?: FileStamp;
}

const MOST_NAME = 300;

type Named = Result<NamedChain, FileProblem>;

/**
 * Opens what CHAIN stands for: `-` is standard input, a word with a slash or with `.json` at its end is a file, and so
 * is any other that exists; what is left is the name of a preset.
 */
export async function openChain(argument: string, { io }: Session): Promise<Named> {
  if (argument === "-") return fromInput(io);
  if (io.presets === undefined || isFileName(argument)) return named(await openChainFile(argument), argument);
  return fromPreset(argument, io.presets);
}

async function fromInput({ stdin }: Session["io"]): Promise<Named> {
  const shownName = "standard input";
  const text = await readStandardInput(MAX_CHAIN_BYTES, stdin);
  return text.ok ? named(await chainFromText(text.value, shownName, process.cwd()), shownName) : text;
}

async function fromPreset(name: string, store: PresetStore): Promise<Named> {
  const found = await presetNamed(
    name,
    store,
    "CHAIN",
    "a chain file, - for standard input, or a preset's name",
  );
  if (!found.ok) return found;
  const shownName = `preset ${name}`;
  if (found.value.type === "stage") {
    return refuseFile(
      shownName,
      "it is a stage, not a chain",
      "the preset of a chain, or a stage within a chain",
    );
  }
  return named(await chainFromText(found.value.text, shownName, found.value.folder), shownName);
}

const named = (chain: Result<ContextChain, FileProblem>, shownName: string): Named =>
  chain.ok ? { ok: true, value: { ...chain.value, shownName: plainText(shownName, MOST_NAME) } } : chain;
