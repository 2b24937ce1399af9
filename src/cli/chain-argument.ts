import { existsSync } from "node:fs";
import type { Result } from "../core/result.ts";
import { MAX_CHAIN_BYTES, openChainFile } from "../effects/chain-files.ts";
import { type ContextChain, chainFromText } from "../effects/chain-text.ts";
import type { FileProblem } from "../effects/file-problem.ts";
import { readStandardInput } from "../effects/standard-input.ts";
import type { Session } from "./io.ts";

/** A chain that was named on the command line. */
export interface NamedChain extends ContextChain {
  /** For messages: the file as it was typed, `standard input`, or the preset. */
  readonly shownName: string;
}

type Named = Result<NamedChain, FileProblem>;

/**
 * Opens what CHAIN stands for: `-` is standard input, a word with a slash or with `.json` at its end is a file, and so
 * is any other that exists; what is left is the name of a preset.
 */
export async function openChain(argument: string, { io }: Session): Promise<Named> {
  if (argument === "-") return fromInput(io);
  return fromFile(argument);
}

async function fromInput({ stdin }: Session["io"]): Promise<Named> {
  const shownName = "standard input";
  const text = await readStandardInput(MAX_CHAIN_BYTES, stdin);
  return text.ok ? named(await chainFromText(text.value, shownName, process.cwd()), shownName) : text;
}

async function fromFile(path: string): Promise<Named> {
  return named(await openChainFile(path), path);
}

const named = (chain: Result<ContextChain, FileProblem>, shownName: string): Named =>
  chain.ok ? { ok: true, value: { ...chain.value, shownName } } : chain;

export const isPath = (argument: string): boolean =>
  argument.includes("/") || argument.endsWith(".json") || existsSync(argument);
