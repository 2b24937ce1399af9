import { Box, render, Text, useInput } from "ink";
import { createElement, useEffect, useState } from "react";
import { afterEach, describe, expect, it } from "vitest";
import { decideDisplay, type ScreenDisplay } from "../../../src/effects/terminal/display.ts";
import type { Key } from "../../../src/effects/terminal/key.ts";
import { openTerminal, type Terminal } from "../../../src/effects/terminal/open.ts";
import { createEmulator, type Emulator } from "../../helpers/emulator.ts";

const opened: Terminal[] = [];
afterEach(() => {
  for (const terminal of opened.splice(0)) terminal.close();
});

function open(emulator: Emulator, env: Record<string, string> = {}) {
  const lost: unknown[] = [];
  const reported: string[] = [];
  const terminal = openTerminal({
    ...emulator,
    display: decideDisplay(
      { TERM: "xterm", LANG: "C.UTF-8", ...env },
      emulator.stdin,
      emulator.stdout,
    ) as ScreenDisplay,
    onLost: (loss) => lost.push(loss),
    report: (line) => reported.push(line),
  });
  opened.push(terminal);
  return { terminal, lost, reported };
}

const size = { columns: 20, rows: 4 };

describe("openTerminal(options)", () => {
  it("takes the terminal over, and close() gives it back once", async () => {
    const emulator = createEmulator(size);
    emulator.stdout.write("$ halfpower");
    const { terminal, lost } = open(emulator);
    terminal.stdout.write("reading");
    await emulator.settled();
    expect([emulator.isAlternate, emulator.stdin.isRaw, emulator.stdin.isReading]).toEqual([
      true,
      true,
      true,
    ]);
    expect(emulator.screen()).toEqual(["reading", "", "", ""]);
    terminal.close();
    const writes = emulator.writes.length;
    terminal.close();
    terminal.stdout.write("a last frame");
    await emulator.settled();
    expect(emulator.writes).toHaveLength(writes);
    expect([emulator.isAlternate, emulator.stdin.isRaw, emulator.stdin.isReading]).toEqual([
      false,
      false,
      false,
    ]);
    expect(emulator.screen()[0]).toBe("$ halfpower");
    expect(emulator.host.eventNames()).toEqual([]);
    expect(lost).toEqual([]);
  });

  it("hands on keys one at a time, but for Ctrl+L and Ctrl+Z", async () => {
    const emulator = createEmulator(size);
    const { terminal } = open(emulator);
    const keys: Key[] = [];
    const unsubscribe = terminal.onKey((key) => keys.push(key));
    emulator.press("up", "ctrl+right", "alt+x", "escape");
    await emulator.settled();
    emulator.press("ctrl+l", "ctrl+c", "shift+f5");
    emulator.type("4k");
    emulator.paste("10 nF");
    const names = keys.map(({ name, text, ctrl, alt, shift }) =>
      [ctrl && "ctrl", alt && "alt", shift && "shift", text || name].filter(Boolean).join("+"),
    );
    expect(names).toEqual(["up", "ctrl+right", "alt+x", "escape", "ctrl+c", "shift+f5", "4", "k", "10 nF"]);
    unsubscribe();
    emulator.press("down");
    expect(keys).toHaveLength(names.length);
  });

  it("repaints on Ctrl+L", async () => {
    const emulator = createEmulator(size);
    const { terminal } = open(emulator);
    terminal.stdout.write("reading");
    emulator.stdout.write("\u001b[Hwall: lunch is ready");
    emulator.press("ctrl+l");
    expect(await emulator.staleCells("reading")).toEqual([]);
  });

  it("stops on Ctrl+Z, draws nothing meanwhile, and shows the newest frame when it goes on", async () => {
    const emulator = createEmulator(size);
    const { terminal } = open(emulator);
    terminal.stdout.write("before");
    emulator.press("ctrl+z");
    expect(emulator.host.kills).toEqual([{ pid: 0, signal: "SIGTSTP" }]);
    terminal.stdout.write("meanwhile");
    expect([emulator.stdin.isRaw, emulator.stdin.isReading]).toEqual([false, false]);
    expect(emulator.writes.join("")).not.toContain("meanwhile");
    emulator.host.emit("SIGCONT");
    expect(await emulator.staleCells("meanwhile")).toEqual([]);
    expect([emulator.isAlternate, emulator.stdin.isRaw, emulator.stdin.isReading]).toEqual([
      true,
      true,
      true,
    ]);
    emulator.host.emit("SIGTSTP");
    expect(emulator.host.kills).toHaveLength(2);
  });

  it("says its size, and calls back for a new one", async () => {
    const emulator = createEmulator(size);
    const { terminal } = open(emulator);
    const sizes: unknown[] = [];
    terminal.onResize((next) => sizes.push(next));
    await emulator.resize({ columns: 31, rows: 7 });
    expect(sizes).toEqual([{ columns: 31, rows: 7 }]);
    expect([terminal.columns, terminal.rows, terminal.stdout.columns, terminal.stdout.rows]).toEqual([
      31, 7, 31, 7,
    ]);
  });

  it.each(["stdin", "stdout"] as const)("takes EIO on %s for a hang-up", (stream) => {
    const emulator = createEmulator(size);
    const { lost } = open(emulator);
    emulator[stream].emit("error", Object.assign(new Error("read EIO"), { code: "EIO" }));
    expect(lost).toEqual([{ type: "hangup" }]);
    expect(emulator.host.exitCode).toBe(129);
  });

  it("keeps console output until the end", () => {
    const { terminal, reported } = open(createEmulator(size));
    console.log("met %d limits", 3);
    console.error("odd");
    expect(reported).toEqual([]);
    terminal.close();
    expect(reported).toEqual(["met 3 limits", "odd"]);
  });

  it("sends a VT100 no second screen, and clears what was drawn", async () => {
    const emulator = createEmulator(size);
    const { terminal } = open(emulator, { TERM: "vt100" });
    terminal.stdout.write("reading");
    terminal.close();
    await emulator.settled();
    expect(emulator.screen()).toEqual(["", "", "", ""]);
    expect(emulator.writes.join("")).not.toMatch(/\[\?(1049|25|2004)/);
  });
});

/** Two columns, as wide and as tall as the terminal, with a counter moved by keys. */
function Counter({ terminal, onInkKey }: { terminal: Terminal; onInkKey: (input: string) => void }) {
  const [count, setCount] = useState(0);
  const [shape, setShape] = useState({ columns: terminal.columns, rows: terminal.rows });
  useEffect(() => terminal.onKey(({ name }) => setCount((n) => n + (name === "up" ? 1 : -1))), [terminal]);
  useEffect(() => terminal.onResize(setShape), [terminal]);
  useInput(onInkKey);
  const rows = Array.from(
    { length: shape.rows },
    (_, y) => `${y}│漢 \u001b[7m${count * (y + 1)}\u001b[27m`,
  ).join("\n");
  const chain = Array.from({ length: shape.rows }, () => "chain").join("\n");
  const left = createElement(Box, { width: 6 }, createElement(Text, null, chain));
  const right = createElement(Text, { wrap: "truncate" }, rows);
  return createElement(Box, { width: shape.columns, height: shape.rows }, left, right);
}

describe("Ink through openTerminal", () => {
  it("fills the screen, follows keys and sizes, and leaves no stale cell", async () => {
    const emulator = createEmulator({ columns: 30, rows: 6 });
    const { terminal } = open(emulator);
    const inkKeys: string[] = [];
    const app = render(
      createElement(Counter, { terminal, onInkKey: (input: string) => inkKeys.push(input) }),
      {
        stdout: terminal.stdout,
        stdin: terminal.stdin,
        debug: true,
        patchConsole: false,
        exitOnCtrlC: false,
      },
    );
    const expectShown = async () => expect(await emulator.staleCells(terminal.stdout.frame)).toEqual([]);
    await emulator.settled();
    expect(emulator.screen()).toEqual([0, 1, 2, 3, 4, 5].map((y) => `chain ${y}│漢 0`));
    emulator.press("up", "up", "up", "down", "ctrl+c");
    await emulator.settled();
    expect(emulator.screen()[5]).toBe("chain 5│漢 6");
    await expectShown();
    for (const next of [
      { columns: 12, rows: 3 },
      { columns: 80, rows: 24 },
      { columns: 30, rows: 2 },
    ]) {
      await emulator.resize(next);
      expect(emulator.screen().at(-1)).toBe(`chain ${next.rows - 1}│漢 ${next.rows}`);
      await expectShown();
    }
    expect(inkKeys).toEqual([]);
    app.unmount();
    terminal.close();
    await app.waitUntilExit();
    await emulator.settled();
    expect(emulator.isAlternate).toBe(false);
  });
});
