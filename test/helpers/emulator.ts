import { EventEmitter } from "node:events";
import { Unicode11Addon } from "@xterm/addon-unicode11";
import headless from "@xterm/headless";
import type { Host } from "../../src/effects/terminal/host.ts";
import type { Timers } from "../../src/effects/terminal/timers.ts";
import { bytesOfKey } from "./key-bytes.ts";

type Emulated = InstanceType<typeof headless.Terminal>;

export interface Size {
  readonly columns: number;
  readonly rows: number;
}

/** One cell as the emulator shows it. The second column of a wide character has no text and width 0. */
export interface Cell {
  readonly text: string;
  readonly width: number;
  readonly bold: boolean;
  readonly dim: boolean;
  readonly italic: boolean;
  readonly underline: boolean;
  readonly inverse: boolean;
  readonly strike: boolean;
  /** -1 for the terminal's own colour. */
  readonly foreground: number;
  readonly background: number;
}

/** A terminal in memory: a pair of streams to hand to `openTerminal`, and what a person would see. */
export interface Emulator {
  readonly stdin: FakeStdin;
  readonly stdout: FakeStdout;
  /** Stands in for the process: signals are events of it, an exit is recorded. */
  readonly host: FakeHost;
  /** Does not wait, so that a lone Escape is the Escape key at once: `press` never cuts a sequence in two. */
  readonly timers: Timers;
  /** Key names such as `up`, `enter`, `f2`, `ctrl+c`, `alt+x`, `shift+left`, or single characters. */
  press(...keys: string[]): void;
  /** Types a text, one read for each character. */
  type(text: string): void;
  paste(text: string): void;
  /** Changes the size as a window does, after everything written so far has been shown. */
  resize(size: Size): Promise<void>;
  /** Resolves when nothing more is being written and everything written is shown. */
  settled(): Promise<void>;
  /** Rows as text without trailing blanks. */
  screen(): string[];
  cell(x: number, y: number): Cell;
  /** Cells that differ from what `frame` (lines with SGR sequences) should look like; see `drawnCells`. */
  staleCells(frame: string): Promise<string[]>;
  readonly bytesWritten: number;
  /** Every write so far, as text. */
  readonly writes: readonly string[];
  readonly isAlternate: boolean;
}

class FakeStdin extends EventEmitter {
  readonly isTTY = true;
  isRaw = false;
  isReading = false;
  setRawMode(enabled: boolean): this {
    this.isRaw = enabled;
    return this;
  }
  resume(): this {
    this.isReading = true;
    return this;
  }
  pause(): this {
    this.isReading = false;
    return this;
  }
}

class FakeStdout extends EventEmitter {
  readonly isTTY = true;
  readonly writes: string[] = [];
  columns: number;
  rows: number;
  readonly #terminal: Emulated;
  constructor(size: Size, terminal: Emulated) {
    super();
    this.columns = size.columns;
    this.rows = size.rows;
    this.#terminal = terminal;
  }
  write(text: string): boolean {
    this.writes.push(text);
    this.#terminal.write(text);
    return true;
  }
}

class FakeHost extends EventEmitter implements Host {
  readonly pid = 1;
  readonly kills: { readonly pid: number; readonly signal: string }[] = [];
  exitCode: number | undefined;
  kill(pid: number, signal: string): void {
    this.kills.push({ pid, signal });
  }
  exit(code: number): void {
    this.exitCode ??= code;
  }
}

const immediately: Timers = {
  set: (callback) => setImmediate(callback),
  clear: (handle) => clearImmediate(handle as NodeJS.Immediate),
};

function createTerminal({ columns, rows }: Size, convertEol: boolean): Emulated {
  const terminal = new headless.Terminal({
    cols: columns,
    rows,
    convertEol,
    allowProposedApi: true,
    scrollback: 100,
  });
  terminal.loadAddon(new Unicode11Addon());
  terminal.unicode.activeVersion = "11";
  return terminal;
}

