import type { ProcessIdentity } from "./process-identity.ts";

/** `work-4711-8817244-5f3a9c01.json`: whose journal it is can be told without reading it. */
export const journalFileName = ({ pid, startTicks }: ProcessIdentity, distinction: string): string =>
  `work-${pid}-${startTicks}-${distinction}.json`;

export const draftName = (fileName: string): string => `${fileName}.tmp`;

const FILE_NAME = /^work-(\d{1,10})-(\d{1,15})-[0-9a-f]{8}\.json(\.tmp)?$/;

export interface JournalOwner extends ProcessIdentity {
  /** Of a journal that was being written when its program was ended. */
  readonly isDraft: boolean;
}

/** Undefined where it is no journal's name. */
export function ownerOf(fileName: string): JournalOwner | undefined {
  const match = FILE_NAME.exec(fileName);
  if (match === null) return undefined;
  return { pid: Number(match[1]), startTicks: Number(match[2]), isDraft: match[3] !== undefined };
}
