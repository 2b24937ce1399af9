import { format } from "node:util";
import { type Host, systemHost } from "./host.ts";
import type { Listener } from "./listener.ts";

const methods = ["log", "info", "debug", "warn", "error", "trace"] as const;

/** Lines kept for later; more than that is of no use to anyone. */
const mostLines = 200;

/**
 * Keeps console output and Node's own warnings off the screen until released; `release` returns what came, oldest
 * first.
 */
export function quietConsole(target: Console = console, host: Host = systemHost): { release(): string[] } {
  const lines: string[] = [];
  const keep = (...values: unknown[]) => {
    if (lines.length < mostLines) lines.push(format(...values));
  };
  const originals = methods.map((method) => target[method]);
  for (const method of methods) target[method] = keep;
  const giveBackWarnings = takeWarnings(host, keep);
  return {
    release: () => {
      methods.forEach((method, index) => {
        target[method] = originals[index]!;
      });
      giveBackWarnings();
      return lines;
    },
  };
}

/** Node prints warnings from a listener of its own, past the console. */
function takeWarnings(host: Host & { listeners?: (event: string) => unknown[] }, keep: Listener): () => void {
  const printing = (host.listeners?.("warning") ?? []) as Listener[];
  for (const listener of printing) host.off("warning", listener);
  host.on("warning", keep);
  return () => {
    host.off("warning", keep);
    for (const listener of printing) host.on("warning", listener);
  };
}
