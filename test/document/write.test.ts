import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { ChainDocument, StageDocument } from "../../src/document/types.ts";
import { chainText } from "../../src/document/write.ts";
import { EXAMPLE, read } from "./read-here.ts";

function documentOf(text: string): ChainDocument {
  const loaded = read(text);
  if (!loaded.ok) throw new Error(`refused: ${loaded.problem.found}`);
  return loaded.value.document;
}

const original = { text: EXAMPLE, document: documentOf(EXAMPLE) };
const withStage = (document: ChainDocument, index: number, stage: StageDocument): ChainDocument => ({
  ...document,
  stages: document.stages.with(index, stage),
});
const [rfi, amp, filter] = original.document.stages;
const BUFFER: StageDocument = { kind: "gain", name: "buffer", parts: { gain: 1 } };

/** The lines that differ, old and new. */
function changedLines(text: string): readonly (readonly [string | undefined, string | undefined])[] {
  const [before, after] = [EXAMPLE.split("\n"), text.split("\n")];
  return after.map((line, k) => [before[k], line] as const).filter(([one, other]) => one !== other);
}

describe("what was not edited stays as it was written", () => {
  test("an unchanged document is its text, byte by byte", () => {
    expect(chainText(original.document, original)).toBe(EXAMPLE);
    expect(chainText(structuredClone(original.document), original)).toBe(EXAMPLE);
    const marked = { text: `\ufeff${EXAMPLE}`, document: original.document };
    expect(chainText(structuredClone(original.document), marked)).toBe(marked.text);
  });

  test("an edited value changes its own characters only", () => {
    const edited = withStage(original.document, 0, { ...rfi, parts: { ...rfi.parts, R: "2k2" } });
    expect(chainText(edited, original)).toBe(
      EXAMPLE.replace('"R": "1k", "C": "4n7"', '"R": "2k2", "C": "4n7"'),
    );
  });

  test("a stage put in is a line of its own", () => {
    const stages = original.document.stages.toSpliced(1, 0, BUFFER);
    const line = '    { "kind": "gain", "name": "buffer", "parts": { "gain": 1 } },\n';
    const at = EXAMPLE.indexOf('    { "kind": "amplifier"');
    expect(chainText({ ...original.document, stages }, original)).toBe(
      EXAMPLE.slice(0, at) + line + EXAMPLE.slice(at),
    );
  });

  test("a stage put in at the end follows a comma", () => {
    const stages = [...original.document.stages, BUFFER];
    const last = '"corner": "2k" } }';
    expect(chainText({ ...original.document, stages }, original)).toBe(
      EXAMPLE.replace(last, `${last},\n    { "kind": "gain", "name": "buffer", "parts": { "gain": 1 } }`),
    );
  });

  test("a stage taken out takes its line with it", () => {
    const stages = [rfi, filter];
    const lines = EXAMPLE.split("\n").filter((line) => !line.includes('"amplifier"'));
    expect(chainText({ ...original.document, stages }, original)).toBe(lines.join("\n"));
  });

  test("a moved stage takes its spelling along", () => {
    const spelled = EXAMPLE.replace('"Rout": "50"', '"Rout":   5.0e1');
    const source = { text: spelled, document: documentOf(spelled) };
    const [first, second, third] = source.document.stages;
    const lines = spelled.split("\n");
    const at = lines.findIndex((line) => line.includes("rc-lowpass"));
    [lines[at], lines[at + 1]] = [lines[at + 1], lines[at]];
    expect(chainText({ ...source.document, stages: [second, first, third] }, source)).toBe(lines.join("\n"));
  });

  test("a new entry of a stage stands behind the others on its line", () => {
    const edited = withStage(original.document, 1, { ...amp, off: true });
    expect(changedLines(chainText(edited, original))).toEqual([
      [
        '    { "kind": "amplifier", "name": "bridge amp", "parts": { "gain": "40 dB", "bandwidth": "50k", "Rin": "10M", "Rout": "50" } },',
        '    { "kind": "amplifier", "name": "bridge amp", "parts": { "gain": "40 dB", "bandwidth": "50k", "Rin": "10M", "Rout": "50" }, "off": true },',
      ],
    ]);
  });

  test("all stages taken out, and one put back", () => {
    const none = chainText({ ...original.document, stages: [] }, original);
    expect(documentOf(none).stages).toEqual([]);
    const empty = { text: none, document: documentOf(none) };
    expect(documentOf(chainText({ ...empty.document, stages: [BUFFER] }, empty)).stages).toEqual([BUFFER]);
  });

  test("line ends, tabs and number spelling survive an edit elsewhere", () => {
    const text = EXAMPLE.replaceAll("\n", "\r\n")
      .replaceAll("  ", "\t")
      .replace('"from": 1,', '"from": 1.0e0,');
    const source = { text, document: documentOf(text) };
    expect(chainText({ ...source.document, title: "Pump 3" }, source)).toBe(
      text.replace("Pump 2, strain bridge", "Pump 3"),
    );
  });
});

