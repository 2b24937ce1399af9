import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { spawn } from "@lydell/node-pty";
import headless from "@xterm/headless";
import { build } from "esbuild";
import type { Size } from "./emulator.ts";

/** A program in a real pseudo-terminal, with an emulator on the other side. */
export interface PtyProgram {
  readonly pid: number;
  /** Sends bytes as a keyboard would. */
  write(text: string): void;
  resize(size: Size): void;
  /** Hangs up, as a lost line does: the other side is closed. */
  hangUp(): void;
  /** Everything it wrote. */
  output(): string;
  /** Resolves as soon as the screen shows this text in one row; rejects with the output where it never does. */
  shows(text: string): Promise<void>;
  screen(): Promise<string[]>;
  isAlternate(): Promise<boolean>;
  /** Resolves when it has ended. */
  readonly ended: Promise<{ readonly exitCode: number; readonly signal: number | undefined }>;
}

const patienceMs = 15_000;

/** Bundles one TypeScript file into an .mjs file that plain Node can run; `remove` deletes it. */
export async function bundleProgram(
  entry: string,
): Promise<{ file: string; directory: string; remove(): void }> {
  const directory = mkdtempSync(join(tmpdir(), "halfpower-pty-"));
  const file = join(directory, "program.mjs");
  await build({
    entryPoints: [entry],
    outfile: file,
    bundle: true,
    format: "esm",
    platform: "node",
    target: "node20",
  });
  return { file, directory, remove: () => rmSync(directory, { recursive: true, force: true }) };
}

/** Starts a command in a pseudo-terminal of this size, with these variables added to the environment. */
export function startPty(
  command: string,
  args: readonly string[],
  { columns = 80, rows = 24, env = {} }: Partial<Size> & { readonly env?: Record<string, string> } = {},
): PtyProgram {
  const pty = spawn(command, [...args], {
    name: env.TERM ?? "xterm-256color",
    cols: columns,
    rows,
    env: { ...process.env, LANG: "C.UTF-8", LC_ALL: "C.UTF-8", ...env },
  });
  const emulator = new headless.Terminal({ cols: columns, rows, allowProposedApi: true });
  let output = "";
  const waiting = new Set<() => void>();
  const ended = new Promise<{ exitCode: number; signal: number | undefined }>((resolve) => {
    pty.onExit(({ exitCode, signal }) => resolve({ exitCode, signal }));
  });
  pty.onData((text) => {
    output += text;
    emulator.write(text, () => {
      for (const look of [...waiting]) look();
    });
  });
  const shown = () => new Promise<void>((resolve) => emulator.write("", resolve));
  const rowsNow = () => {
    const buffer = emulator.buffer.active;
    const rowAt = (y: number) =>
      buffer
        .getLine(buffer.viewportY + y)!
        .translateToString(true)
        .trimEnd();
    return Array.from({ length: emulator.rows }, (_, y) => rowAt(y));
  };
  return {
    pid: pty.pid,
    write: (text) => pty.write(text),
    resize: (size) => {
      emulator.resize(size.columns, size.rows);
      pty.resize(size.columns, size.rows);
    },
    hangUp: () => (pty as unknown as { destroy(): void }).destroy(),
    output: () => output,
    shows: (text) =>
      new Promise((resolve, reject) => {
        const patience = setTimeout(() => {
          waiting.delete(look);
          reject(new Error(`never showed ${JSON.stringify(text)}; wrote ${JSON.stringify(output)}`));
        }, patienceMs);
        const look = () => {
          if (!rowsNow().some((row) => row.includes(text))) return;
          clearTimeout(patience);
          waiting.delete(look);
          resolve();
        };
        waiting.add(look);
        look();
      }),
    screen: async () => {
      await shown();
      return rowsNow();
    },
    isAlternate: async () => {
      await shown();
      return emulator.buffer.active.type === "alternate";
    },
    ended,
  };
}
