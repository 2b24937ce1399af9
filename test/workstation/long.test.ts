import stringWidth from "string-width";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { shippedPresetsFolder } from "../../src/effects/paths.ts";
import { openPresets } from "../../src/effects/presets.ts";
import { type Home, makeHome, openStation, type Station, type StationOptions } from "../helpers/station.ts";

let home: Home;
const stations: Station[] = [];
beforeEach(() => {
  home = makeHome();
});
afterEach(() => {
  for (const station of stations.splice(0)) station.close();
  home.remove();
});

async function open(options: Partial<StationOptions>): Promise<Station> {
  const station = await openStation({ home, ...options });
  stations.push(station);
  return station;
}

const SIZES = [
  { columns: 60, rows: 18 },
  { columns: 80, rows: 24 },
  { columns: 100, rows: 30 },
  { columns: 160, rows: 48 },
];

/** Wide, combining and bidirectional characters, and what must never reach a terminal. */
const STRANGE = "水中听音器 e\u0301 \u202Eabc\u202C \u001b[31mred\u0007";

const chainOf = (count: number, title: string, name: (k: number) => string) =>
  JSON.stringify({
    format: "halfpower-chain",
    version: 1,
    title,
    stages: Array.from({ length: count }, (_, k) => ({
      kind: k % 2 === 0 ? "rc-lowpass" : "amplifier",
      name: name(k),
      parts: k % 2 === 0 ? { R: "1k", C: "1n" } : { gain: 1 },
    })),
  });

/** What is right about every screen: as many rows as there are, none too wide, nothing stale, charts in their columns. */
async function expectSound(station: Station, size: { columns: number; rows: number }): Promise<void> {
  const rows = station.screen();
  expect(rows).toHaveLength(size.rows);
  for (const row of rows) expect(stringWidth(row)).toBeLessThanOrEqual(size.columns);
  expect(await station.stale()).toEqual([]);
  expect(station.text()).not.toContain("\u001b");
}

/** Columns in which the charts' axis stands, one for each row of the charts. */
function axisColumns(station: Station): Set<number> {
  const columns = new Set<number>();
  for (const row of station.screen()) {
    const at = /^(.*?)[┤│└]/.exec(row);
    if (at !== null) columns.add(stringWidth(at[1] as string));
  }
  return columns;
}

describe.each(SIZES)("at %o", (size) => {
  it("40 stages scroll, the row in hand always in sight", async () => {
    const path = home.write(
      "long.chain.json",
      chainOf(40, "forty stages", (k) => `stage number ${k + 1}`),
    );
    const station = await open({ chain: path, size });
    for (let k = 1; k <= 40; k++) {
      expect(station.text()).toMatch(new RegExp(`▸ *${k} stage n`));
      await station.press("down");
    }
    await expectSound(station, size);
    expect(axisColumns(station).size).toBe(1);
  });

  it("a title of 120 characters and names of any script keep the columns straight", async () => {
    const path = home.write(
      "strange.chain.json",
      chainOf(6, `${STRANGE} `.repeat(8).slice(0, 120), () => STRANGE),
    );
    const station = await open({ chain: path, size });
    await expectSound(station, size);
    expect(axisColumns(station).size).toBe(1);
    await station.press("down", "r", "end");
    await station.type("漢字");
    await expectSound(station, size);
    await station.press("enter", "a");
    await expectSound(station, size);
  });

  it("200 presets scroll, and narrow down to one", async () => {
    const presets = openPresets({ config: home.path("config"), shipped: shippedPresetsFolder() });
    const text = chainOf(1, "kept", () => "input");
    await presets.save("preset 7", text, home.folder);
    const { readFileSync, writeFileSync } = await import("node:fs");
    const settings = JSON.parse(readFileSync(home.path("config/settings.json"), "utf8"));
    const [one] = settings.presets;
    settings.presets = Array.from({ length: 200 }, (_, k) => ({ ...one, name: `preset ${k + 1}` }));
    writeFileSync(home.path("config/settings.json"), JSON.stringify(settings));
    const station = await open({ chain: home.write("a.chain.json", text), size });
    await station.press("P");
    await expect.poll(() => station.text()).toMatch(/1 of 2\d\d/);
    await station.press("end");
    await expect.poll(() => station.text()).toContain("▸ preset 200");
    await expectSound(station, size);
    await station.type("preset 137");
    await expect.poll(() => station.text()).toContain("1 of 1");
    await expectSound(station, size);
  });
});

describe("other sizes", () => {
  it("below 60x18 one line says what is needed, and any change of size repaints", async () => {
    const station = await open({
      chain: home.write(
        "a.chain.json",
        chainOf(3, "resized", (k) => `s${k}`),
      ),
    });
    const sizes = [
      { columns: 59, rows: 18 },
      { columns: 60, rows: 17 },
      { columns: 10, rows: 2 },
      { columns: 60, rows: 18 },
      { columns: 200, rows: 60 },
      { columns: 61, rows: 40 },
      { columns: 1, rows: 1 },
      { columns: 80, rows: 24 },
    ];
    for (const size of sizes) {
      await station.emulator.resize(size);
      await station.settled();
      expect(await station.stale()).toEqual([]);
      const isSmall = size.columns < 60 || size.rows < 18;
      if (size.columns >= 59 && isSmall) expect(station.text()).toContain("60x18 is needed");
      if (!isSmall) expect(station.text()).toContain("gain against EMF");
    }
  });
});

/** The frame holds more than a plain terminal is shown; painted anew, nothing must look another way. */
async function expectSameWhenPaintedAnew(station: Station): Promise<void> {
  const before = station.screen();
  await station.press("ctrl+l");
  expect(station.screen()).toEqual(before);
}

describe("plain terminals", () => {
  it("only ASCII reaches one that is not UTF-8, whatever is open", async () => {
    const path = home.write(
      "strange.chain.json",
      chainOf(5, STRANGE, () => STRANGE),
    );
    const station = await open({ chain: path, env: { LANG: "C", LC_ALL: "C" } });
    const keys = [
      "p",
      "pageup",
      "b",
      "space",
      "a",
      "escape",
      "?",
      "escape",
      "g",
      "escape",
      "t",
      "5",
      "escape",
      "y",
      "escape",
      "e",
    ];
    for (const key of keys) {
      await station.press(key);
      await expectSameWhenPaintedAnew(station);
    }
    expect(station.emulator.writes.join("").replace(/\u001b/g, "")).toMatch(/^[\u0000-\u007e]*$/);
  });

  it.each([{ NO_COLOR: "1" }, { TERM: "vt100" }])(
    "no colour is written with %o, and everything is still there",
    async (env) => {
      const station = await open({
        chain: home.write(
          "a.chain.json",
          chainOf(3, "plain", (k) => `s${k}`),
        ),
        env,
      });
      await station.press("right", "p", "right", "b", "down", "+");
      // SGR 30–37, 90–97 and 38 are colours of letters (ECMA-48, 8.3.117).
      expect(station.emulator.writes.join("")).not.toMatch(/\u001b\[[\d;]*\b(3[0-8]|9[0-7])m/);
      for (const sign of ["◆", "◇", "▸", "›"]) expect(station.text()).toContain(sign);
      await expectSameWhenPaintedAnew(station);
    },
  );
});
