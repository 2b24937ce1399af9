import { afterEach, beforeEach, describe, expect, it } from "vitest";
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

const chain = (stages: readonly object[], rest: object = {}) =>
  JSON.stringify({ format: "halfpower-chain", version: 1, title: "flow meter", ...rest, stages });

async function open(text: string): Promise<Station> {
  station = await openStation({ home, chain: home.write("flow.chain.json", text) });
  return station;
}

const kindsOf = (running: Station) => running.state().document.stages.map(({ kind }) => kind);

describe("design", () => {
  it("protects the converter's band, shows the families side by side and inserts the one taken", async () => {
    const converter = { rate: "10k", bits: 12, fullScale: 5, band: "1k" };
    const running = await open(chain([{ kind: "gain", parts: { gain: 10 } }], { converter }));
    await running.press("D");
    // What folds into 1 kHz begins at 9 kHz; 6.02·12 + 1.76 = 74 dB.
    expect(running.text()).toMatch(/stop edge +9k/);
    expect(running.text()).toMatch(/stop loss +74/);
    // ln √((10^7.4 − 1)/(10^0.05 − 1))/ln 9 = 4.36; acosh of the same over acosh 9 = 3.56.
    await expect.poll(() => running.text()).toMatch(/butterworth +5/);
    await expect.poll(() => running.text()).toMatch(/elliptic +\d/);
    expect(running.text()).toMatch(/chebyshev +4/);
    expect(running.text()).toContain("charts show butterworth low-pass of order 5");
    await running.press("down", "down", "down", "down", "right");
    for (let k = 0; k < 6; k++) await running.press("down");
    await expect.poll(() => running.text()).toContain("parts within");
    await running.press("enter");
    expect(kindsOf(running)).toContain("sallen-key-lowpass");
    expect(running.text()).toContain("designed: chebyshev of order 4");
    expect(await running.stale()).toEqual([]);
    await running.press("u");
    expect(kindsOf(running)).toEqual(["gain"]);
  });

  it("says what is wrong with an edge while it is typed", async () => {
    const running = await open(chain([{ kind: "gain", parts: { gain: 10 } }]));
    await running.press("D", "ctrl+u");
    await running.type("20k");
    expect(running.side()).toContain("is not above the pass edge");
    await running.press("ctrl+u");
    await running.type("2k");
    expect(running.side()).not.toContain("is not above");
    await running.press("escape");
    expect(running.text()).not.toContain("unsaved");
  });
});

describe("one stage", () => {
  it("is made of real parts that stay near the ideal", async () => {
    const running = await open(
      chain([{ kind: "lowpass-2", name: "smoother", parts: { f0: "1k", Q: "0.707" } }]),
    );
    await running.press("b", "R");
    expect(kindsOf(running)).toEqual(["sallen-key-lowpass"]);
    expect(running.text()).toMatch(/within 0\.\d\d dB of the ideal/);
    const now = /now is ([+-]?[\d.]+) dB/.exec(running.text())?.[1];
    expect(Math.abs(Number(now))).toBeLessThan(0.3);
  });

  it("is snapped to the series, with the effect told", async () => {
    const running = await open(chain([{ kind: "rc-lowpass", parts: { R: "1.03k", C: "99n" } }]));
    await running.press("E");
    expect(running.state().document.stages[0]?.parts).toEqual({ R: "1k", C: "100n" });
    expect(running.text()).toMatch(/snapped to E24: \+0\.\d+ dB at the cursor/);
    await running.press("u");
    expect(running.state().document.stages[0]?.parts).toEqual({ R: "1.03k", C: "99n" });
  });

  it("has a part solved for a gain at the cursor", async () => {
    // The cursor stands at 1 kHz. 10·log10(1 + x²) = 20 gives x = √99, C = √99/(2π·1 kHz·1 kΩ) = 1.58357 µF.
    const running = await open(chain([{ kind: "rc-lowpass", parts: { R: "1k", C: "100n" } }]));
    await running.press("tab", "i");
    await running.type("-20");
    await running.press("enter");
    expect(running.state().document.stages[0]?.parts?.C).toBe("1.58357u");
    expect(running.text()).toContain("gain -20.000 dB");
    await running.press("i");
    await running.type("20");
    await running.press("enter");
    expect(running.text()).toContain("no C within 3 decades");
  });
});
