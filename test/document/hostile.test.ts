import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { problemText } from "../../src/document/problem.ts";
import { context, EXAMPLE, message, read, withStages } from "./read-here.ts";

/** Control characters and those that turn the reading direction: none may reach a terminal. */
const UNSAFE = /[\u0000-\u001f\u007f-\u009f\u200e\u200f\u202a-\u202e\u2066-\u2069]/;

const GAIN = '{"kind":"gain","parts":{"gain":1}}';
const stagesOf = (count: number) => withStages(Array.from({ length: count }, () => GAIN).join(","));

describe("hostile texts", () => {
  test("nested 100 000 deep", () => {
    const expected = /1:65: the chain: brackets are nested more than 64 deep/;
    expect(message("[".repeat(100_000))).toMatch(expected);
    expect(message('{"a":'.repeat(100_000))).toMatch(/1:321: the chain: brackets are nested/);
    expect(message(`{"x": "${"[".repeat(100)}"}`)).toMatch(/format: it is missing/);
  });

  test("longer than 5 000 000 characters", () => {
    expect(message(" ".repeat(5_000_001))).toMatch(
      /1:1: the chain: the text has 5000001 characters; allowed is at most/,
    );
  });

  test("with 200 stages and one more", () => {
    expect(message(stagesOf(200))).toBe("ok");
    // 13 characters in front of the list's first entry, each of 34 characters and a comma.
    expect(message(stagesOf(201))).toBe(
      "pump2.chain.json:4:7014: stages[200]: there are 201 stages; allowed is at most 200",
    );
  });

  test("with a hundred thousand unknown names", () => {
    const many = Array.from({ length: 100_000 }, (_, k) => `"k${k}":${k}`).join(",");
    expect(message(`{"format":"halfpower-chain","version":1,"stages":[],${many}}`)).toMatch(
      /: k0: there is no "k0" here/,
    );
    expect(message(withStages(`{"kind":"gain","parts":{${many}}}`))).toMatch(/gain has no part "k0"/);
  });

  test("with control characters in names and values", () => {
    const nasty = "\\u001b[2J\\u0007\\u202e\\u009b";
    const messages = [
      message(withStages(`{"kind":"${nasty}"}`)),
      message(withStages(`{"kind":"gain","parts":{"${nasty}":1}}`)),
      message(withStages(`{"kind":"gain","parts":{"gain":"${nasty}"}}`)),
      message(withStages(`{"kind":"formula","parts":{"H":"${nasty}"}}`)),
      message(`{"format":"halfpower-chain","version":1,"stages":[],"${nasty}":1}`),
      message("\u001b[2J{}"),
    ];
    for (const text of messages) {
      expect(text).toMatch(/^pump2\.chain\.json:\d+:\d+: .+; allowed is /);
      expect(text).not.toMatch(UNSAFE);
    }
  });

  test("with names that objects have of themselves", () => {
    for (const name of ["constructor", "toString", "hasOwnProperty", "valueOf"]) {
      expect(message(withStages(`{"kind":"${name}"}`))).toMatch(/there is no kind/);
      expect(message(withStages(`{"kind":"gain","parts":{"${name}":1}}`))).toMatch(/has no part/);
      expect(message(withStages(`{"kind":"gain","parts":{"gain":1},"tolerance":{"${name}":"1%"}}`))).toMatch(
        /has no part/,
      );
      expect(message(withStages(`{"kind":"formula","parts":{"H":"${name}"}}`))).toMatch(/is not given/);
      expect(message(withStages(`{"kind":"formula","parts":{"H":"${name}*s","${name}":2}}`))).toBe("ok");
    }
  });

  test("with numbers that leave their range", () => {
    expect(message(withStages('{"kind":"gain","parts":{"gain":-1e400}}'))).toMatch(
      /-Infinity is not a finite number/,
    );
    expect(message(withStages('{"kind":"gain","parts":{"gain":"1e-400"}}'))).toMatch(/too small/);
    const huge = '"kind":"rc-lowpass","parts":{"R":1e308,"C":1e308}';
    expect(message(withStages("", ',"source":{"R":1e308,"C":1e308}'))).toMatch(/source: the values together/);
    expect(message(withStages(`{${huge}}`))).toMatch(/^(ok|.*the values together)/);
  });
});

