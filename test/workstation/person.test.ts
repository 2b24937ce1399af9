import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { openChainFile } from "../../src/effects/chain-files.ts";
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

async function open(options: Partial<StationOptions> = {}): Promise<Station> {
  const station = await openStation({ home, ...options });
  stations.push(station);
  return station;
}

/**
 * 1 kΩ and 100 nF behind an ideal source. By hand: fc = 1/(2πRC) = 1591.549 Hz; at 1 kHz x = f/fc = 0.628319,
 * |H| = 1/√(1+x²) = 0.846733, −1.4451 dB, −atan x = −32.1419°; with 200 nF x = 1.256637, −4.1147 dB, −51.4881°.
 */
const RC = `{
  "format": "halfpower-chain", "version": 1,
  "title": "hydrophone input",
  "source": { "R": 0 },
  "stages": [ { "kind": "rc-lowpass", "name": "input filter", "parts": { "R": "1k", "C": "100n" } } ]
}
`;
const rc = () => home.write("hydrophone.chain.json", RC);

/** The number behind a label in the reading at the foot of the screen. */
function read(station: Station, label: string): string {
  const found = new RegExp(` ${label} (-?[\\d.∞]+)`).exec(station.text());
  if (found === null) throw new Error(`no ${label} on\n${station.text()}`);
  return found[1] as string;
}

