import type { DocumentContext } from "../document/context.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { ChainDocument } from "../document/types.ts";
import type { Verdicts } from "../document/verdicts.ts";
import type { Dialog } from "./dialog.ts";
import { type History, NO_HISTORY } from "./history.ts";
import type { NudgeStep } from "./nudge.ts";

/** Everything the workstation knows. Curves and readings are worked out from it, never kept in it. */
export interface EditorState {
  /** The chain as it stands: always one that resolves. */
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  /** What the document is resolved with: measured files and the reader of formulas. */
  readonly context: EditorContext;
  readonly history: History;
  /** The document as it was last read or written; undefined for one that no file and no preset holds. */
  readonly saved: ChainDocument | undefined;
  readonly file: FileOrigin | undefined;
  /** Row of the chain list, and the value in it that is in hand, counted from 0. */
  readonly row: number;
  readonly field: number;
  readonly cursorHz: number;
  readonly pinHz: number | undefined;
  readonly window: Window;
  /** Bounds of the gain axis in dB; undefined while it follows the response. */
  readonly gainRange: GainRange | undefined;
  /** A response kept behind the charts to compare with. */
  readonly ghost: Ghost | undefined;
  readonly overlays: Overlays;
  readonly nudge: NudgeStep;
  readonly dialog: Dialog | undefined;
  readonly notice: Notice | undefined;
  /** The last verdicts, with the chain that they were given on: they come a little after an edit. */
  readonly judged: Judged | undefined;
  readonly size: Size;
}

export interface Judged {
  readonly resolved: ResolvedChain;
  readonly verdicts: Verdicts;
}

/** A context of documents that knows the folder which file names are relative to. */
export type EditorContext = DocumentContext & { readonly folder: string };

/** Where the chain came from: a file that it is saved to, with its text as read. */
export interface FileOrigin {
  readonly path: string;
  readonly text: string;
  readonly document: ChainDocument;
  /** What the disk held when it was read or written; the effects know what it means. */
  readonly stamp: unknown;
}

/** Frequencies shown. */
export interface Window {
  readonly fromHz: number;
  readonly toHz: number;
}

export interface GainRange {
  readonly lowDb: number;
  readonly highDb: number;
}

export interface Ghost {
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  /** Whether the ghost has changed places with the chain on the charts and in the reading. */
  readonly inFront: boolean;
}

export const OVERLAY_NAMES = ["limits", "half power", "folding edge", "band edge"] as const;
export type OverlayName = (typeof OVERLAY_NAMES)[number];
export type Overlays = Readonly<Record<OverlayName, boolean>>;

export interface Size {
  readonly columns: number;
  readonly rows: number;
}

export interface Notice {
  readonly text: string;
  readonly bad: boolean;
}

export interface StartOptions {
  readonly document: ChainDocument;
  readonly resolved: ResolvedChain;
  readonly context: EditorContext;
  readonly file: FileOrigin | undefined;
  readonly size: Size;
}

/** The state on opening a chain. */
export function openedState({ document, resolved, context, file, size }: StartOptions): EditorState {
  const { fromHz, toHz } = resolved.sweep;
  return {
    document,
    resolved,
    context,
    history: NO_HISTORY,
    saved: document,
    file,
    row: document.stages.length > 0 ? 2 : 0,
    field: 0,
    cursorHz: startingCursor(fromHz, toHz, resolved.converter?.bandHz),
    pinHz: undefined,
    window: { fromHz, toHz },
    gainRange: undefined,
    ghost: undefined,
    overlays: { limits: true, "half power": false, "folding edge": true, "band edge": true },
    nudge: { type: "series", series: "E24" },
    dialog: undefined,
    notice: undefined,
    judged: undefined,
    size,
  };
}

/** The edge of the band of interest where there is one, else the middle of the sweep. */
function startingCursor(fromHz: number, toHz: number, bandHz: number | undefined): number {
  if (bandHz !== undefined && bandHz >= fromHz && bandHz <= toHz) return bandHz;
  return Math.sqrt(fromHz) * Math.sqrt(toHz);
}

export const isUnsaved = (state: EditorState): boolean => state.document !== state.saved;

/** The chain that charts and reading show: the ghost while it is in front. */
export const shownChain = ({ resolved, ghost }: EditorState): ResolvedChain =>
  ghost?.inFront ? ghost.resolved : resolved;

/** The response that is kept behind the one shown. */
export const chainBehind = ({ resolved, ghost }: EditorState): ResolvedChain | undefined =>
  ghost === undefined ? undefined : ghost.inFront ? resolved : ghost.resolved;

/** Verdicts on the chain as it stands; undefined while they are being worked out. */
export const verdictsNow = ({ judged, resolved }: EditorState): Verdicts | undefined =>
  judged?.resolved === resolved ? judged.verdicts : undefined;
