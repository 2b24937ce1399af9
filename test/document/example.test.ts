import { describe, expect, test } from "vitest";
import { resolveChain } from "../../src/document/resolve.ts";
import { context, EXAMPLE, read } from "./read-here.ts";

/** Expected values are those of the file, converted by hand. */
function loadedExample() {
  const loaded = read(EXAMPLE);
  if (!loaded.ok) throw new Error("the example of the format was refused");
  return loaded.value;
}

describe("the example of the format", () => {
  const { document, resolved } = loadedExample();

  test("keeps every value as written", () => {
    expect(document.stages[0].parts).toEqual({ R: "1k", C: "4n7" });
    expect(document.sweep).toEqual({ from: 1, to: "1M", perDecade: 50 });
    expect(Object.keys(document)).toEqual(Object.keys(JSON.parse(EXAMPLE)));
  });

  test("has its stages in SI units", () => {
    expect(resolved.stages.map(({ name, kind, off }) => ({ name, kind, off }))).toEqual([
      { name: "RFI filter", kind: "rc-lowpass", off: false },
      { name: "bridge amp", kind: "amplifier", off: false },
      { name: "anti-alias", kind: "filter", off: false },
    ]);
    expect(resolved.stages[0].values).toEqual({ R: 1000, C: 4.7e-9 });
    expect(resolved.stages[0].tolerances).toEqual({ R: 0.01, C: 0.1 });
    expect(resolved.stages[1].values).toEqual({ gain: 100, bandwidth: 50e3, Rin: 10e6, Rout: 50 });
    expect(resolved.stages[2].values).toEqual({
      shape: "lowpass",
      family: "butterworth",
      order: 4,
      corner: 2000,
    });
  });

  test("has its surroundings in SI units", () => {
    expect(resolved).toMatchObject({
      title: "Pump 2, strain bridge",
      against: "emf",
      temperatureC: 25,
      emfV: 1,
      distribution: "uniform",
      source: { R: 350, joined: "series" },
      load: { R: 1e6, C: 30e-12, joined: "parallel" },
      converter: { rateHz: 20e3, bits: 16, fullScaleV: 5, bandHz: 1e3 },
      sweep: { fromHz: 1, toHz: 1e6, perDecade: 50 },
      cautions: [],
    });
    expect(resolved.limits).toEqual([
      { name: "flat band", quantity: "gain", fromHz: 10, toHz: 1e3, atLeast: -0.5, atMost: 0.5, reHz: 100 },
      { name: "above Nyquist", quantity: "gain", fromHz: 19e3, toHz: 1e6, atMost: -60, reHz: 100 },
    ]);
  });

  test("gives the engine its stages and impedances", () => {
    expect(resolved.chain.stages).toEqual(resolved.stages.map(({ stage }) => stage));
    expect(resolved.chain.sourceImpedance).toMatchObject({ num: [350], den: [1] });
    expect(resolved.chain.loadImpedance?.num[0]).toBe(1e6);
  });

  test("leaves a stage that is off out of the line", () => {
    const stages = document.stages.map((stage, index) => (index === 1 ? { ...stage, off: true } : stage));
    const off = resolveChain({ ...document, stages }, context);
    expect(off.ok && off.value.stages).toHaveLength(3);
    expect(off.ok && off.value.chain.stages.map(({ name }) => name)).toEqual(["RFI filter", "anti-alias"]);
  });

  test("keeps the other stages' objects when one is edited", () => {
    const stages = document.stages.map((stage, index) =>
      index === 0 ? { ...stage, parts: { ...stage.parts, R: "2k" } } : stage,
    );
    const edited = resolveChain({ ...document, stages }, context);
    if (!edited.ok) throw new Error("the edit was refused");
    expect(edited.value.stages[0].values.R).toBe(2000);
    expect(edited.value.stages[1].stage).toBe(resolved.stages[1].stage);
    expect(edited.value.stages[2].stage).toBe(resolved.stages[2].stage);
  });

  test("looks at a stage anew when its surroundings have changed", () => {
    const again = resolveChain(document, { ...context });
    expect(again.ok && again.value.stages[0]).not.toBe(resolved.stages[0]);
  });
});

test("a file of three entries has the defaults of the format", () => {
  const loaded = read('{"format":"halfpower-chain","version":1,"stages":[]}');
  expect(loaded.ok && loaded.value.resolved).toMatchObject({
    title: "",
    against: "emf",
    temperatureC: 25,
    emfV: 1,
    distribution: "uniform",
    source: { R: 0, joined: "series" },
    load: { joined: "parallel" },
    sweep: { fromHz: 1, toHz: 1e6, perDecade: 50 },
    chain: { loadImpedance: undefined, stages: [] },
    limits: [],
  });
});

test("a byte order mark is no part of the text", () => {
  expect(read(`\ufeff${EXAMPLE}`).ok).toBe(true);
});

test("texts that are shown cannot steer the terminal", () => {
  const stages = '[{"kind":"gain","name":"\\u001b[2Jamp\\u202e","caution":"a\\nb","parts":{"gain":1}}]';
  const loaded = read(`{"format":"halfpower-chain","version":1,"title":"\\u0007x","stages":${stages}}`);
  if (!loaded.ok) throw new Error("refused");
  const { resolved, document } = loaded.value;
  expect([resolved.title, resolved.chain.stages[0].name, resolved.cautions]).toEqual([
    "x",
    "[2Jamp",
    ["a b"],
  ]);
  expect(document.title).toBe("\u0007x");
});
