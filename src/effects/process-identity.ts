import { readFileSync } from "node:fs";
import { codeOf } from "./file-problem.ts";

/** A process told apart from a later one that got the same number. */
export interface ProcessIdentity {
  readonly pid: number;
  /** Clock ticks from the start of the system to that of the process; 0 where the system does not tell. */
  readonly startTicks: number;
}

export const identityOf = (pid: number): ProcessIdentity => ({
  pid,
  startTicks: processStatus(pid)?.startTicks ?? 0,
});

/** Whether that very process still runs. */
export function isRunning({ pid, startTicks }: ProcessIdentity): boolean {
  if (!hasProcess(pid)) return false;
  const status = processStatus(pid);
  if (status === undefined) return true;
  return !status.hasEnded && (startTicks === 0 || status.startTicks === startTicks);
}

function hasProcess(pid: number): boolean {
  try {
    return process.kill(pid, 0);
  } catch (error) {
    // Somebody else's process runs as well.
    return codeOf(error) === "EPERM";
  }
}

interface ProcessStatus {
  readonly startTicks: number;
  /** Ended, its parent not yet told. */
  readonly hasEnded: boolean;
}

/** Fields 3 (state) and 22 (starttime) of `/proc/PID/stat`, proc(5); undefined on systems without it. */
function processStatus(pid: number): ProcessStatus | undefined {
  let text: string;
  try {
    text = readFileSync(`/proc/${pid}/stat`, "latin1");
  } catch {
    return undefined;
  }
  // Field 2 is the command's name in parentheses and may hold blanks and parentheses itself.
  const fields = text.slice(text.lastIndexOf(")") + 2).split(" ");
  const startTicks = Number(fields[22 - 3]);
  if (!Number.isSafeInteger(startTicks)) return undefined;
  return { startTicks, hasEnded: fields[0] === "Z" || fields[0] === "X" };
}
