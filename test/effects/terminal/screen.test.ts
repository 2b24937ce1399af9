import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Dialect, dialectOf } from "../../../src/effects/terminal/dialect.ts";
import { FrameOutput } from "../../../src/effects/terminal/output.ts";
import { Screen } from "../../../src/effects/terminal/screen.ts";
import { createEmulator, type Size } from "../../helpers/emulator.ts";

/*
 * The reference is the emulator itself: it is given each frame as plain lines on an empty screen (`staleCells`), and
 * every cell must look as it does after the changes of this module alone.
 */

const xterm = dialectOf("xterm-256color", true);

function open(size: Size, dialect: Dialect = xterm, unicode = true, widths: "6" | "11" = "11") {
  const emulator = createEmulator(size, widths);
  emulator.stdout.write("\u001b[?7l");
  const output = new FrameOutput(new Screen(size, dialect, unicode), emulator.stdout);
  output.setShowing(true);
  return { emulator, output };
}

const sgr = fc.constantFrom(
  "",
  "0",
  "1",
  "2",
  "3",
  "4",
  "7",
  "9",
  "22",
  "24",
  "27",
  "31",
  "92",
  "39",
  "44",
  "49",
  "1;36",
  "38;5;208",
  "48;2;10;20;30",
  "0;7",
);
const word = fc.constantFrom(
  " ",
  "      ",
  "a",
  "gain -3.01 dB",
  "漢字",
  "ア",
  "한",
  "e\u0301",
  "Ω µ ° ±",
  "─│┼",
  "▀▄█",
  "⣿⠁",
  "🙂",
  "，",
);
const line = fc
  .array(fc.tuple(sgr, word), { maxLength: 6 })
  .map((parts) => parts.map(([codes, text]) => (codes === "" ? text : `\u001b[${codes}m${text}`)).join(""));
const frames = fc.array(fc.array(line, { maxLength: 6 }), { minLength: 1, maxLength: 5 });

/** Cuts nothing: lines of at most 6 words of at most 13 columns are shorter than this. */
const roomy: Size = { columns: 80, rows: 6 };

