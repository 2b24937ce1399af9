import type { ChainDocument } from "../document/types.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { Field } from "./rows.ts";
import type { History } from "./history.ts";
import { NO_HISTORY } from "./history.ts";
import type { TextField } from "./text-field.ts";

/** Everything the workstation knows. Curves and readings are worked out from it, never kept in it. */
export interface EditorState {
  /** The chain as it stands: always one that resolves. */
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  readonly history: History;
  /** The document as it was last read or written; unsaved work is there when it is another one. */
  readonly saved: ChainDocument;
  readonly file: FileOrigin | undefined;
  /** Row of the chain list, and the field in it that is in hand, if any. */
  readonly row: number;
  readonly field: number | undefined;
  readonly cursorHz: number;
  readonly pinHz: number | undefined;
  readonly window: Window;
  readonly dialog: Dialog | undefined;
  readonly notice: Notice | undefined;
  readonly size: Size;
}

/** Where the chain came from: a file that it is saved to, with its text as read. */
export interface FileOrigin {
  readonly path: string;
  readonly text: string;
  readonly document: ChainDocument;
  /** What the disk held when it was read or written; the file effects know what it means. */
  readonly stamp: unknown;
}

/** Frequencies shown. */
export interface Window {
  readonly fromHz: number;
  readonly toHz: number;
}

export interface Size {
  readonly columns: number;
  readonly rows: number;
}

export interface Notice {
  readonly text: string;
  readonly bad: boolean;
}

export type Dialog = FieldDialog | PromptDialog | ListDialog | QuestionDialog | HelpDialog;

/** A field being typed over, in place. */
export interface FieldDialog {
  readonly type: "field";
  readonly field: Field;
  readonly input: TextField;
  readonly problem: string | undefined;
  /** The document to come back to. */
  readonly before: ChainDocument;
}

export type PromptPurpose = "frequency" | "level" | "open" | "save-as" | "rename" | "stage-preset" | "chain-preset";

export interface PromptDialog {
  readonly type: "prompt";
  readonly purpose: PromptPurpose;
  readonly label: string;
  readonly input: TextField;
  readonly problem: string | undefined;
}

export interface ListItem {
  readonly value: string;
  readonly label: string;
  readonly detail: string;
  readonly group: string;
}

export interface ListDialog {
  readonly type: "list";
  readonly purpose: "add" | "presets";
  readonly title: string;
  readonly items: readonly ListItem[];
  readonly index: number;
  readonly filter: TextField;
}

export interface QuestionDialog {
  readonly type: "question";
  readonly text: string;
  readonly answers: readonly Answer[];
}

/** An answer's key, its words, and what it does. */
export interface Answer {
  readonly key: string;
  readonly words: string;
  readonly then: AnswerAction;
}

export type AnswerAction =
  | { readonly type: "nothing" }
  | { readonly type: "save-then"; readonly after: AfterSave }
  | { readonly type: "drop-then"; readonly after: AfterSave }
  | { readonly type: "overwrite"; readonly path: string; readonly after: AfterSave | undefined }
  | { readonly type: "recover"; readonly id: string; readonly document: ChainDocument; readonly path: string | undefined }
  | { readonly type: "discard"; readonly id: string }
  | { readonly type: "remove-preset"; readonly name: string };

/** What was asked for when unsaved work stood in the way. */
export type AfterSave =
  | { readonly type: "quit" }
  | { readonly type: "open"; readonly name: string };

export interface HelpDialog {
  readonly type: "help";
  readonly scroll: number;
}

export interface StartOptions {
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  readonly file: FileOrigin | undefined;
  readonly size: Size;
}

/** The state on opening a chain. */
export function openedState({ document, resolved, file, size }: StartOptions): EditorState {
  const { fromHz, toHz } = resolved.sweep;
  return {
    document,
    resolved,
    history: NO_HISTORY,
    saved: document,
    file,
    row: document.stages.length > 0 ? 2 : 0,
    field: undefined,
    cursorHz: startingCursor(fromHz, toHz, resolved.converter?.bandHz),
    pinHz: undefined,
    window: { fromHz, toHz },
    dialog: undefined,
    notice: undefined,
    size,
  };
}

/** The edge of the band of interest where there is one, else the middle of the sweep. */
function startingCursor(fromHz: number, toHz: number, bandHz: number | undefined): number {
  if (bandHz !== undefined && bandHz >= fromHz && bandHz <= toHz) return bandHz;
  return Math.sqrt(fromHz * toHz);
}

export const isUnsaved = (state: EditorState): boolean => state.document !== state.saved;
