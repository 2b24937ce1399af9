import type { ChainDocument } from "../document/types.ts";

/** A step that can be undone: what it was called, and the document before it. */
export interface Step {
  readonly name: string;
  readonly document: ChainDocument;
}

export interface History {
  readonly past: readonly Step[];
  readonly future: readonly Step[];
}

export const NO_HISTORY: History = { past: [], future: [] };

/** Steps kept; the oldest are dropped beyond that. */
const MOST_STEPS = 2000;

/** Remembers the document before a change. A new change forgets what had been undone. */
export function remember(history: History, name: string, before: ChainDocument): History {
  return { past: [...history.past.slice(1 - MOST_STEPS), { name, document: before }], future: [] };
}

/** One step back: the document before it, and the history from there; undefined when there is none. */
export function stepBack(
  { past, future }: History,
  now: ChainDocument,
): { readonly step: Step; readonly history: History } | undefined {
  const step = past.at(-1);
  if (step === undefined) return undefined;
  return {
    step,
    history: { past: past.slice(0, -1), future: [...future, { name: step.name, document: now }] },
  };
}

export function stepForward(
  { past, future }: History,
  now: ChainDocument,
): { readonly step: Step; readonly history: History } | undefined {
  const step = future.at(-1);
  if (step === undefined) return undefined;
  return {
    step,
    history: { past: [...past, { name: step.name, document: now }], future: future.slice(0, -1) },
  };
}