describe("Screen", () => {
  it("shows any row of frames without a stale cell", async () => {
    await fc.assert(
      fc.asyncProperty(frames, async (rows) => {
        const { emulator, output } = open(roomy);
        for (const lines of rows) {
          const frame = lines.join("\n");
          output.write(`${frame}\u001b[m `);
          expect(await emulator.staleCells(`${frame}\u001b[m `)).toEqual([]);
        }
      }),
      { numRuns: 120 },
    );
  });

  it.each([
    { columns: 160, rows: 48 },
    { columns: 80, rows: 24 },
    { columns: 60, rows: 18 },
    { columns: 3, rows: 2 },
    { columns: 1, rows: 1 },
  ])("fills $columns × $rows to the last cell without scrolling", async (size) => {
    const { emulator, output } = open(size);
    const full = (shift: number) =>
      Array.from({ length: size.rows }, (_, y) =>
        Array.from({ length: size.columns }, (_, x) => "abcdefghijk"[(x + y * 3 + shift) % 11]).join(""),
      ).join("\n");
    for (const shift of [0, 1, 5]) {
      output.write(full(shift));
      expect(await emulator.staleCells(full(shift))).toEqual([]);
    }
  });

  it("shows any row of full frames, last column and last row included", async () => {
    const size = { columns: 7, rows: 3 };
    const cell = fc.tuple(fc.constantFrom("a", "b", " ", "│"), fc.constantFrom("", "\u001b[7m", "\u001b[m"));
    const full = fc.array(cell, { minLength: 21, maxLength: 21 });
    await fc.assert(
      fc.asyncProperty(fc.array(full, { minLength: 2, maxLength: 6 }), async (pictures) => {
        const { emulator, output } = open(size);
        for (const cells of pictures) {
          const texts = cells.map(([text, style]) => style + text);
          const frame = [texts.slice(0, 7), texts.slice(7, 14), texts.slice(14)]
            .map((row) => row.join(""))
            .join("\n");
          output.write(frame);
          expect(await emulator.staleCells(frame)).toEqual([]);
        }
      }),
      { numRuns: 80 },
    );
  });

  it("goes on from the last column to its left and above", async () => {
    const { emulator, output } = open({ columns: 7, rows: 2 });
    for (const frame of [
      "\n      a",
      "\n     xa",
      "\n     xb",
      "\n     yb",
      "\n     yc",
      "     z\n     yc",
      "     z\n     yd",
      "      w\n     yd",
    ]) {
      output.write(frame);
      expect(await emulator.staleCells(frame)).toEqual([]);
    }
  });

  it("takes bold and dim apart, though one code takes both back", async () => {
    const { emulator, output } = open(roomy);
    const frame = "\u001b[1;2mx\u001b[0;1my\u001b[2mx\u001b[0;2my\u001b[m";
    output.write(frame);
    expect(await emulator.staleCells(frame)).toEqual([]);
  });

  it("keeps the columns behind a character that the terminal draws narrower than Unicode has it", async () => {
    const { emulator, output } = open(roomy, xterm, true, "6");
    output.write("old text here");
    output.write("🙂 gain │ dB");
    await emulator.settled();
    expect(emulator.screen()[0]).toBe("🙂  gain │ dB");
    expect(emulator.cell(3, 0).text).toBe("g");
  });

  it("cuts a line that is too long, and a wide character that would stick out", async () => {
    const { emulator, output } = open({ columns: 5, rows: 2 });
    output.write("1234漢x\n123漢字");
    await emulator.settled();
    expect(emulator.screen()).toEqual(["1234", "123漢"]);
  });

  it("leaves out lines below the last row", async () => {
    const { emulator, output } = open({ columns: 4, rows: 2 });
    output.write("a\nb\nc\n");
    await emulator.settled();
    expect(emulator.screen()).toEqual(["a", "b"]);
  });

  it("writes nothing for the same frame, and nothing for a write that is no picture", async () => {
    const { emulator, output } = open(roomy);
    output.write("gain \u001b[7m-3.01\u001b[27m dB");
    const writes = emulator.writes.length;
    output.write("gain \u001b[7m-3.01\u001b[27m dB");
    output.write("");
    output.write("\u001b[?25h");
    output.write("\u001b[2J\u001b[3J\u001b[H");
    expect(emulator.writes).toHaveLength(writes);
    expect(await emulator.staleCells("gain \u001b[7m-3.01\u001b[27m dB")).toEqual([]);
  });

  it("leaves out every sequence that is no style", async () => {
    const { emulator, output } = open(roomy);
    output.write(
      "\u001b[?2026h\u001b[2J\u001b[H\u001b]8;;https://example.org\u0007link\u001b]8;;\u0007\u001b[5C!\u0007\r\u0000\n\u001b(0q",
    );
    await emulator.settled();
    expect(emulator.screen().slice(0, 2)).toEqual(["link!", "q"]);
  });

  it("repaints over whatever stands on the terminal", async () => {
    const { emulator, output } = open(roomy);
    output.write("reading\n漢字");
    emulator.stdout.write("\u001b[3;3H\u001b[41mnoise from elsewhere");
    output.repaint();
    expect(await emulator.staleCells("reading\n漢字")).toEqual([]);
  });

  it("repaints at a new size, also where no new frame comes", async () => {
    const { emulator, output } = open(roomy);
    emulator.stdout.on("resize", () => output.resize(emulator.stdout));
    output.write("abcdefgh\n12345678");
    await emulator.resize({ columns: 4, rows: 3 });
    expect(emulator.screen()).toEqual(["abcd", "1234", ""]);
    await emulator.resize({ columns: 10, rows: 2 });
    expect(emulator.screen()).toEqual(["abcdefgh", "12345678"]);
  });

  it("leaves frames out while the terminal is behind, and shows the newest then", () => {
    const sent: string[] = [];
    let onDrain = () => {};
    const slow = {
      write: (text: string) => sent.push(text) === 0,
      on: () => {},
      off: () => {},
      once: (_: string, listener: () => void) => {
        onDrain = listener;
      },
    };
    const output = new FrameOutput(new Screen({ columns: 9, rows: 1 }, xterm, true), slow);
    output.setShowing(true);
    for (const frame of ["1 kHz", "2 kHz", "3 kHz"]) output.write(frame);
    expect(sent).toHaveLength(1);
    onDrain();
    expect(sent.at(-1)).toBe("\r3");
  });
});

