import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { sweepReadings } from "../src/core/readings.ts";
import { readAt } from "../src/core/response/exact.ts";
import { readChainText } from "../src/document/read.ts";
import { readStagePresetText } from "../src/document/stage-preset.ts";
import { verdictsOn } from "../src/document/verdicts.ts";
import { chainText } from "../src/document/write.ts";

const FOLDER = new URL("../presets/", import.meta.url);
const files = readdirSync(FOLDER).sort();
const chains = files.filter((name) => name.endsWith(".chain.json"));
const stages = files.filter((name) => name.endsWith(".stage.json"));
const NOTHING = {
  formula: undefined,
  table: () => ({ ok: false, problem: { found: "", allowed: "" } }) as const,
};

const textOf = (name: string) => readFileSync(new URL(name, FOLDER), "utf8");
function chainOf(name: string) {
  const read = readChainText(textOf(name), name, NOTHING);
  if (!read.ok) throw new Error(JSON.stringify(read.problem));
  return read.value;
}

/** What the notes of a chain say it does not keep; everything else has to keep all its limits. */
const NOT_KEPT: Readonly<Record<string, readonly string[]>> = {};

describe("shipped presets", () => {
  it("are enough, and nothing else lies there", () => {
    expect(chains.length).toBeGreaterThanOrEqual(20);
    expect(stages.length).toBeGreaterThanOrEqual(12);
    expect(chains.length + stages.length).toBe(files.length);
  });

  it.each(chains)("%s is read, computed over its sweep, and written back as it was", (name) => {
    const { document, resolved } = chainOf(name);
    expect(chainText(document, { text: textOf(name), document })).toBe(textOf(name));
    expect(resolved.title).not.toBe("");
    const { readings, withoutValueHz } = sweepReadings(resolved.chain, resolved.sweep);
    expect(withoutValueHz).toEqual([]);
    for (const { gainDb } of readings) expect(gainDb === null || Number.isFinite(gainDb)).toBe(true);
  });

  it.each(chains)("%s keeps the limits that it states", (name) => {
    const { resolved } = chainOf(name);
    const { limits } = verdictsOn(resolved);
    const failed = resolved.limits.filter((_, k) => limits[k]?.pass !== true).map((limit) => limit.name);
    expect(failed).toEqual(NOT_KEPT[name] ?? []);
  });

  it.each(stages)("%s is read", (name) => {
    const read = readStagePresetText(textOf(name), name, NOTHING);
    expect(read.ok || read.problem).toBe(true);
  });

  it("carry their caution where the mains come in", () => {
    const mains = files.filter((name) =>
      /notch|mains|50 Hz|60 Hz/i.test(textOf(name).replaceAll("IEC 60098", "")),
    );
    expect(mains.length).toBeGreaterThanOrEqual(3);
    for (const name of mains.filter((each) => /notch|thermocouple/.test(each))) {
      expect(textOf(name)).toContain("IEC 60384-14");
      expect(textOf(name)).toContain("licensed electrician");
    }
  });
});

interface Table {
  readonly source: string;
  readonly rows: readonly Readonly<Record<string, number>>[];
}
const table = (name: string): Table =>
  JSON.parse(readFileSync(new URL(`reference/${name}.json`, import.meta.url), "utf8"));

const gainAt = (name: string) => {
  const { chain } = chainOf(`${name}.chain.json`).resolved;
  return (freqHz: number) => readAt(chain, freqHz).gainDb;
};

const closeTo = (value: number, expected: number, toleranceDb: number, what: string): void => {
  if (!(Math.abs(value - expected) <= toleranceDb)) {
    throw new Error(`${what}: ${value} dB instead of ${expected} dB, more than ${toleranceDb} dB away`);
  }
};

/** At 6.3 kHz the table allows nothing: that is where the weighting is normalised; at 31.5 kHz all below. */
const ROUNDING = 1e-9;

describe("published weightings", () => {
  it.each([
    ["a-weighting", "A_printed_db", "A_formula_db"],
    ["c-weighting", "C_printed_db", "C_formula_db"],
  ])(
    "%s: IEC 61672-1, table to its printed tenth and analytic expression to 1e-5 dB",
    (name, printed, formula) => {
      const gain = gainAt(name);
      const points = table("a-c-weighting").rows.filter((row) => row.f_exact_hz !== undefined);
      expect(points.length).toBeGreaterThanOrEqual(34);
      for (const row of points) {
        const value = gain(row.f_exact_hz);
        closeTo(value, row[formula], 1.1e-5, `${row.f_nominal_hz} Hz`);
        closeTo(value, row[printed], 0.05 + 1e-5, `${row.f_nominal_hz} Hz printed`);
      }
    },
  );

  it.each([
    ["disc-playback", "formula_db"],
    ["disc-playback-subsonic", "with_7950us_amendment_db"],
  ])("%s: IEC 60098, time constants 3180, 318, 75 and 7950 µs", (name, column) => {
    const gain = gainAt(name);
    const points = table("disc-equalisation").rows.filter((row) => row.f_hz !== undefined);
    expect(points.length).toBeGreaterThanOrEqual(30);
    for (const row of points) {
      closeTo(gain(row.f_hz), row[column], 1.1e-5, `${row.f_hz} Hz`);
      if (column === "formula_db" && typeof row.printed_db === "number") {
        closeTo(gain(row.f_hz), row.printed_db, 0.006, `${row.f_hz} Hz printed`);
      }
    }
  });

  it.each([50, 75])("de-emphasis of %i µs: ITU-R BS.450-3", (tauUs) => {
    const gain = gainAt(`de-emphasis-${tauUs}us`);
    const points = table("de-emphasis").rows.filter((row) => row.tau_us === tauUs && row.f_hz !== undefined);
    expect(points.length).toBeGreaterThanOrEqual(8);
    for (const row of points) closeTo(gain(row.f_hz), row.deemphasis_db, 1e-5, `${row.f_hz} Hz`);
  });

  it("noise weighting: ITU-R BS.468-4 Table 1 within its tolerances, and its poles to 1e-5 dB", () => {
    const gain = gainAt("noise-weighting");
    const points = table("noise-weighting").rows.filter((row) => row.pole_zero_db !== undefined);
    expect(points.length).toBeGreaterThanOrEqual(20);
    for (const row of points) {
      const value = gain(row.f_hz);
      closeTo(value, row.pole_zero_db, 1.1e-5, `${row.f_hz} Hz`);
      expect(value - row.printed_db).toBeLessThanOrEqual(row.tolerance_plus_db + ROUNDING);
      expect(value - row.printed_db).toBeGreaterThanOrEqual((row.tolerance_minus_db ?? -Infinity) - ROUNDING);
    }
  });
});
