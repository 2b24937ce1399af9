import type { Listener } from "./listener.ts";
/** What is used of the process, so that tests can stand in for it. */
export interface Host {
  on(event: string, listener: Listener): unknown;
  off(event: string, listener: Listener): unknown;
  kill(pid: number, signal: string): unknown;
  exit(code: number): unknown;
  readonly pid: number;
}

export const systemHost: Host = process as unknown as Host;
