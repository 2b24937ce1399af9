import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { readAt } from "../../src/core/response/exact.ts";
import { type Home, makeHome, openStation, type Station } from "../helpers/station.ts";

let home: Home;
let station: Station | undefined;
beforeEach(() => {
  home = makeHome();
});
afterEach(() => {
  station?.close();
  station = undefined;
  home.remove();
});

const SIZES = [
  { columns: 60, rows: 18 },
  { columns: 80, rows: 24 },
  { columns: 100, rows: 30 },
  { columns: 160, rows: 48 },
];

const gainShown = (running: Station): string =>
  /at [^\n]* gain (-?[\d.]+) dB/.exec(running.text())?.[1] ?? "none";

describe.each(SIZES)("a morning's work at $columns×$rows", (size) => {
  it("opens the strain bridge, reads at 1 kHz, changes C, undoes, saves as, reloads and compares", async () => {
    station = await openStation({ home, size });
    const running = station;
    const press = async (...keys: string[]) => {
      await running.press(...keys);
      expect(await running.stale()).toEqual([]);
    };
    await press("f");
    await running.type("1k");
    await press("enter");
    expect(running.text()).toContain("at 1.0000 kHz");
    const start = gainShown(running);
    const exact = readAt(running.state().resolved.chain, 1000).gainDb;
    expect(start).toBe(exact.toFixed(3));
    // The second stage is the RFI filter; its second value is C.
    await press("down", "tab");
    await running.type("470n");
    expect(Number(gainShown(running))).toBeLessThan(Number(start) - 1);
    await press("enter");
    expect(running.text()).toContain("unsaved");
    const changed = gainShown(running);
    await press("u");
    expect(gainShown(running)).toBe(start);
    await press("U");
    expect(gainShown(running)).toBe(changed);
    await press("S", "ctrl+u");
    await running.type(home.path("bridge.chain.json"));
    await press("enter");
    expect(running.text()).not.toContain("unsaved");
    const saved = running.state().document;
    await press("u", "O");
    await running.type(home.path("bridge.chain.json"));
    await press("enter");
    // The step back is unsaved work, and is asked about.
    expect(running.side()).toContain("has unsaved work");
    await press("d");
    await expect.poll(() => running.state().document.stages[1]?.parts?.C).toBe("470n");
    expect(running.state().document).toEqual(saved);
    await press("f");
    await running.type("1k");
    await press("enter");
    expect(gainShown(running)).toBe(changed);
  });
});
