import { readdirSync, readFileSync } from "node:fs";
import { dirname, join, relative } from "node:path";
import { describe, expect, it } from "vitest";
import { STAGE_KINDS } from "../src/core/stages/index.ts";

const root = new URL("..", import.meta.url).pathname;

interface Import {
  /** As written: `../core/chain.ts`, `node:fs`, `zod/mini`. */
  readonly from: string;
  /** Gone from what runs. */
  readonly typesOnly: boolean;
}

interface Source {
  /** From the root of the project on. */
  readonly path: string;
  readonly text: string;
  readonly imports: readonly Import[];
}

/** `import … from "…"` and `export … from "…"` over one line or several, `import "…"`, `import("…")`. */
const IMPORT =
  /^\s*(?:import|export)\b([^"';]*?)\bfrom\s+"([^"]+)"|^\s*import\s+"([^"]+)"|\bimport\(\s*"([^"]+)"\s*\)/gm;

const importsIn = (text: string): readonly Import[] =>
  [...text.matchAll(IMPORT)].map(([, imported, from, plain, later]) => ({
    from: from ?? plain ?? later,
    typesOnly: imported !== undefined && isTypesOnly(imported),
  }));

/** `type { A }`; the file behind `{ type A }` is still loaded, as verbatimModuleSyntax has it. */
const isTypesOnly = (imported: string): boolean => /^\s*type\s/.test(imported);

function sourcesIn(folder: string): readonly Source[] {
  return readdirSync(join(root, folder), { recursive: true, encoding: "utf8" })
    .filter((name) => /\.tsx?$/.test(name))
    .map((name) => join(folder, name))
    .sort()
    .map((path) => {
      const text = readFileSync(join(root, path), "utf8");
      return { path, text, imports: importsIn(text) };
    });
}

const sources = sourcesIn("src");
const tests = sourcesIn("test");

/** The layer of a file: its folder in src, or the file itself where it lies in src. */
const layerOf = (path: string): string => relative("src", path).split("/")[0];

const names = ({ imports }: Source): readonly string[] => imports.map(({ from }) => from);
const isOwn = (from: string): boolean => from.startsWith(".");
/** The version in package.json is no file of ours. */
const isSource = (source: Source, from: string): boolean =>
  isOwn(from) && target(source, from).startsWith("src/");
const target = ({ path }: Source, from: string): string => join(dirname(path), from);

/** What each layer may import beside itself: arrows point one way. */
const BELOW: Readonly<Record<string, readonly string[]>> = {
  core: [],
  document: ["core"],
  chart: ["core", "document"],
  editor: ["core", "document", "chart"],
  view: ["core", "document", "chart", "editor"],
  effects: ["core", "document", "editor"],
  cli: ["core", "document", "chart", "effects"],
  "workstation.tsx": ["core", "document", "chart", "editor", "view", "effects", "cli"],
  "main.ts": ["core", "document", "effects", "cli", "workstation.tsx"],
};

const PURE = ["core", "document", "chart", "editor"];

/** `path: what` of everything that breaks a rule; a rule holds where the list is empty. */
const breaches = (found: (source: Source) => readonly string[], among = sources): readonly string[] =>
  among.flatMap((source) => found(source).map((what) => `${source.path}: ${what}`));

const inLayers = (...layers: readonly string[]) =>
  sources.filter(({ path }) => layers.includes(layerOf(path)));

it("finds imports however they are written", () => {
  const text = `
    import type { A } from "a";
    import { type B, type C } from "b";
    import d, { type D } from "d";
    import {
      e,
    } from "e";
    import "f";
    export { g } from "g";
    export const from = "h";
    const i = await import("i");`;
  expect(importsIn(text).map(({ from, typesOnly }) => (typesOnly ? `type ${from}` : from))).toEqual([
    "type a",
    "b",
    "d",
    "e",
    "f",
    "g",
    "i",
  ]);
});

describe("layers", () => {
  it("are all known, and all there", () => {
    expect([...new Set(sources.map(({ path }) => layerOf(path)))].sort()).toEqual(Object.keys(BELOW).sort());
  });

  /** What a file imports from above its own layer, or from beside it. */
  const upward = (source: Source) => {
    const layer = layerOf(source.path);
    return names(source).filter((from) => {
      const to = layerOf(target(source, from));
      return isSource(source, from) && to !== layer && !BELOW[layer].includes(to);
    });
  };

  it("import only what lies below them", () => {
    expect(breaches(upward)).toEqual([]);
  });

  it.each([
    ["src/core/a.ts", "../document/b.ts"],
    ["src/core/units/a.ts", "../../document/b.ts"],
    ["src/document/a.ts", "../chart/b.ts"],
    ["src/chart/a.ts", "../editor/b.ts"],
    ["src/editor/a.ts", "../view/b.tsx"],
    ["src/editor/a.ts", "../effects/b.ts"],
    ["src/view/a.tsx", "../effects/b.ts"],
    ["src/effects/a.ts", "../view/b.tsx"],
    ["src/effects/a.ts", "../cli/b.ts"],
    ["src/cli/a.ts", "../editor/b.ts"],
    ["src/cli/a.ts", "../workstation.tsx"],
    ["src/workstation.tsx", "./main.ts"],
  ])("%s may not import %s, not even a type", (path, from) => {
    const text = `import type { B } from "${from}";\n`;
    expect(upward({ path, text, imports: importsIn(text) })).toEqual([from]);
  });

  it("name files of their own in full, so that every import is one that is there", () => {
    const known = new Set(sources.map(({ path }) => path));
    const unknown = (source: Source) =>
      names(source).filter((from) => isSource(source, from) && !known.has(target(source, from)));
    expect(breaches(unknown)).toEqual([]);
  });

  it("core imports nothing from outside", () => {
    expect(breaches((source) => names(source).filter((from) => !isOwn(from)), inLayers("core"))).toEqual([]);
  });

  it("only view and the workstation know Ink and React", () => {
    const others = sources.filter(({ path }) => !["view", "workstation.tsx"].includes(layerOf(path)));
    const screens = (source: Source) => names(source).filter((from) => /^(ink|react)\b/.test(from));
    expect(breaches(screens, others)).toEqual([]);
    expect(breaches(screens).length).toBeGreaterThan(1);
  });

  it("no file is part of a circle of imports", () => {
    expect(inCircles(edges(({ imports }) => imports.filter(({ typesOnly }) => !typesOnly)))).toEqual([]);
    expect(inCircles([edge("a", "b"), edge("b", "c"), edge("c", "b")])).toEqual(["b -> c", "c -> b"]);
  });

  it("types go in circles within one folder at most", () => {
    const across = edges(({ imports }) => imports).filter(({ from, to }) => dirname(from) !== dirname(to));
    const circles = new Set(inCircles(edges(({ imports }) => imports)));
    expect(across.map(({ from, to }) => `${from} -> ${to}`).filter((name) => circles.has(name))).toEqual([]);
  });
});

interface Edge {
  readonly from: string;
  readonly to: string;
}

const edge = (from: string, to: string): Edge => ({ from, to });

const edges = (importsOf: (source: Source) => readonly Import[]): readonly Edge[] =>
  sources.flatMap((source) =>
    importsOf(source)
      .filter(({ from }) => isSource(source, from))
      .map(({ from }) => edge(source.path, target(source, from))),
  );

/** The edges that lie on a circle: whose end leads back to their beginning. */
function inCircles(all: readonly Edge[]): readonly string[] {
  const next = new Map<string, string[]>();
  for (const { from, to } of all) next.set(from, [...(next.get(from) ?? []), to]);
  const leads = (from: string, to: string, seen = new Set<string>()): boolean => {
    if (from === to) return true;
    if (seen.has(from)) return false;
    seen.add(from);
    return (next.get(from) ?? []).some((middle) => leads(middle, to, seen));
  };
  return all.filter(({ from, to }) => leads(to, from)).map(({ from, to }) => `${from} -> ${to}`);
}

describe("what is pure", () => {
  const withoutComments = (text: string): string => text.replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, "");

  it("has no Node in it", () => {
    const node = (source: Source) => names(source).filter((from) => from.startsWith("node:"));
    expect(breaches(node, inLayers(...PURE, "view"))).toEqual([]);
    expect(breaches(node).length).toBeGreaterThan(10);
  });

  it("knows neither time nor chance nor the process", () => {
    const impure =
      /\bDate\.now\b|\bMath\.random\b|\bnew Date\b|\bprocess\.|\bperformance\.|\bglobalThis\b|\bsetTimeout\b|\bconsole\./g;
    const found = ({ text }: Source) => withoutComments(text).match(impure) ?? [];
    expect(breaches(found, inLayers(...PURE))).toEqual([]);
    expect(breaches(found).length).toBeGreaterThan(5);
  });

  it("evaluates no text as code", () => {
    const evaluated = ({ text }: Source) => withoutComments(text).match(/\beval\(|\bnew Function\b/g) ?? [];
    expect(breaches(evaluated)).toEqual([]);
  });
});

describe("files", () => {
  const MOST_LINES = 250;

  it(`have at most ${MOST_LINES} lines`, () => {
    const long = ({ text }: Source) => {
      const count = text.split("\n").length - 1;
      return count > MOST_LINES ? [`${count} lines`] : [];
    };
    expect(breaches(long)).toEqual([]);
  });

  it("hold one stage kind each, named after it", () => {
    const kinds = inLayers("core").filter(({ path }) => path.startsWith("src/core/stages/kinds/"));
    const names = kinds.map(({ path }) => path.replace(/^.*\/|\.ts$/g, ""));
    expect([...names].sort()).toEqual(STAGE_KINDS.map(({ kind }) => kind).sort());
    const defined = ({ text }: Source) =>
      text.match(/^export const \w+ = (defineKind|firstOrder|secondOrder)\b/gm) ?? [];
    expect(kinds.filter((source) => defined(source).length !== 1).map(({ path }) => path)).toEqual([]);
  });

  it("are tested as they are written, not as they are built", () => {
    const built = (source: Source) => names(source).filter((from) => /\bdist\//.test(from));
    expect(breaches(built, tests)).toEqual([]);
  });
});
