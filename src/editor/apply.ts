import { fail, ok, type Result } from "../core/result.ts";
import { needsFormulaParser } from "../document/formula-text.ts";
import { type DocumentProblem, pathText, problemText } from "../document/problem.ts";
import { type ResolvedChain, resolveChain } from "../document/resolve.ts";
import type { ChainDocument } from "../document/types.ts";
import { remember } from "./history.ts";
import type { Message, Step } from "./message.ts";
import { step } from "./message.ts";
import { rowsOf } from "./rows.ts";
import type { EditorState } from "./state.ts";

/** The document resolved with the state's own context. */
export const resolvedIn = (
  { context }: EditorState,
  document: ChainDocument,
): Result<ResolvedChain, DocumentProblem> => resolveChain(document, context);

/** Whether the reader of formulas has to be loaded before the document can be resolved. */
export const lacksFormulas = ({ context }: EditorState, document: ChainDocument): boolean =>
  context.formula === undefined && needsFormulaParser(JSON.stringify(document.stages));

/** The state with another document in the place of its own, or what is wrong with that. Nothing is remembered. */
export function replaced(state: EditorState, document: ChainDocument): Result<EditorState, DocumentProblem> {
  const resolved = resolvedIn(state, document);
  if (!resolved.ok) return fail(resolved.problem);
  return ok(
    settled({ ...state, document, resolved: resolved.value, window: windowAfter(state, resolved.value) }),
  );
}

/**
 * One change as a step that can be undone under its name. A document that does not resolve changes nothing and is
 * told; `again` is the message that led here, for when formulas have to be loaded first.
 */
export function changed(state: EditorState, name: string, document: ChainDocument, again?: Message): Step {
  if (again !== undefined && lacksFormulas(state, document)) {
    return step(state, { type: "load-formula", again: again });
  }
  const after = replaced(state, document);
  if (!after.ok) return step({ ...state, notice: { text: problemText(after.problem), bad: true } });
  return step(remembered(after.value, name, state.document));
}

/** Remembers the document before a change that has been made already. */
export function remembered(state: EditorState, name: string, before: ChainDocument): EditorState {
  return { ...state, history: remember(state.history, name, before), notice: { text: name, bad: false } };
}

/** The row in hand kept within the chain, and the chain itself in front of what is kept behind it. */
function settled(state: EditorState): EditorState {
  const rows = rowsOf(state.document).length;
  const ghost = state.ghost === undefined ? undefined : { ...state.ghost, inFront: false };
  return { ...state, ghost, row: Math.max(0, Math.min(rows - 1, state.row)) };
}

/** What is wrong, for a value that stands at `path` itself, without naming the place again. */
export function wordsAt(problem: DocumentProblem, path: DocumentProblem["path"]): string {
  const here = pathText(problem.path) === pathText(path);
  return here ? `${problem.found}; allowed is ${problem.allowed}` : problemText(problem);
}

/** Where the whole sweep was shown the window goes with an edit of it. */
function windowAfter({ window, resolved }: EditorState, after: ResolvedChain): EditorState["window"] {
  const { fromHz, toHz } = resolved.sweep;
  const showedAll = window.fromHz === fromHz && window.toHz === toHz;
  return showedAll ? { fromHz: after.sweep.fromHz, toHz: after.sweep.toHz } : window;
}
