import type { FamilyAnswer } from "../core/design/figures.ts";
import type { Realisation } from "../core/design/realise/types.ts";
import type { FilterSpec } from "../core/filters/transform.ts";
import type { Result } from "../core/result.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { ChainDocument, StageDocument } from "../document/types.ts";
import type { DesignRequest } from "./design-form.ts";
import type { AfterSave, Look } from "./dialog.ts";
import type { KeyPress } from "./key-press.ts";
import type { EditorContext, EditorState, FileOrigin, Judged, Size } from "./state.ts";

/** What happened: a key, or the outcome of something that was asked for. */
export type Message =
  | { readonly type: "key"; readonly key: KeyPress }
  | { readonly type: "resized"; readonly size: Size }
  | { readonly type: "kind-chosen"; readonly kind: string }
  | { readonly type: "context-changed"; readonly context: EditorContext }
  | { readonly type: "chain-opened"; readonly chain: OpenedChain }
  | { readonly type: "stage-taken"; readonly stage: StageDocument; readonly context: EditorContext }
  | { readonly type: "saved"; readonly file: FileOrigin; readonly after: AfterSave | undefined }
  | {
      /** The file on disk is not the one that was read. */
      readonly type: "save-held";
      readonly path: string;
      readonly words: string;
      readonly after: AfterSave | undefined;
    }
  | {
      readonly type: "presets-listed";
      readonly presets: readonly PresetLine[];
      /** Whether the list is shown also where it is not open: after one of them was renamed or removed. */
      readonly opens: boolean;
    }
  | { readonly type: "preset-seen"; readonly name: string; readonly look: PresetLook }
  | { readonly type: "left-behind"; readonly work: LeftWork }
  | { readonly type: "designed"; readonly designed: Designed }
  | { readonly type: "judged"; readonly judged: Judged }
  | { readonly type: "preset-held"; readonly name: string; readonly command: KeepCommand }
  | { readonly type: "told"; readonly text: string; readonly bad: boolean };

export interface OpenedChain {
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  readonly context: EditorContext;
  /** Absent for a preset: it is saved under a new name. */
  readonly file: FileOrigin | undefined;
  /** The document that is on the disk, where it is another one: work that was taken up again. */
  readonly saved?: ChainDocument | undefined;
  readonly isRecovered?: boolean;
  readonly shownName: string;
}

export interface PresetLine {
  readonly name: string;
  readonly origin: "own" | "shipped";
  readonly type: "chain" | "stage";
  readonly title: string;
}

/** A preset looked at before it is taken: its chain, or its stage alone behind an ideal source. */
export type PresetLook =
  | {
      readonly ok: true;
      readonly type: "chain";
      readonly document: ChainDocument;
      readonly context: EditorContext;
    }
  | {
      readonly ok: true;
      readonly type: "stage";
      readonly stage: StageDocument;
      readonly context: EditorContext;
    }
  | { readonly ok: false; readonly words: string };

/** The answer to a design request. */
export interface Designed {
  readonly id: number;
  readonly families: readonly FamilyAnswer[];
  /** The family in hand, made of what was asked for. */
  readonly chosen: Chosen;
  readonly look: Look | undefined;
}

export type Chosen = Result<{ readonly spec: FilterSpec; readonly realisation: Realisation | undefined }>;

/** Work that an ended program left unsaved. */
export interface LeftWork {
  readonly id: string;
  readonly title: string;
  /** In words, as in `today at 14:05`. */
  readonly when: string;
}

/** What the editor wants done outside of it; the outcome comes back as a message. */
export type Command =
  | { readonly type: "load-formula"; readonly again: Message }
  | { readonly type: "open"; readonly name: string }
  | SaveCommand
  | { readonly type: "list-presets" }
  | { readonly type: "look-at-preset"; readonly name: string }
  | { readonly type: "take-preset"; readonly name: string }
  | KeepCommand
  | { readonly type: "rename-preset"; readonly name: string; readonly newName: string }
  | { readonly type: "remove-preset"; readonly name: string }
  | { readonly type: "recover"; readonly id: string }
  | { readonly type: "discard"; readonly id: string }
  | {
      readonly type: "design";
      readonly id: number;
      readonly request: DesignRequest;
      /** Position of the family that is to be made. */
      readonly family: number;
    }
  | { readonly type: "quit" };

/** Keeps a preset under a name; one of that name is replaced only on request. */
export type KeepCommand = { readonly name: string; readonly replace?: boolean } & (
  | {
      readonly type: "keep-chain";
      readonly document: ChainDocument;
      readonly original: FileOrigin | undefined;
    }
  | { readonly type: "keep-stage"; readonly stage: StageDocument }
);

export interface SaveCommand {
  readonly type: "save";
  readonly path: string;
  readonly document: ChainDocument;
  /** The file that it was read from, for writing it back as it was written. */
  readonly original: FileOrigin | undefined;
  readonly overwrite: boolean;
  readonly after: AfterSave | undefined;
}

/** The state after a message, and what is to be done. */
export interface Step {
  readonly state: EditorState;
  readonly commands: readonly Command[];
}

export const step = (state: EditorState, ...commands: readonly Command[]): Step => ({ state, commands });

export const told = (state: EditorState, text: string, bad = false): Step =>
  step({ ...state, notice: { text, bad } });
