import { fail, ok, type Result } from "../core/result.ts";
import { type LoadedChain, readChainText } from "../document/read.ts";
import { documentContext, type FileContext } from "./document-context.ts";
import { contentProblem, type FileProblem } from "./file-problem.ts";

/** A chain with the context that it was resolved in. */
export interface ContextChain extends LoadedChain {
  readonly context: FileContext;
}

/** Reads a chain's text; tables are looked for in `folder`, `shownName` is for messages. */
export async function chainFromText(
  text: string,
  shownName: string,
  folder: string,
): Promise<Result<ContextChain, FileProblem>> {
  const context = await documentContext(folder, text);
  const read = readChainText(text, shownName, context);
  return read.ok ? ok({ ...read.value, context }) : fail(contentProblem(read.problem, shownName));
}
