import { isAbsolute } from "node:path";
import type { FileStamp } from "./stamp.ts";

/** Work that is nowhere else than in the program. */
export interface UnsavedWork {
  /** Of the chain file, as it would be saved. */
  readonly text: string;
  readonly title: string;
  /** The file that it goes back to, absolute. To be made safe before it is shown. */
  readonly path?: string;
  /** Of that file as it was read. */
  readonly stamp?: FileStamp;
  /** The name of the preset that the work began from. To be made safe before it is shown. */
  readonly preset?: string;
  /** That files named in the text are relative to, absolute. */
  readonly folder?: string;
}

export interface JournalRecord extends UnsavedWork {
  /** When it was recorded, in ms since 1970. */
  readonly timeMs: number;
}

/** Beyond the five million characters that a chain may have, each of them escaped. */
export const MAX_JOURNAL_BYTES = 40_000_000;

const FORMAT = "halfpower-journal";
const VERSION = 1;

export const journalText = (record: JournalRecord): string =>
  JSON.stringify({ format: FORMAT, version: VERSION, ...record });

/** Undefined where the text is no journal. */
export function readJournalText(text: string): JournalRecord | undefined {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return undefined;
  }
  if (typeof data !== "object" || data === null) return undefined;
  const fields = data as Readonly<Record<string, unknown>>;
  const { format, version, timeMs, title, stamp } = fields;
  if (format !== FORMAT || version !== VERSION || typeof title !== "string") return undefined;
  if (typeof timeMs !== "number" || typeof fields.text !== "string") return undefined;
  return {
    text: fields.text,
    title,
    timeMs,
    ...optional("path", fields.path, isPath),
    ...optional("stamp", restored(stamp), isStamp),
    ...optional("preset", fields.preset, isText),
    ...optional("folder", fields.folder, isPath),
  };
}

function optional<Name extends string, T>(name: Name, value: unknown, is: (value: unknown) => value is T) {
  return (is(value) ? { [name]: value } : {}) as { readonly [name in Name]?: T };
}

const isText = (value: unknown): value is string => typeof value === "string";
const isPath = (value: unknown): value is string => isText(value) && isAbsolute(value);

function isStamp(value: unknown): value is FileStamp {
  const { mtimeMs, sizeBytes, hash } = (value ?? {}) as Partial<Record<keyof FileStamp, unknown>>;
  return typeof mtimeMs === "number" && typeof sizeBytes === "number" && typeof hash === "string";
}

/** JSON has no NaN, which stands for a time that is not known. */
function restored(stamp: unknown): unknown {
  if (typeof stamp !== "object" || stamp === null) return undefined;
  const { mtimeMs } = stamp as { readonly mtimeMs?: unknown };
  return { ...stamp, mtimeMs: mtimeMs === null ? Number.NaN : mtimeMs };
}
