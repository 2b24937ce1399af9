import { spawn } from "@lydell/node-pty";
import type { Size } from "../helpers/emulator.ts";

/** A program in a real pseudo-terminal whose output is timed and counted as it arrives. */
export interface TimedTerminal {
  /** Resolves as soon as this text has been written in one piece. */
  shows(text: string): Promise<void>;
  /** Resolves when nothing has been written for that time. */
  quiet(timeMs: number): Promise<void>;
  /** Sends a key. Time in ms to the answer, which comes in one write, and all bytes until it is quiet again. */
  press(key: string): Promise<{ readonly timeMs: number; readonly bytes: number }>;
  /** Bytes written in that time without any key. */
  idleBytes(timeMs: number): Promise<number>;
  quit(): Promise<void>;
}

const PATIENCE_MS = 15_000;
/** No answer for so long: the key changed nothing on the screen. */
const NO_ANSWER_MS = 1_000;
const QUIET_MS = 30;

export function openTimed(args: readonly string[], size: Size, env: Record<string, string>): TimedTerminal {
  const pty = spawn(process.execPath, [...args], {
    name: "xterm-256color",
    cols: size.columns,
    rows: size.rows,
    env: { ...process.env, LANG: "C.UTF-8", LC_ALL: "C.UTF-8", ...env },
  });
  const ended = new Promise<void>((resolve) => void pty.onExit(() => resolve()));
  let output = "";
  let listener = () => {};
  pty.onData((text) => {
    output += text;
    listener();
  });
  const bytesNow = () => Buffer.byteLength(output);
  /** Whether anything more is written within that time. */
  const more = (timeMs: number) =>
    new Promise<boolean>((resolve) => {
      const timer = setTimeout(() => resolve(false), timeMs);
      listener = () => {
        clearTimeout(timer);
        listener = () => {};
        resolve(true);
      };
    });
  const quiet = async (timeMs: number) => {
    while (await more(timeMs));
  };
  return {
    quiet,
    shows: async (text) => {
      while (!output.includes(text)) {
        if (!(await more(PATIENCE_MS))) throw new Error(`never showed ${text}`);
      }
    },
    press: async (key) => {
      const before = bytesNow();
      const start = performance.now();
      pty.write(key);
      const answered = await more(NO_ANSWER_MS);
      const timeMs = answered ? performance.now() - start : Number.NaN;
      await quiet(QUIET_MS);
      return { timeMs, bytes: bytesNow() - before };
    },
    idleBytes: async (timeMs) => {
      const before = bytesNow();
      await new Promise((resolve) => setTimeout(resolve, timeMs));
      return bytesNow() - before;
    },
    quit: async () => {
      pty.kill("SIGKILL");
      await ended;
    },
  };
}
