import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { build } from "esbuild";
import fc from "fast-check";
import { default as libraryWidth } from "string-width";
import { afterAll, beforeAll, expect, it } from "vitest";
import InkOutput from "../../../../node_modules/ink/build/output.js";
import { drawnCells } from "../../../helpers/emulator.ts";

type Modules = typeof import("../../../../src/effects/terminal/ink/output.ts") & {
  readonly measureText: (text: string) => { readonly width: number; readonly height: number };
  readonly stringWidth: (text: string) => number;
};

// As the program has them: the bundler sets the library up when it is first called for.
const folder = mkdtempSync(join(tmpdir(), "halfpower-ink-"));
let Output: Modules["default"];
let measureText: Modules["measureText"];
let stringWidth: Modules["stringWidth"];
beforeAll(async () => {
  const ink = new URL("../../../../src/effects/terminal/ink/", import.meta.url).pathname;
  const outfile = join(folder, "ink.mjs");
  const contents = ["output", "measure-text", "string-width"].map((name) => `${ink}${name}.ts`);
  await build({
    stdin: {
      contents: `export { default } from "${contents[0]}"; export { default as measureText } from "${contents[1]}"; export { default as stringWidth } from "${contents[2]}";`,
      resolveDir: ink,
    },
    outfile,
    bundle: true,
    format: "esm",
    platform: "node",
  });
  ({ default: Output, measureText, stringWidth } = (await import(outfile)) as Modules);
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const piece = fc
  .tuple(
    fc.constantFrom("", "\u001b[1m", "\u001b[36m", "\u001b[7m"),
    fc.constantFrom("abc", "─╮·", "漢字", "é", " ", "±10 %"),
  )
  .map(([style, text]) => (style === "" ? text : `${style}${text}\u001b[0m`));
const line = fc.array(piece, { maxLength: 6 }).map((pieces) => pieces.join(""));

it("widths are the library's", () => {
  const isSame = (text: string) => stringWidth(text) === libraryWidth(text);
  fc.assert(fc.property(line, isSame));
  fc.assert(fc.property(fc.string({ unit: "grapheme" }), isSame));
  expect(measureText("漢字\nabc")).toEqual({ width: 4, height: 2 });
  expect(measureText("")).toEqual({ width: 0, height: 0 });
});

it("blocks side by side look as the library draws them", async () => {
  const size = { columns: 60, rows: 6 };
  await fc.assert(
    fc.asyncProperty(
      fc.array(line, { minLength: 1, maxLength: 6 }),
      fc.array(line, { minLength: 1, maxLength: 6 }),
      async (left, right) => {
        const outputs = [new InkOutput({ width: 60, height: 6 }), new Output({ width: 60, height: 6 })];
        for (const output of outputs) {
          output.write(0, 0, left.join("\n"), { transformers: [] });
          output.write(30, 0, right.join("\n"), { transformers: [(text: string) => text] });
        }
        const [library, own] = await Promise.all(
          outputs.map((output) => drawnCells(output.get().output, size)),
        );
        expect(own).toEqual(library);
      },
    ),
    { numRuns: 60 },
  );
});