describe("a plain terminal", () => {
  const styled =
    "\u001b[1;31;44mbold\u001b[22m \u001b[4mline\u001b[24m \u001b[7mback\u001b[27m \u001b[3mslant\u001b[m rest";

  it("without colour keeps bold, underline and reverse", async () => {
    const { emulator, output } = open(roomy, dialectOf("xterm", false));
    output.write(styled);
    const colourless =
      "\u001b[1mbold\u001b[22m \u001b[4mline\u001b[24m \u001b[7mback\u001b[27m \u001b[3mslant\u001b[m rest";
    expect(await emulator.staleCells(colourless)).toEqual([]);
    expect(emulator.writes.join("")).not.toMatch(/\u001b\[[\d;]*(3[0-79]|4[0-79])[;m]/);
  });

  it.each(["vt100", "linux"])("called %s gets nothing it does not know", async (term) => {
    const { emulator, output } = open(roomy, dialectOf(term, true));
    for (const frame of [styled, `x\n\n        ${styled}`, "\u001b[1mx\u001b[22m\n\n    y"]) {
      output.write(frame);
      await emulator.settled();
    }
    expect(emulator.screen().slice(0, 3)).toEqual(["x", "", "    y"]);
    // DEC VT100 user guide, chapter 3: CUU…CUP, ED, EL, SGR 0, 1, 4, 5, 7. The console adds CHA and SGR 22 to 49.
    const known =
      term === "vt100"
        ? /\u001b\[\d*(;\d*)?[ABCDHJK]|\u001b\[([01457](;|(?=m)))*m/g
        : /\u001b\[\d*(;\d*)?[ABCDGHJK]|\u001b\[(([012457]|2[24-7]|[34][0-79])(;|(?=m)))*m/g;
    expect(emulator.writes.slice(1).join("").replace(known, "")).not.toContain("\u001b");
  });

  it("that is not UTF-8 gets ASCII only, in the same columns", async () => {
    const { emulator, output } = open(roomy, xterm, false);
    output.write("漢 4.7 kΩ│");
    await emulator.settled();
    expect(emulator.screen()[0]).toBe("?? 4.7 k??");
    expect(emulator.writes.join("")).toMatch(/^[\u0000-\u007f]*$/);
  });
});

/** A made-up workstation of 100 × 30: a chain at the side, a trace, a highlighted cell, an axis tick, a reading line. */
function workstation(cursor: number): string {
  const [left, width] = [30, 70];
  const trace = (column: number) => 2 + Math.round(9 / (1 + Math.exp((35 - column) / 6)));
  const lines = Array.from({ length: 30 }, (_, y) => {
    const chain = `${y % 3 === 0 ? `\u001b[1m${y / 3 + 1} RC low-pass\u001b[22m` : "  R 1 kΩ  C 4.7 nF"}`;
    const padded = chain + " ".repeat(left - (y % 3 === 0 ? String(y / 3 + 1).length + 12 : 18));
    const chart = Array.from({ length: width }, (_, x) => {
      if (y === 14) return x === cursor ? "▲" : "─";
      if (trace(x) !== y) return " ";
      return x === cursor ? "\u001b[7m─\u001b[27m" : "─";
    });
    return padded + chart.join("");
  });
  const freqHz = 1000 * 10 ** (cursor / 20);
  lines[28] = `f ${freqHz.toFixed(1)} Hz  gain ${(-cursor / 3).toFixed(2)} dB  ratio ${Math.exp(-cursor / 26).toFixed(4)}  phase ${(-cursor * 1.7).toFixed(1)}°  delay ${(cursor * 1.3).toFixed(2)} µs`;
  return lines.join("\n");
}

describe("bytes", () => {
  it("of a cursor step at 100 × 30 are at most 300, in one write", async () => {
    const { emulator, output } = open({ columns: 100, rows: 30 });
    output.write(workstation(5));
    for (let cursor = 6; cursor < 60; cursor += 1) {
      const [bytes, writes] = [emulator.bytesWritten, emulator.writes.length];
      output.write(workstation(cursor));
      expect(emulator.bytesWritten - bytes).toBeLessThanOrEqual(300);
      expect(emulator.writes.length - writes).toBe(1);
      expect(await emulator.staleCells(workstation(cursor))).toEqual([]);
    }
  });

  it.each([
    ["abc", "abd", "\bd"],
    ["abc\nxyz", "abc\nxYz", "\b\bY"],
    ["\u001b[1mab\u001b[m", "ab", "\u001b[m\rab"],
    ["abcdefghij", "a", "\u001b[9D\u001b[K"],
  ])("from %j to %j are as few as %j", (before, after, expected) => {
    const { emulator, output } = open({ columns: 20, rows: 3 });
    output.write(before);
    output.write(after);
    expect(Buffer.byteLength(emulator.writes.at(-1)!)).toBeLessThanOrEqual(Buffer.byteLength(expected));
  });
});