const parsed = (terminal: Emulated): Promise<void> => new Promise((resolve) => terminal.write("", resolve));

function cellAt(terminal: Emulated, x: number, y: number): Cell {
  const buffer = terminal.buffer.active;
  const cell = buffer.getLine(buffer.viewportY + y)!.getCell(x)!;
  return {
    text: cell.getChars() || (cell.getWidth() === 0 ? "" : " "),
    width: cell.getWidth(),
    bold: cell.isBold() !== 0,
    dim: cell.isDim() !== 0,
    italic: cell.isItalic() !== 0,
    underline: cell.isUnderline() !== 0,
    inverse: cell.isInverse() !== 0,
    strike: cell.isStrikethrough() !== 0,
    foreground: cell.isFgDefault() ? -1 : cell.getFgColor(),
    background: cell.isBgDefault() ? -1 : cell.getBgColor(),
  };
}

const cellsOf = (terminal: Emulated): Cell[][] =>
  Array.from({ length: terminal.rows }, (_, y) =>
    Array.from({ length: terminal.cols }, (_, x) => cellAt(terminal, x, y)),
  );

/** What a frame looks like, by letting the emulator itself write it on an empty screen, line under line. */
export async function drawnCells(frame: string, size: Size): Promise<Cell[][]> {
  const terminal = createTerminal(size, true);
  terminal.write(`\u001b[?7l${frame.split("\n").slice(0, size.rows).join("\n")}`);
  await parsed(terminal);
  return cellsOf(terminal);
}

/** A terminal emulator with a keyboard, in memory, with character widths of this version of Unicode. */
export function createEmulator(size: Size, widths: "6" | "11" = "11"): Emulator {
  const terminal = createTerminal(size, false);
  terminal.unicode.activeVersion = widths;
  const stdin = new FakeStdin();
  const stdout = new FakeStdout(size, terminal);
  const send = (text: string) => {
    if (stdin.isReading) stdin.emit("data", Buffer.from(text));
  };
  const settled = async () => {
    let seen = -1;
    for (let quietTurns = 0; quietTurns < 4; quietTurns += 1) {
      if (stdout.writes.length !== seen) quietTurns = 0;
      seen = stdout.writes.length;
      await new Promise((resolve) => setImmediate(resolve));
      await parsed(terminal);
    }
  };
  return {
    stdin,
    stdout,
    host: new FakeHost(),
    timers: immediately,
    press: (...keys) => {
      for (const key of keys) send(bytesOfKey(key));
    },
    type: (text) => {
      for (const character of text) send(character);
    },
    paste: (text) => send(`\u001b[200~${text}\u001b[201~`),
    resize: async (next) => {
      await settled();
      terminal.resize(next.columns, next.rows);
      stdout.columns = next.columns;
      stdout.rows = next.rows;
      stdout.emit("resize");
      await settled();
    },
    settled,
    screen: () =>
      Array.from({ length: terminal.rows }, (_, y) => {
        const buffer = terminal.buffer.active;
        return buffer
          .getLine(buffer.viewportY + y)!
          .translateToString(true)
          .trimEnd();
      }),
    cell: (x, y) => cellAt(terminal, x, y),
    staleCells: async (frame) => {
      await settled();
      const meant = await drawnCells(frame, { columns: terminal.cols, rows: terminal.rows });
      return differences(cellsOf(terminal), meant);
    },
    get bytesWritten() {
      return Buffer.byteLength(stdout.writes.join(""));
    },
    get writes() {
      return stdout.writes;
    },
    get isAlternate() {
      return terminal.buffer.active.type === "alternate";
    },
  };
}

function differences(shown: readonly Cell[][], meant: readonly Cell[][]): string[] {
  return meant.flatMap((row, y) =>
    row.flatMap((cell, x) => {
      const [is, should] = [JSON.stringify(shown[y]![x]), JSON.stringify(cell)];
      return is === should ? [] : [`column ${x}, row ${y}: ${is} instead of ${should}`];
    }),
  );
}
