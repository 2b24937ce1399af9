import type { FamilyAnswer } from "../core/design/figures.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { ChainDocument } from "../document/types.ts";
import type { DesignForm } from "./design-form.ts";
import type { Chosen, KeepCommand } from "./message.ts";
import type { Field } from "./rows.ts";
import type { TextField } from "./text-field.ts";

/** What stands in front of the chain and takes the keys. */
export type Dialog = FieldDialog | PromptDialog | ListDialog | DesignDialog | QuestionDialog | HelpDialog;

/** A value being typed over, in place. */
export interface FieldDialog {
  readonly type: "field";
  readonly field: Field;
  readonly input: TextField;
  /** What is still missing before the text can be a value. */
  readonly problem: string | undefined;
  /** The document to come back to. */
  readonly before: ChainDocument;
  /** Whether `field` is the tolerance of the value in hand. */
  readonly isTolerance: boolean;
}

export type PromptPurpose =
  | { readonly type: "frequency" }
  | { readonly type: "level" }
  | { readonly type: "solve" }
  | { readonly type: "gain-axis" }
  | { readonly type: "open" }
  | { readonly type: "save-as"; readonly after: AfterSave | undefined }
  | { readonly type: "rename" }
  | { readonly type: "file-of"; readonly kind: string }
  | { readonly type: "keep-stage" }
  | { readonly type: "keep-chain" }
  | { readonly type: "rename-preset"; readonly name: string };

/** One line asked for at the foot of the screen. */
export interface PromptDialog {
  readonly type: "prompt";
  readonly purpose: PromptPurpose;
  readonly label: string;
  readonly input: TextField;
  readonly problem: string | undefined;
}

export type ListPurpose = "add" | "presets" | "go-to" | "nudge" | "overlays";

export interface ListItem {
  /** Unlike that of every other item. */
  readonly value: string;
  readonly label: string;
  readonly detail: string;
  readonly group: string;
  readonly freqHz?: number;
}

/** A list in the place of the chain, narrowed down by typing. */
export interface ListDialog {
  readonly type: "list";
  readonly purpose: ListPurpose;
  readonly title: string;
  readonly items: readonly ListItem[];
  /** Position among the items that fit what was typed. */
  readonly index: number;
  readonly filter: TextField;
  /** The response of the item in hand, by its value, once it is known. */
  readonly look: Look | undefined;
}

/** What a filter has to do, and the families that do it. */
export interface DesignDialog {
  readonly type: "design";
  readonly form: DesignForm;
  /** Row in hand: those of the form first, then the families. */
  readonly index: number;
  readonly input: TextField;
  readonly problem: string | undefined;
  readonly families: readonly FamilyAnswer[];
  readonly chosen: Chosen | undefined;
  readonly look: Look | undefined;
  /** Number of the request that is waited for. */
  readonly request: number;
}

export interface Look {
  readonly value: string;
  readonly resolved: ResolvedChain | undefined;
  readonly problem: string | undefined;
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
  readonly action: AnswerAction;
}

export type AnswerAction =
  | { readonly type: "nothing" }
  | { readonly type: "save-then"; readonly after: AfterSave }
  | { readonly type: "drop-then"; readonly after: AfterSave }
  | { readonly type: "overwrite"; readonly path: string; readonly after: AfterSave | undefined }
  | { readonly type: "another-name"; readonly after: AfterSave | undefined }
  | { readonly type: "recover"; readonly id: string }
  | { readonly type: "discard"; readonly id: string }
  | { readonly type: "remove-preset"; readonly name: string }
  | { readonly type: "replace-preset"; readonly command: KeepCommand };

/** What was asked for when unsaved work stood in the way. */
export type AfterSave =
  | { readonly type: "quit" }
  | { readonly type: "open"; readonly name: string }
  | { readonly type: "take-preset"; readonly name: string };

export interface HelpDialog {
  readonly type: "help";
  readonly scroll: number;
}

/** The items of a list that fit what was typed, every word of it somewhere in label, detail or group. */
export function fittingItems({ items, filter }: ListDialog): readonly ListItem[] {
  const words = filter.text.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return items;
  return items.filter(({ label, detail, group }) => {
    const text = `${label} ${detail} ${group}`.toLowerCase();
    return words.every((word) => text.includes(word));
  });
}

export const itemInHand = (list: ListDialog): ListItem | undefined => fittingItems(list)[list.index];
