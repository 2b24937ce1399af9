import { describe, expect, test } from "vitest";
import reference from "../../reference/s2p-examples.json" with { type: "json" };
import { curveOf, refusalOf, sweepOf } from "./support.ts";

const readS2p = (text: string) => sweepOf(text, "pad.s2p");
const PAIRS = "0 0 0.1 -90 0 0 0 0";

// Published examples of the format; see the file's status.
describe("examples of the IBIS Open Forum format", () => {
  test.each(reference.files)("$name", ({ text, freqHz, gainDb, phaseDeg }) => {
    const sweep = readS2p(text);
    expect([...sweep.freqHz]).toEqual(freqHz);
    gainDb.forEach((value, index) => {
      expect(sweep.gainDb[index]).toBeCloseTo(value, 12);
      expect(sweep.phaseDeg?.[index]).toBeCloseTo(phaseDeg[index], 12);
    });
    expect(sweep.referenceOhm).toBe(50);
  });

  test("noise data are said not to be read", () => {
    expect(readS2p(reference.files[1].text).understood.notes).toEqual([
      "S21 is read as the insertion gain between 50 Ω and 50 Ω",
      "noise data from line 8 on are not read",
    ]);
  });
});

// Rev 1.1, "Option Line": any order, any case, defaults GHz S MA R 50. 0.1 at -90° is 20 log 0.1 = -20 dB, -0.1j.
describe("option line", () => {
  test.each([
    ["#", 1e9, 50, PAIRS],
    ["# GHz S MA R 50", 1e9, 50, PAIRS],
    ["# hz", 1, 50, PAIRS],
    ["#KHZ s ma", 1e3, 50, PAIRS],
    ["# R 75 MHz ! in any order", 1e6, 75, PAIRS],
    ["# r 600.5 DB S hz", 1, 600.5, "0 0 -20 -90 0 0 0 0"],
    ["# RI Hz", 1, 50, "0 0 0 -0.1 0 0 0 0"],
  ])("%s", (option, scale, referenceOhm, pairs) => {
    const sweep = readS2p(`! pump 2\n\n${option}\n1 ${pairs}\n2\t${pairs} ! end\n`);
    expect([...sweep.freqHz]).toEqual([scale, 2 * scale]);
    expect(sweep.gainDb[1]).toBeCloseTo(-20, 12);
    expect(sweep.phaseDeg?.[1]).toBeCloseTo(-90, 12);
    expect(sweep.referenceOhm).toBe(referenceOhm);
  });

  test("further option lines are ignored", () => {
    expect([...readS2p(`# Hz\n1 ${PAIRS}\n# GHz Z RI\n2 ${PAIRS}\n`).freqHz]).toEqual([1, 2]);
  });

  const OPTIONS =
    "option lines such as # GHz S MA R 50 (Hz, kHz, MHz or GHz; S; RI, MA or DB; R and a resistance)";
  test.each([
    ["# GHz Z MA", "Z parameters", "S parameters"],
    ["# y", "Y parameters", "S parameters"],
    ["# h", "H parameters", "S parameters"],
    ["# g", "G parameters", "S parameters"],
    ["# THz", '"THZ" in the option line', OPTIONS],
    ["# Hz GHz", "two entries for the unit in the option line", OPTIONS],
    ["# R", 'R ""', OPTIONS],
    ["# R 0", 'R "0"', OPTIONS],
    ["# R -50", 'R "-50"', OPTIONS],
    ["# R 50 75", '"75" in the option line', OPTIONS],
    ["[Version] 2.0", 'the keyword "[Version] 2.0" of version 2', "files of version 1"],
    [`1 ${PAIRS}`, "no option line before the data", "files that begin with one, such as # GHz S MA R 50"],
  ])("%s is refused", (option, found, allowed) => {
    expect(refusalOf(`! pump 2\n${option}\n1 ${PAIRS}\n2 ${PAIRS}\n`, "pad.s2p")).toBe(
      `pad.s2p:2: ${found}; allowed are ${allowed}`,
    );
  });
});

describe("data rows", () => {
  const NINE = "rows of 9 numbers: frequency, S11, S21, S12 and S22";
  test.each([
    ["2 1 2 3 4 5 6 7", "a row of 8 fields", NINE],
    ["2 1 2 3 4 5 6 7 8 9", "a row of 10 fields", NINE],
    ["2 1 2 3 4", "a row of 5 fields", NINE],
    ["2 1 x 3 4 5 6 7 8", '"x" is no number', NINE],
    ["2 1 0,5 3 4 5 6 7 8", '"0,5" is no number', NINE],
    ["-2 0 0 0.1 0 0 0 0 0", "a frequency of -2000000000 Hz", "frequencies above 0"],
    ["2 0 0 0 0 0 0 0 0", "a ratio of 0", "ratios above 0, or gains in dB where the header says so"],
    ["[End]", 'the keyword "[End]" of version 2', "files of version 1"],
  ])("%s is refused", (row, found, allowed) => {
    expect(refusalOf(`#\n1 ${PAIRS}\n! comment\n${row}\n`, "pad.s2p")).toBe(
      `pad.s2p:4: ${found}; allowed are ${allowed}`,
    );
  });

  test("any order, repeated frequencies averaged", () => {
    const sweep = readS2p(
      "# Hz DB\n3 0 0 -6 0 0 0 0 0\n1 0 0 -2 10 0 0 0 0\n3 0 0 -8 20 0 0 0 0\n2 0 0 -4 0 0 0 0 0\n",
    );
    const { freqHz, gainDb, phaseDeg } = curveOf(sweep);
    expect({ freqHz, gainDb }).toEqual({ freqHz: [1, 2, 3], gainDb: [-2, -4, -7] });
    expect(phaseDeg?.[2]).toBeCloseTo(10, 12);
    expect(sweep.understood.averaged).toBe(1);
  });
});

describe("file names", () => {
  test.each(["a.s1p", "a.S3P", "a.s12p"])("%s is refused", (name) => {
    expect(refusalOf("#\n1 0 0\n", name)).toContain("ports; allowed are two-port files, .s2p");
  });

  test("an upper-case ending counts", () => {
    expect(sweepOf(`# Hz\n1 ${PAIRS}\n2 ${PAIRS}\n`, "PAD.S2P").freqHz).toHaveLength(2);
  });

  test("columns by hand do not go with it", () => {
    expect(refusalOf("#\n", "a.s2p", { columns: "f,gain_db" })).toBe(
      "a.s2p: --columns for an .s2p file; allowed are CSV files with --columns",
    );
  });

  test.each([
    ["", "no rows"],
    ["! nothing\n#\n", "no rows"],
    [`#\n1 ${PAIRS}\n`, "a single row"],
  ])("%j has too few rows", (text, found) => {
    expect(refusalOf(text, "a.s2p")).toBe(
      `a.s2p: ${found}; allowed are at least two rows of different frequency`,
    );
  });
});
