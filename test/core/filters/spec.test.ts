import { describe, expect, it } from "vitest";
import { checkPrototype, type PrototypeSpec } from "../../../src/core/filters/spec.ts";
import { checkFilter, designSections, type FilterSpec } from "../../../src/core/filters/transform.ts";

const LOSS = "from 1e-9 to 1000 dB";

describe("checkPrototype(spec) refuses", () => {
  it.each<[PrototypeSpec, string, string, string]>([
    [{ family: "bessel", order: 0 }, "order", "0", "a whole number from 1 to 30"],
    [{ family: "bessel", order: 31 }, "order", "31", "a whole number from 1 to 30"],
    [{ family: "bessel", order: 2.5 }, "order", "2.5", "a whole number from 1 to 30"],
    [{ family: "chebyshev", order: 3 }, "ripple", "it is missing, and chebyshev needs it", LOSS],
    [{ family: "chebyshev", order: 3, rippleDb: 0 }, "ripple", "0 dB", LOSS],
    [{ family: "chebyshev", order: 3, rippleDb: Number.NaN }, "ripple", "NaN dB", LOSS],
    [
      { family: "inverse-chebyshev", order: 3 },
      "stop",
      "it is missing, and inverse-chebyshev needs it",
      LOSS,
    ],
    [{ family: "inverse-chebyshev", order: 3, stopDb: -40 }, "stop", "-40 dB", LOSS],
    [
      { family: "elliptic", order: 3, rippleDb: 1, stopDb: 1 },
      "stop",
      "1 dB is not above the ripple",
      "more than 1 dB",
    ],
    [
      { family: "elliptic", order: 3, rippleDb: 2, stopDb: 1 },
      "stop",
      "1 dB is not above the ripple",
      "more than 2 dB",
    ],
  ])("%j", (spec, part, found, allowed) => {
    expect(checkPrototype(spec)).toEqual({
      ok: false,
      problem: { part, found, allowed },
    });
  });

  it("an elliptic order whose stop edge falls on the corner, and names the greatest that works", () => {
    const spec: PrototypeSpec = { family: "elliptic", order: 30, rippleDb: 1, stopDb: 20 };
    const result = checkPrototype(spec);
    expect(result).toMatchObject({ ok: false, problem: { part: "order" } });
    const largest = Number(/up to (\d+)/.exec(result.ok ? "" : result.problem.allowed)?.[1]);
    expect(checkPrototype({ ...spec, order: largest }).ok).toBe(true);
    expect(checkPrototype({ ...spec, order: largest + 1 }).ok).toBe(false);
  });

  it("nothing that its family does not use", () => {
    expect(checkPrototype({ family: "butterworth", order: 3, rippleDb: -1, stopDb: -1 }).ok).toBe(true);
  });
});

describe("checkFilter(spec) refuses", () => {
  const base = { family: "butterworth" as const, order: 2 };
  it.each<[FilterSpec, string, string, string]>([
    [
      { ...base, shape: "lowpass" },
      "corner",
      "it is missing, and a lowpass needs it",
      "a frequency above 0 Hz",
    ],
    [{ ...base, shape: "highpass", cornerHz: 0 }, "corner", "0 Hz", "a frequency above 0 Hz"],
    [
      { ...base, shape: "bandpass", highHz: 2 },
      "low",
      "it is missing, and a bandpass needs it",
      "a frequency above 0 Hz",
    ],
    [
      { ...base, shape: "bandstop", lowHz: 2 },
      "high",
      "it is missing, and a bandstop needs it",
      "a frequency above 0 Hz",
    ],
    [{ ...base, shape: "bandpass", lowHz: 2, highHz: 2 }, "high", "2 Hz is not above low", "more than 2 Hz"],
  ])("%j", (spec, part, found, allowed) => {
    expect(checkFilter(spec)).toEqual({ ok: false, problem: { part, found, allowed } });
    expect(designSections(spec)).toEqual(checkFilter(spec));
  });
});