/** Every value of the example by path, to be replaced by something else. */
function paths(value: unknown, path: readonly (string | number)[] = []): (readonly (string | number)[])[] {
  if (typeof value !== "object" || value === null) return [path];
  return [path, ...Object.entries(value).flatMap(([key, inner]) => paths(inner, [...path, key]))];
}

const ALL_PATHS = paths(JSON.parse(EXAMPLE));

function replaced(value: unknown, path: readonly (string | number)[], by: unknown): unknown {
  const [step, ...rest] = path;
  if (step === undefined) return by;
  const copy = (Array.isArray(value) ? [...value] : { ...(value as object) }) as Record<string, unknown>;
  copy[step] = replaced(copy[step], rest, by);
  return copy;
}

/** Either it is read, or there is one full message; nothing is thrown. */
function expectAnswer(text: string): void {
  const loaded = read(text);
  if (loaded.ok) return;
  const { place, found, allowed } = loaded.problem;
  const shown = problemText(loaded.problem);
  expect(place?.line).toBeGreaterThanOrEqual(1);
  expect(place?.column).toBeGreaterThanOrEqual(1);
  expect([found, allowed]).not.toContain("");
  expect(shown).toMatch(/^pump2\.chain\.json:\d+:\d+: .+: .+; allowed is .+/);
  expect(shown).not.toMatch(/undefined|\[object/);
  expect(shown).not.toMatch(UNSAFE);
}

describe("whatever is in the file, it is read or there is one full message", () => {
  const odd = fc.oneof(
    fc.constantFrom(
      "",
      "0",
      "-1",
      "1e999",
      "4,7",
      "5%",
      "-6 dB",
      "lowpass",
      "elliptic",
      "toString",
      "\u001b[m",
      "1 F",
    ),
    fc.constantFrom(0, -1, 1e308, 5e-324, 1e-300, 31, 2.5, -0),
    fc.constantFrom(null, true, false, [], {}, [[]], { a: 1 }),
    fc.jsonValue({ maxDepth: 2 }),
  );

  test("with any values in the place of others", () => {
    const edits = fc.array(fc.tuple(fc.constantFrom(...ALL_PATHS), odd), { minLength: 1, maxLength: 3 });
    fc.assert(
      fc.property(edits, (changes) => {
        const changed = changes.reduce<unknown>((data, [path, value]) => {
          const whole = typeof data === "object" && data !== null ? data : {};
          try {
            return replaced(whole, path, value);
          } catch {
            return whole;
          }
        }, JSON.parse(EXAMPLE));
        expectAnswer(JSON.stringify(changed, null, 1));
      }),
      { numRuns: 1500, seed: 11 },
    );
  });

  test("with characters put in, left out or doubled", () => {
    const cut = fc.tuple(
      fc.nat(EXAMPLE.length),
      fc.nat(8),
      fc.oneof(fc.string({ maxLength: 3 }), fc.constantFrom('"', "{", "]", ",", "\\", "//", "1e", "\r")),
    );
    fc.assert(
      fc.property(cut, ([start, length, put]) => {
        expectAnswer(EXAMPLE.slice(0, start) + put + EXAMPLE.slice(start + length));
      }),
      { numRuns: 1500, seed: 12 },
    );
  });

  test("with any expression in a formula", () => {
    const word = fc.constantFrom(
      "s",
      "1",
      "2.5",
      "+",
      "-",
      "*",
      "/",
      "^",
      "(",
      ")",
      "exp",
      "sqrt",
      "k",
      "pi",
      " ",
      ",",
      "e",
      "!",
      "'",
      "1e3",
      "\n",
    );
    fc.assert(
      fc.property(fc.array(word, { maxLength: 12 }), (words) => {
        const parts = { H: words.join(""), k: 2 };
        expectAnswer(withStages(JSON.stringify({ kind: "formula", parts })));
      }),
      { numRuns: 2000, seed: 13 },
    );
  });
});

test("a table that cannot be read is a problem like any other", () => {
  expect(context.table("other.csv").ok).toBe(false);
  expect(message(withStages('{"kind":"table","parts":{"file":"probe.csv"}}'))).toBe("ok");
});
