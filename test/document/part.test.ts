import { expect, test } from "vitest";
import { STAGE_KINDS } from "../../src/core/stages/index.ts";
import { checkPart } from "../../src/document/part.ts";
import { pathText, problemAt, problemText } from "../../src/document/problem.ts";
import { resolveChain } from "../../src/document/resolve.ts";
import { nearNames } from "../../src/document/words.ts";
import { context } from "./read-here.ts";

test("one value is checked while it is typed", () => {
  expect(checkPart("rc-lowpass", "R", "4k7", context)).toEqual({ ok: true, value: 4700 });
  expect(checkPart("gain", "gain", "-6 dB", context)).toMatchObject({
    ok: true,
    value: expect.closeTo(0.5011872, 7),
  });
  expect(checkPart("filter", "shape", "lowpass", context)).toEqual({ ok: true, value: "lowpass" });
  expect(checkPart("formula", "tau", "10u", context)).toEqual({ ok: true, value: 1e-5 });
  expect(checkPart("rc-lowpass", "R", "4k7x", context).ok).toBe(false);
  expect(checkPart("rc-lowpass", "X", 1, context).ok).toBe(false);
  expect(checkPart("none", "X", 1, context).ok).toBe(false);
});

test("a formula without a parser is a problem", () => {
  const without = { ...context, formula: undefined };
  expect(checkPart("formula", "H", "s", without)).toMatchObject({
    ok: false,
    problem: { found: "formulas cannot be read here" },
  });
});

test.each(STAGE_KINDS.map(({ kind }) => kind))(
  "%s is complete with the values that its chooser starts with",
  (name) => {
    const kind = STAGE_KINDS.find((one) => one.kind === name);
    const initial = (kind?.parts ?? []).filter(({ optional, initial }) => !optional || initial !== undefined);
    const parts = Object.fromEntries(
      initial.map((spec) => [spec.name, spec.type === "file" ? "probe.csv" : (spec.initial ?? "")]),
    );
    const resolved = resolveChain(
      { format: "halfpower-chain", version: 1, stages: [{ kind: name, parts }] },
      context,
    );
    expect(resolved).toMatchObject({ ok: true });
  },
);

test("problems without a text have a path and no place", () => {
  const document = {
    format: "halfpower-chain",
    version: 1,
    stages: [{ kind: "gain", parts: { gain: 0 } }],
  } as const;
  const resolved = resolveChain(document, context);
  expect(resolved.ok ? "" : problemText(resolved.problem)).toBe(
    "stages[0].parts.gain: 0 is out of range; allowed is anything but 0",
  );
});

test("paths are written as they would be in a program", () => {
  expect(pathText(["stages", 2, "parts", "R"])).toBe("stages[2].parts.R");
  expect(pathText(["limits", 0])).toBe("limits[0]");
  expect(pathText(["two words"])).toBe('["two words"]');
  expect(pathText([])).toBe("the chain");
});

test("a message is one line, whatever the name of the file", () => {
  const place = { fileName: "a\n\u001b[2Jb", line: 1, column: 2 };
  expect(problemText({ ...problemAt(["x"], "found 1", "2"), place })).toBe(
    "a [2Jb:1:2: x: found 1; allowed is 2",
  );
});

test("names that may have been meant", () => {
  const names = ["rc-lowpass", "rl-lowpass", "gain", "lowpass-1"];
  expect(nearNames("RC_Lowpass", names)).toEqual(["rc-lowpass", "rl-lowpass"]);
  expect(nearNames("gian", names)).toEqual([]);
  expect(nearNames("gainn", names)).toEqual(["gain"]);
  expect(nearNames("lowpass", names)).toEqual(["lowpass-1", "rc-lowpass", "rl-lowpass"]);
  expect(nearNames("", names)).toEqual([]);
  expect(nearNames("x".repeat(100_000), names)).toEqual([]);
});
