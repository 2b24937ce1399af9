import { writeSync } from "node:fs";
import type { ScreenDisplay } from "./display.ts";
import { type Loss, watchEndings } from "./endings.ts";
import { type Host, systemHost } from "./host.ts";
import { type KeySource, listenToKeys, QuietStdin } from "./input.ts";
import type { Key } from "./key.ts";
import { FrameOutput, type RealOutput } from "./output.ts";
import { quietConsole } from "./quiet-console.ts";
import { Screen } from "./screen.ts";
import { createSession } from "./session.ts";
import { watchSuspension } from "./suspension.ts";
import { systemTimers, type Timers } from "./timers.ts";
import { isHangup } from "./write-now.ts";

/** The full screen: streams for the drawing library, keys and sizes for the program. */
export interface Terminal {
  /** Takes whole frames (Ink's `debug: true`). */
  readonly stdout: FrameOutput & NodeJS.WriteStream;
  /** Satisfies the drawing library and never says anything: keys come from `onKey`. */
  readonly stdin: QuietStdin & NodeJS.ReadStream;
  readonly columns: number;
  readonly rows: number;
  /** Calls back for each key, one at a time, but for Ctrl+Z and Ctrl+L, which are dealt with here. */
  onKey(listener: (key: Key) => void): () => void;
  /** Calls back after each change of size. */
  onResize(listener: (size: { columns: number; rows: number }) => void): () => void;
  /** Paints everything anew, for a screen that something else has written on. */
  repaint(): void;
  /** Gives the terminal to the shell until the program is brought back. */
  suspend(): void;
  /** The asked-for end: gives the terminal back and prints what the console was told meanwhile. Idempotent. */
  close(): void;
}

export interface TerminalOptions {
  readonly stdin: KeySource;
  readonly stdout: RealOutput;
  readonly display: ScreenDisplay;
  /** Keeps unsaved work, synchronously, at every end that was not asked for. */
  readonly onLost: (loss: Loss) => void;
  readonly host?: Host;
  readonly timers?: Timers;
  /** Standard error, written at once. */
  readonly report?: (line: string) => void;
}

/** Used where a terminal does not say how large it is: the size of a VT100. */
const unknownSize = { columns: 80, rows: 24 };

/** Takes the terminal over. It is given back by `close`, and by every other end of the process. */
export function openTerminal(options: TerminalOptions): Terminal {
  const { stdin: keys, stdout: real, display, host = systemHost, timers = systemTimers } = options;
  const report = options.report ?? reportToStandardError;
  const sizeNow = () => ({
    columns: real.columns || unknownSize.columns,
    rows: real.rows || unknownSize.rows,
  });

  const session = createSession(keys, real, display.dialect);
  const stdout = new FrameOutput(new Screen(sizeNow(), display.dialect, display.unicode), real);
  const stdin = new QuietStdin();
  const keyListeners = new Set<(key: Key) => void>();
  const sizeListeners = new Set<(size: { columns: number; rows: number }) => void>();
  let stopKeys = () => {};

  const enter = () => {
    session.enter();
    stopKeys();
    stopKeys = listenToKeys(keys, timers, onKey);
    onResize();
    stdout.setShowing(true);
  };
  const leave = () => {
    stdout.setShowing(false);
    stopKeys();
    session.restore();
  };
  const onKey = (key: Key) => {
    const letter = key.ctrl && !key.alt ? key.text : "";
    if (letter === "z") suspension.suspend();
    else if (letter === "l") stdout.repaint();
    else for (const listener of keyListeners) listener(key);
  };
  const onResize = () => {
    const size = sizeNow();
    if (size.columns !== stdout.columns || size.rows !== stdout.rows) stdout.resize(size);
  };
  const onStreamError = (error: unknown) => {
    if (session.isActive && isHangup(error)) endings.hangUp();
  };
  const onKeysEnd = () => {
    if (session.isActive) endings.hangUp();
  };

  const endings = watchEndings(host, { onLost: options.onLost, restore: leave, report });
  const suspension = watchSuspension(host, timers, { leave, enter });
  const console = quietConsole(undefined, host);
  keys.on("error", onStreamError);
  keys.on("end", onKeysEnd);
  real.on("error", onStreamError);
  real.on("resize", onResize);
  stdout.on("resize", () => {
    for (const listener of sizeListeners) listener({ columns: stdout.columns, rows: stdout.rows });
  });
  enter();

  let isOpen = true;
  return {
    stdout: stdout as unknown as Terminal["stdout"],
    stdin: stdin as unknown as Terminal["stdin"],
    get columns() {
      return stdout.columns;
    },
    get rows() {
      return stdout.rows;
    },
    onKey: (listener) => subscribe(keyListeners, listener),
    onResize: (listener) => subscribe(sizeListeners, listener),
    repaint: () => stdout.repaint(),
    suspend: () => suspension.suspend(),
    close: () => {
      if (!isOpen) return;
      isOpen = false;
      endings.stop();
      suspension.stop();
      real.off("resize", onResize);
      keys.off("end", onKeysEnd);
      leave();
      for (const line of console.release()) report(line);
    },
  };
}

function subscribe<T>(listeners: Set<T>, listener: T): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

function reportToStandardError(line: string): void {
  try {
    writeSync(2, `${line}\n`);
  } catch {
    // Standard error may be the terminal that has gone.
  }
}