test("a new document is laid out with a stage to a line", () => {
  const document: ChainDocument = {
    format: "halfpower-chain",
    version: 1,
    source: { R: "350" },
    stages: [rfi, BUFFER],
    sweep: { from: 1, to: "1M" },
  };
  expect(chainText(document)).toBe(`{
  "format": "halfpower-chain",
  "version": 1,
  "source": { "R": "350" },
  "stages": [
    {
      "kind": "rc-lowpass",
      "name": "RFI filter",
      "parts": { "R": "1k", "C": "4n7" },
      "tolerance": { "R": "1%", "C": "10%" }
    },
    { "kind": "gain", "name": "buffer", "parts": { "gain": 1 } }
  ],
  "sweep": { "from": 1, "to": "1M" }
}
`);
});

describe("reading the text again gives exactly the document", () => {
  const value = fc.oneof(
    fc.integer({ min: 1, max: 1e6 }),
    fc.double({ min: 1e-12, max: 1e12, noNaN: true }),
    fc.constantFrom("1k", "4k7", "100", "0.1"),
  );
  const words = fc.oneof(
    fc.string({ maxLength: 8, unit: "binary" }),
    fc.constantFrom('"', "\\", "\n", "\u2028", "µΩ"),
  );
  const tolerance = fc.constantFrom<StageDocument>(
    { kind: "gain", tolerance: { gain: "1%" } },
    { kind: "gain", tolerance: {} },
    { kind: "gain" },
  );
  const gainStage = fc.tuple(value, words, fc.boolean(), tolerance).map(
    ([gain, name, off, rest]): StageDocument => ({
      ...rest,
      name,
      parts: { gain },
      ...(off ? { off } : {}),
    }),
  );
  const formulaStage = value.map((k): StageDocument => ({ kind: "formula", parts: { H: "k/(1+s)", k } }));
  const stage = fc.oneof(gainStage, formulaStage);

  type Edit = (document: ChainDocument) => ChainDocument;
  const stagesEdit =
    (change: (stages: readonly StageDocument[]) => readonly StageDocument[]): Edit =>
    (document) => ({
      ...document,
      stages: change(document.stages),
    });
  const place = fc.nat(5);
  const edit: fc.Arbitrary<Edit> = fc.oneof(
    fc.tuple(place, stage).map(([at, put]) => stagesEdit((all) => all.toSpliced(at, 0, put))),
    place.map((at) => stagesEdit((all) => all.toSpliced(at, 1))),
    fc
      .tuple(place, place)
      .map(([from, to]) =>
        stagesEdit((all) => all.toSpliced(from, 1).toSpliced(to, 0, ...all.slice(from, from + 1))),
      ),
    fc
      .tuple(place, words)
      .map(([at, name]) => stagesEdit((all) => all.map((one, k) => (k === at ? { ...one, name } : one)))),
    fc
      .tuple(place, stage)
      .map(([at, put]) => stagesEdit((all) => all.map((one, k) => (k === at ? put : one)))),
    place.map((at) =>
      stagesEdit((all) => all.map(({ name: _, ...one }, k) => (k === at ? one : { ...one }))),
    ),
    words.map(
      (title): Edit =>
        (document) => ({ ...document, title }),
    ),
    fc.constant<Edit>(({ limits: _, ...document }) => document),
    fc.constant<Edit>(({ limits = [], ...document }) => ({ limits: limits.toReversed(), ...document })),
    fc.constant<Edit>((document) => ({ ...document, limits: [], load: {} })),
    value.map(
      (from): Edit =>
        (document) => ({ ...document, sweep: { to: 1e13, from, perDecade: 1 } }),
    ),
    fc.constant<Edit>((document) => structuredClone(document)),
  );
  const spellings = [
    EXAMPLE,
    JSON.stringify(JSON.parse(EXAMPLE)),
    JSON.stringify(JSON.parse(EXAMPLE), null, "\t").replaceAll("\n", "\r\n"),
    '\ufeff {"stages" :[ ] ,"version":1,"format":"halfpower-chain"}\n\n',
    '{"format":"halfpower-chain","version":1,"stages":[{"kind":"gain","parts":{"gain":1e0}}]}',
  ];

  test("whatever the edits and the layout of the file", () => {
    fc.assert(
      fc.property(fc.constantFrom(...spellings), fc.array(edit, { maxLength: 6 }), (text, edits) => {
        const source = { text, document: documentOf(text) };
        const edited = edits.reduce((document, change) => change(document), source.document);
        const written = chainText(edited, source);
        const again = documentOf(written);
        expect(JSON.stringify(again)).toBe(JSON.stringify(edited));
        expect(again).toEqual(edited);
        expect(chainText(again, { text: written, document: again })).toBe(written);
      }),
      { numRuns: 1000, seed: 21 },
    );
  });

  test("also without a text to start from", () => {
    fc.assert(
      fc.property(fc.array(stage, { maxLength: 4 }), words, (stages, title) => {
        const document: ChainDocument = { format: "halfpower-chain", version: 1, title, stages };
        expect(documentOf(chainText(document))).toEqual(document);
      }),
      { numRuns: 300, seed: 22 },
    );
  });
});
