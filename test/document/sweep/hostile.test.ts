import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { sweepProblemText } from "../../../src/document/sweep/problem.ts";
import { readSweep } from "../../../src/document/sweep/read.ts";
import { refusalOf, sweepOf } from "./support.ts";

const UNSAFE = /[\u0000-\u001f\u007f-\u009f\u200e\u200f\u202a-\u202e\u2066-\u2069]/;
const TEN_MEGABYTES = 10_000_000;

describe("size", () => {
  const rows = (count: number) => Array.from({ length: count }, (_, index) => `${index + 1},-3`).join("\n");

  test("1 000 000 rows are read", () => {
    const sweep = sweepOf(`f,gain_db\n${rows(1_000_000)}\n`);
    expect(sweep.understood).toMatchObject({ rows: 1_000_000, rangeHz: [1, 1_000_000] });
    expect(sweep.gainDb).toHaveLength(1_000_000);
  });

  test.each([
    ["pump2.csv", "f,gain_db\n", ""],
    ["pad.s2p", "# Hz DB\n", " 0 0 0 0 0 0 0"],
  ])("one row more in %s is refused with its line", (name, head, tail) => {
    const many = `${rows(1_000_001)}\n`;
    const text = tail === "" ? many : many.replaceAll(",-3\n", ` 0 0 -3 0 0 0 0 0\n`);
    expect(refusalOf(head + text, name)).toBe(
      `${name}:1000002: more than 1000000 rows; allowed are sweeps of 2 to 1000000 rows`,
    );
  });

  test.each([
    ["letters", "x".repeat(TEN_MEGABYTES)],
    ["digits", "1".repeat(TEN_MEGABYTES)],
    ["commas", ",".repeat(TEN_MEGABYTES)],
    ["quotes", '"'.repeat(TEN_MEGABYTES)],
    ["blanks and a letter", `${" ".repeat(TEN_MEGABYTES)}x`],
    ["numbers", "1 ".repeat(TEN_MEGABYTES / 2)],
    ["header cells", "gain_db,".repeat(TEN_MEGABYTES / 8)],
    ["wide blanks between words", `f${" ".repeat(TEN_MEGABYTES)}g`],
  ])("a line of 10 MB of %s gets a short message", (_, line) => {
    expect(refusalOf(line).length).toBeLessThan(600);
    expect(refusalOf(`1,2\n2,3\n${line}x\n`).length).toBeLessThan(600);
    expect(refusalOf(`# Hz\n${line}x\n`, "a.s2p").length).toBeLessThan(600);
  });

  test("a comment of 10 MB is passed over", () => {
    expect(sweepOf(`#${"x".repeat(TEN_MEGABYTES)}\n1,2\n2,3\n`).freqHz).toHaveLength(2);
  });
});

describe("text that is none", () => {
  test("a NUL byte is refused with its line", () => {
    expect(refusalOf("1,2\n2,\u00003\n")).toBe("pump2.csv:2: a NUL byte; allowed are text files in UTF-8");
  });

  test("UTF-16 read as bytes is refused as such", () => {
    expect(refusalOf("1\u0000,\u00002\u0000")).toContain("a NUL byte");
  });

  test.each(["pump2.csv", "pad.s2p"])("whatever it is, %s gives a sweep or one plain line", (name) => {
    const pieces = fc.oneof(
      fc.string({ unit: "binary" }),
      fc.string({ unit: "grapheme" }),
      fc.constantFrom(
        "\n",
        ",",
        ";",
        "\t",
        " ",
        '"',
        "#",
        "!",
        "%",
        "1",
        "-2.5",
        "1e9",
        "freq_hz",
        "gain_db",
        "re",
        "[x]",
      ),
      fc.constantFrom("\u001b[2J", "\u202e", "\r", "# Hz S RI R 50\n", "1 2 3 4 5 6 7 8 9\n"),
    );
    fc.assert(
      fc.property(fc.array(pieces, { maxLength: 30 }), fc.option(fc.string()), (parts, columns) => {
        const result = readSweep(
          parts.join(""),
          name,
          name.endsWith("csv") ? { columns: columns ?? undefined } : {},
        );
        if (result.ok) {
          const { freqHz, gainDb } = result.value;
          expect(freqHz.every((value, index) => value > (index === 0 ? 0 : freqHz[index - 1]))).toBe(true);
          expect(gainDb.every(Number.isFinite)).toBe(true);
          expect(result.value.understood.notes.join("")).not.toMatch(UNSAFE);
        } else {
          expect(sweepProblemText(result.problem)).not.toMatch(UNSAFE);
          expect(sweepProblemText(result.problem)).toMatch(/^pu?[am]\S*: \S.*; allowed are \S/su);
        }
      }),
      { numRuns: 500 },
    );
  });

  test("nothing in a message moves the cursor, whether from the text, the header, the option or the name", () => {
    const nasty = "\u001b[31mx\u202e\u0007";
    for (const message of [
      refusalOf(`1,2\n2,${nasty}\n`),
      refusalOf(`f,${nasty}\n1,2\n`),
      refusalOf("1,2\n2,3\n", "pump2.csv", { columns: nasty }),
      refusalOf("1,2\n", `${nasty}.csv`),
      refusalOf(`# ${nasty}\n`, "a.s2p"),
    ]) {
      expect(message).not.toMatch(UNSAFE);
      expect(message).toContain("; allowed are ");
    }
    expect(sweepOf(`f,gain_db,${nasty}\n1,2,3\n2,3,4\n`).understood.notes.join("")).not.toMatch(UNSAFE);
  });
});