describe("a person at 100x30", () => {
  it("steps to 1 kHz and reads what is worked out by hand", async () => {
    const station = await open({ chain: rc() });
    // The sweep is 1 Hz to 1 MHz: the middle of it is 1 kHz.
    expect(read(station, "at")).toBe("1.0000");
    expect(read(station, "gain")).toBe("-1.445");
    expect(read(station, "phase")).toBe("-32.14");
    expect(read(station, "attenuation")).toBe("1.445");
    await station.press("pageup");
    expect(read(station, "at")).toBe("10.000");
    await station.press("pagedown", "left", "right");
    expect(Number(read(station, "gain"))).toBeCloseTo(-1.445, 1);
    expect(await station.stale()).toEqual([]);
  });

  it("types a frequency, and is told what is wrong with one", async () => {
    const station = await open({ chain: rc() });
    await station.press("f");
    await station.type("1591,5");
    await station.press("enter");
    expect(station.text()).toContain("comma");
    await station.press("backspace", "backspace");
    await station.type(".549");
    await station.press("backspace", "backspace", "backspace", "backspace");
    await station.type(".549431");
    await station.press("enter");
    expect(read(station, "gain")).toBe("-3.010");
    expect(read(station, "phase")).toBe("-45.00");
  });

  it("goes to the crossing of a typed level and to half power, on the exact response", async () => {
    const station = await open({ chain: rc() });
    await station.press("l");
    await station.type("-20");
    await station.press("enter");
    // |H| = 0.1: x = √99, f = 15 835.7 Hz.
    expect(station.text()).toContain("at 15.836 kHz");
    await station.press("home", "n");
    expect(station.text()).toContain("half power");
    // Half the power of the greatest gain, which at 1 Hz is 1.7e-6 dB below 0 dB: 1591.5500 Hz.
    expect(station.text()).toContain("at 1.5916 kHz");
  });

  it("changes C and sees the reading move, with every letter typed", async () => {
    const station = await open({ chain: rc() });
    await station.press("tab", "enter", "ctrl+u");
    await station.type("200");
    // 200 F: nothing is left of the signal, and the chart has followed already.
    expect(Number(read(station, "gain"))).toBeLessThan(-100);
    await station.type("n");
    expect(read(station, "gain")).toBe("-4.115");
    await station.type("x");
    expect(station.side()).toContain("after the number");
    expect(read(station, "gain")).toBe("-4.115");
    await station.press("backspace", "enter");
    expect(station.text()).toContain("C of input filter");
    expect(station.text()).toContain("unsaved");
    expect(read(station, "phase")).toBe("-51.49");
    expect(await station.stale()).toEqual([]);
  });

  it("gives an edit up with Esc, and undoes and redoes steps by their names", async () => {
    const station = await open({ chain: rc() });
    await station.press("tab");
    await station.type("47n");
    await station.press("escape");
    expect(read(station, "gain")).toBe("-1.445");
    expect(station.text()).not.toContain("unsaved");
    await station.press("+");
    expect(station.state().document.stages[0]?.parts?.C).toBe("110n");
    await station.press("u");
    expect(station.text()).toContain("undone: C of input filter");
    expect(station.text()).not.toContain("unsaved");
    await station.press("ctrl+r");
    expect(station.text()).toContain("done again: C of input filter");
    expect(station.state().document.stages[0]?.parts?.C).toBe("110n");
  });

  it("saves as, reloads and finds the same chain; what was not edited is as it was written", async () => {
    const station = await open({ chain: rc() });
    await station.press("tab");
    await station.type("220n");
    await station.press("enter", "S", "ctrl+u");
    await station.type(home.path("second.chain.json"));
    await station.press("enter");
    expect(station.text()).toContain("saved to");
    expect(station.text()).not.toContain("unsaved");
    expect(readFileSync(home.path("second.chain.json"), "utf8")).toBe(RC.replace("100n", "220n"));
    const before = station.state().document;
    await station.press("O");
    await station.type(home.path("hydrophone.chain.json"));
    await station.press("enter");
    expect(read(station, "gain")).toBe("-1.445");
    await station.press("O");
    await station.type(home.path("second.chain.json"));
    await station.press("enter");
    expect(station.state().document).toEqual(before);
  });

  it("is asked before unsaved work goes, and about a file that changed on the disk", async () => {
    const path = rc();
    const station = await open({ chain: path });
    await station.press("+", "q");
    expect(station.text()).toContain("unsaved work");
    await station.press("c");
    writeFileSync(path, RC.replace("1k", "2k"));
    await station.press("s");
    expect(station.side()).toContain("changed on the disk");
    expect(readFileSync(path, "utf8")).toContain("2k");
    await station.press("o");
    expect(readFileSync(path, "utf8")).toBe(RC.replace("1k", "1.1k"));
    await station.press("q");
    await station.left;
    expect(station.emulator.isAlternate).toBe(false);
  });

  it("adds, moves, takes out, duplicates and deletes stages", async () => {
    const station = await open({ chain: rc() });
    const kinds = () => station.state().document.stages.map(({ kind, off }) => (off ? `(${kind})` : kind));
    await station.press("a");
    await station.type("amplif");
    expect(station.text()).toContain("charts show amplifier alone");
    await station.press("enter");
    expect(kinds()).toEqual(["rc-lowpass", "amplifier"]);
    await station.press("{");
    expect(kinds()).toEqual(["amplifier", "rc-lowpass"]);
    await station.press("o");
    expect(kinds()).toEqual(["(amplifier)", "rc-lowpass"]);
    expect(read(station, "gain")).toBe("-1.445");
    await station.press("d", "delete", "up", "o");
    expect(kinds()).toEqual(["(amplifier)", "rc-lowpass"].map((kind) => kind.replace(/[()]/g, "")));
    for (let steps = 0; steps < 6; steps++) await station.press("u");
    expect(kinds()).toEqual(["rc-lowpass"]);
    expect(station.text()).not.toContain("unsaved");
  });

  it("adds a formula: the reader of formulas is loaded on the way", async () => {
    const station = await open({ chain: rc() });
    await station.press("a");
    await station.type("formula");
    await station.press("enter");
    await expect.poll(() => station.state().document.stages.length, { timeout: 10_000 }).toBe(2);
    await station.settled();
    expect(station.text()).toContain("1/(1 + s/6283)");
  });

  it("edits source, load, converter, sweep, tolerances and limits the same way", async () => {
    const station = await open({ chain: rc() });
    await station.press("up", "tab");
    await station.type("1k");
    await station.press("enter");
    // 2 kΩ in all: x = 1.256637.
    expect(read(station, "gain")).toBe("-4.115");
    await station.press("down", "t");
    await station.type("1%");
    await station.press("enter");
    expect(station.state().document.stages[0]?.tolerance).toEqual({ R: "1%" });
    await station.press("down");
    await station.type("2k");
    await station.press("enter");
    expect(station.state().document.load).toEqual({ R: "2k" });
    await station.press("down");
    await station.type("48k");
    await station.press("enter");
    expect(station.text()).toContain("folds to");
    await station.press("a");
    await station.type("limit gain");
    await station.press("enter");
    expect(station.state().document.limits?.[0]?.quantity).toBe("gain");
    await station.press("up", "up", "up", "up", "up", "up", "tab", "tab");
    await station.type("10");
    await station.press("enter");
    expect(station.state().document.sweep).toEqual({ from: "10" });
    expect(await station.stale()).toEqual([]);
  });

  it("pins, exchanges, keeps a response and reads the differences", async () => {
    const station = await open({ chain: rc() });
    await station.press("p", "pageup");
    // At 10 kHz x = 6.28319: −16.0711 dB, −80.957°.
    expect(station.text()).toMatch(/pin 1\.0000 kHz {2}from it -14\.6\d\d dB {2}-48\.8\d°/);
    expect(station.text()).toContain("+1.000 dec +3.32 oct");
    await station.press("x");
    expect(read(station, "at")).toBe("1.0000");
    await station.press("b", "tab");
    await station.type("200n");
    await station.press("enter");
    expect(station.text()).toMatch(/before -1\.445 dB -32\.14° {2}now is -2\.670 dB {2}-19\.35°/);
    await station.press("space");
    expect(station.text()).toContain("BEFORE");
    expect(read(station, "gain")).toBe("-1.445");
    await station.press("space");
    expect(read(station, "gain")).toBe("-4.115");
  });

  it("zooms, pans and goes back to the whole sweep", async () => {
    const station = await open({ chain: rc() });
    await station.press("z", "z", "z");
    const { fromHz, toHz } = station.state().window;
    expect(Math.log10(toHz / fromHz)).toBeCloseTo(6 / 8, 9);
    await station.press(">");
    expect(station.state().window.fromHz).toBeGreaterThan(fromHz);
    await station.press("v");
    await station.type("-30 10");
    await station.press("enter");
    expect(station.state().gainRange).toEqual({ lowDb: -30, highDb: 10 });
    await station.press("w");
    expect(station.state().window).toEqual({ fromHz: 1, toHz: 1e6 });
    expect(await station.stale()).toEqual([]);
  });

  it("looks at a preset before taking it, and keeps, renames and removes own ones", async () => {
    const station = await open({ chain: rc() });
    await station.press("K", "ctrl+u");
    await station.type("my hydrophone");
    await station.press("enter");
    await expect.poll(() => station.text()).toContain("kept as preset");
    await station.press("P");
    await expect.poll(() => station.text()).toContain("shipped chains");
    await station.type("my hydro");
    await expect.poll(() => station.text()).toContain("charts show hydrophone input");
    await station.press("ctrl+r", "ctrl+u");
    await station.type("line 2");
    await station.press("enter");
    await expect.poll(() => station.text()).toContain("presets");
    await station.type("line 2");
    await expect.poll(() => station.text()).toContain("▸ line 2");
    await station.press("delete", "r");
    await station.type("line 2");
    await expect.poll(() => station.text()).toContain("nothing fits");
    expect(existsSync(home.path("config/settings.json"))).toBe(true);
  });

  it("shows all keys, and scrolls them", async () => {
    const station = await open({ chain: rc(), size: { columns: 80, rows: 24 } });
    await station.press("?");
    expect(station.text()).toContain("cursor one column up");
    await station.press(...Array<string>(9).fill("pagedown"));
    expect(station.text()).toContain("licensed electrician");
    await station.press("up");
    await station.press("x");
    expect(station.text()).toContain("gain against EMF");
    expect(await station.stale()).toEqual([]);
  });
});

describe("work left behind", () => {
  it("is offered again after kill -9, and taken up as it was", async () => {
    const path = rc();
    // No process has this number: Linux gives out numbers up to 2^22.
    const station = await open({ chain: path, pid: 2 ** 22 + 1 });
    await station.press("tab");
    await station.type("330n");
    // Nothing ends the first one in order: its journal is what kill -9 leaves.
    const second = await open({ chain: path });
    expect(second.text()).toContain("Unsaved work was left behind");
    await second.press("t");
    expect(second.state().document.stages[0]?.parts?.C).toBe("330n");
    expect(second.text()).toContain("unsaved");
    await second.press("s");
    expect(readFileSync(path, "utf8")).toBe(RC.replace("100n", "330n"));
    const opened = await openChainFile(path);
    expect(opened.ok).toBe(true);
    const third = await open({ chain: path });
    expect(third.text()).not.toContain("Unsaved work was left behind");
  });
});
