import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { openChainFile } from "../../src/effects/chain-files.ts";
import { fileProblemText } from "../../src/effects/file-problem.ts";
import { openJournal } from "../../src/effects/journal.ts";
import { shippedPresetsFolder } from "../../src/effects/paths.ts";
import { openPresets } from "../../src/effects/presets.ts";
import { decideDisplay, type ScreenDisplay } from "../../src/effects/terminal/display.ts";
import { openTerminal } from "../../src/effects/terminal/open.ts";
import { startWorkstation } from "../../src/workstation.tsx";
import { createEmulator, type Size } from "./emulator.ts";

/** A folder of its own for settings, journals and chain files, as a person's home. */
export interface Home {
  readonly folder: string;
  readonly path: (name: string) => string;
  readonly write: (name: string, text: string) => string;
  readonly remove: () => void;
}

export function makeHome(): Home {
  const folder = mkdtempSync(join(tmpdir(), "halfpower-home-"));
  const path = (name: string) => join(folder, name);
  return {
    folder,
    path,
    write: (name, text) => {
      writeFileSync(path(name), text);
      return path(name);
    },
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}

export interface StationOptions {
  readonly size?: Size;
  readonly home: Home;
  /** A chain file; a shipped preset's where it is a bare name. */
  readonly chain?: string;
  readonly env?: Readonly<Record<string, string>>;
  readonly pid?: number;
}

/** A workstation in a terminal in memory, driven by keys and read by cells. */
export async function openStation({ size, home, chain = "strain-bridge", env = {}, pid }: StationOptions) {
  const emulator = createEmulator(size ?? { columns: 100, rows: 30 });
  const shipped = shippedPresetsFolder();
  const isFile = chain.includes("/");
  const opened = await openChainFile(isFile ? chain : join(shipped, `${chain}.chain.json`));
  if (!opened.ok) throw new Error(fileProblemText(opened.problem));
  const { path, stamp, ...contents } = opened.value;
  const lost: unknown[] = [];
  const display = decideDisplay(
    { TERM: "xterm-256color", LANG: "C.UTF-8", ...env },
    emulator.stdin,
    emulator.stdout,
  ) as ScreenDisplay;
  const terminal = openTerminal({
    ...emulator,
    display,
    onLost: (loss) => lost.push(loss),
    report: () => {},
  });
  const station = startWorkstation({
    terminal,
    chain: isFile ? opened.value : contents,
    presets: openPresets({ config: home.path("config"), shipped }),
    journal: openJournal(home.path("state"), pid === undefined ? {} : { pid }),
    charset: display.unicode ? "unicode" : "ascii",
  });
  const settled = async () => {
    // What the effects do takes turns of its own.
    for (let turn = 0; turn < 3; turn++) {
      await new Promise((resolve) => setTimeout(resolve, 5));
      await emulator.settled();
    }
  };
  await settled();
  return {
    ...station,
    emulator,
    terminal,
    lost,
    folder: dirname(path),
    settled,
    /** Presses keys one after the other and waits for the last frame. */
    press: async (...keys: string[]) => {
      emulator.press(...keys);
      await settled();
    },
    type: async (text: string) => {
      emulator.type(text);
      await settled();
    },
    screen: () => emulator.screen(),
    text: () => emulator.screen().join("\n"),
    /** What stands beside the charts, lines joined. */
    side: () =>
      emulator
        .screen()
        .map((row) =>
          row
            .split(/[┤│]/)[0]
            ?.replace(/ *(-?[\d.]+|dB|deg)?$/, "")
            .trim(),
        )
        .join(" "),
    /** Cells that differ from the frame that was meant; empty where the screen is right. */
    stale: async () => {
      for (;;) {
        await settled();
        const { frame } = terminal.stdout;
        const cells = await emulator.staleCells(frame);
        // What is worked out beside the keys can bring a new frame at any time.
        if (terminal.stdout.frame === frame) return cells;
      }
    },
    close: () => terminal.close(),
  };
}

export type Station = Awaited<ReturnType<typeof openStation>>;
