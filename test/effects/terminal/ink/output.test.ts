import fc from "fast-check";
import { default as libraryWidth } from "string-width";
import { expect, it } from "vitest";
import InkOutput from "../../../../node_modules/ink/build/output.js";
import measureText from "../../../../src/effects/terminal/ink/measure-text.ts";
import Output from "../../../../src/effects/terminal/ink/output.ts";
import stringWidth from "../../../../src/effects/terminal/ink/string-width.ts";
import { drawnCells } from "../../../helpers/emulator.ts";

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
