import { describe, expect, test } from "vitest";
import { ALLOWED_HEADERS } from "../../../src/document/sweep/header.ts";
import { curveOf, refusalOf, sweepOf } from "./support.ts";

describe("columns named by hand", () => {
  test.each([
    ["freq_kHz,skip,gain_dB,phase_deg", "1,9,-20,45\n2,9,-40,-45\n"],
    ["freq_kHz,-,gain_dB,phase_deg", "1;x;-20;45\n2;;-40;-45\n"],
    [" freq_kHz , , gain_dB , phase_deg ", "1 9 -20 45\n2 9 -40 -45\n"],
    ["freq_kHz,skip,gain_dB,phase_deg", "a,b,c,d\n1,9,-20,45\n2,9,-40,-45\n"],
    ["freq_kHz,skip,gain_dB,phase_deg", "1,9,-20,45,note\n2,9,-40,-45,,,\n"],
    ["phase_deg,ratio,freq_kHz", "45,0.1,1\n-45,0.01,2\n"],
  ])("%j", (columns, text) => {
    const { freqHz, gainDb, phaseDeg } = curveOf(sweepOf(text, "pump2.csv", { columns }));
    expect(freqHz).toEqual([1000, 2000]);
    expect(gainDb[0]).toBeCloseTo(-20, 12);
    expect(gainDb[1]).toBeCloseTo(-40, 12);
    expect(phaseDeg).toEqual([45, -45]);
  });

  test("they stand above the header of the file", () => {
    const text = "f (Hz),gain (dB)\n1,2\n2,3\n";
    const { understood, freqHz } = sweepOf(text, "pump2.csv", { columns: "freq_MHz,gain_dB" });
    expect([...freqHz]).toEqual([1e6, 2e6]);
    expect(understood.columns).toEqual(["frequency in MHz", "dB"]);
  });

  test.each([
    ["freq_kHz,foo", 'the unknown column "foo"'],
    ["freq_kHz,time,gain_db", 'the unknown column "time"'],
    ["", 'no frequency in the columns ""'],
    ["skip,skip", 'no frequency in the columns "skip" and "skip"'],
    ["f,phase_deg", 'no gain in the columns "f" and "phase_deg"'],
    ["f,f,gain_db", 'more than one column of the same kind, the columns "f" and "f"'],
  ])("%j is refused without a line", (columns, found) => {
    expect(refusalOf("1,2\n2,3\n", "pump2.csv", { columns })).toBe(
      `pump2.csv: --columns "${columns}": ${found}; allowed are ${ALLOWED_HEADERS}`,
    );
  });

  test("a row with fewer columns than named is refused with its line", () => {
    expect(refusalOf("1,2\n2,3\n", "pump2.csv", { columns: "f,skip,gain_db" })).toBe(
      "pump2.csv:1: 2 columns; allowed are rows of frequency and dB",
    );
  });
});
