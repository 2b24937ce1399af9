import type { Host } from "./host.ts";
import type { Listener } from "./listener.ts";
import { isHangup } from "./write-now.ts";

/** Why the program ends without having been asked to by its user. */
export type Loss =
  | { readonly type: "signal"; readonly signal: string }
  | { readonly type: "hangup" }
  | { readonly type: "exception"; readonly error: unknown }
  | { readonly type: "exit"; readonly code: number };

export interface EndingOptions {
  /** Keeps unsaved work. Called once, synchronously, before the terminal is given back; what it throws is ignored. */
  readonly onLost: (loss: Loss) => void;
  /** Gives the terminal back; throws where that cannot be written. */
  readonly restore: () => void;
  /** One line for standard error, after the terminal has been given back. */
  readonly report: (line: string) => void;
}

/** Numbers of signal(7); a process ended by one reports 128 and its number, as a shell does (POSIX, XCU 2.8.2). */
const endingSignals: Readonly<Record<string, number>> = { SIGHUP: 1, SIGINT: 2, SIGQUIT: 3, SIGTERM: 15 };

/** Watches for every end but the asked-for one. `stop` ends the watch, `hangUp` tells of a lost line. */
export function watchEndings(host: Host, options: EndingOptions): { stop(): void; hangUp(): void } {
  let isEnding = false;

  const keepWork = (loss: Loss) => {
    isEnding = true;
    try {
      options.onLost(loss);
    } catch {
      // The terminal has to be given back whatever happens to the journal.
    }
  };
  const end = (loss: Loss, code: number, line?: string) => {
    if (isEnding) return undefined;
    keepWork(loss);
    // After a hang-up an orderly exit can abort inside Node; nothing is left to be put in order.
    if (!restored(options.restore)) return host.kill(host.pid, "SIGKILL");
    if (line !== undefined) options.report(line);
    return host.exit(code);
  };
  const onException = (error: unknown) =>
    end({ type: "exception", error }, 1, `halfpower stopped: ${lineOf(error)}`);
  const onExit = (code: number) => {
    if (isEnding) return;
    keepWork({ type: "exit", code });
    restored(options.restore);
  };

  const listeners: [string, Listener][] = [
    ...Object.entries(endingSignals).map(([signal, number]): [string, Listener] => [
      signal,
      () => end({ type: "signal", signal }, 128 + number),
    ]),
    ["uncaughtException", onException],
    ["unhandledRejection", onException],
    ["exit", onExit],
  ];
  for (const [event, listener] of listeners) host.on(event, listener);
  return {
    stop: () => {
      for (const [event, listener] of listeners) host.off(event, listener);
    },
    hangUp: () => end({ type: "hangup" }, 128 + endingSignals.SIGHUP!),
  };
}

/** False where nobody is at the other end any more. */
function restored(restore: () => void): boolean {
  try {
    restore();
    return true;
  } catch (error) {
    return !isHangup(error);
  }
}

const lineOf = (error: unknown): string =>
  (error instanceof Error ? `${error.name}: ${error.message}` : String(error)).replace(
    /[\u0000-\u001f\u007f]+/g,
    " ",
  );
