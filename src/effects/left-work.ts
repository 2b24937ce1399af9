import { ok, type Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import type { LeftWork, OpenedChain } from "../editor/message.ts";
import { openChainFile } from "./chain-files.ts";
import { chainFromText } from "./chain-text.ts";
import type { FileProblem } from "./file-problem.ts";
import type { LeftBehind } from "./left-behind.ts";

/** Unsaved work as it is offered. */
export function leftWorkOf({ id, title, timeMs, path }: LeftBehind): LeftWork {
  const name = path === undefined ? title : `${title} (${path})`;
  return { id, title: plainText(name, 200), when: whenWords(new Date(timeMs), new Date()) };
}

/** `today at 14:05`, or the date in the form of ISO 8601. */
export function whenWords(then: Date, now: Date): string {
  const two = (value: number) => String(value).padStart(2, "0");
  const time = `${two(then.getHours())}:${two(then.getMinutes())}`;
  if (then.toDateString() === now.toDateString()) return `today at ${time}`;
  return `on ${then.getFullYear()}-${two(then.getMonth() + 1)}-${two(then.getDate())} at ${time}`;
}

/** The work as a chain to go on with: unsaved against its file, if that is still there. */
export async function recoveredChain(left: LeftBehind): Promise<Result<OpenedChain, FileProblem>> {
  const chain = await chainFromText(left.text, "unsaved work", left.folder ?? process.cwd());
  if (!chain.ok) return chain;
  const { document, resolved, context } = chain.value;
  const shared = { document, resolved, context, isRecovered: true, shownName: plainText(left.title, 200) };
  if (left.path === undefined) return ok({ ...shared, file: undefined });
  const disk = await openChainFile(left.path);
  // Without the file as it was the stamp it began from makes saving ask.
  const file = {
    path: left.path,
    text: disk.ok ? disk.value.text : left.text,
    document: disk.ok ? disk.value.document : document,
    stamp: left.stamp,
  };
  return ok({ ...shared, file, saved: undefined });
}
