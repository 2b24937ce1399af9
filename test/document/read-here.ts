import { readFileSync } from "node:fs";
import { fail, ok } from "../../src/core/result.ts";
import type { DocumentContext } from "../../src/document/context.ts";
import { loadFormulaParser } from "../../src/document/formula-text.ts";
import { problemText } from "../../src/document/problem.ts";
import { readChainText } from "../../src/document/read.ts";

/** The chain file that the specification of the format gives as its example. */
export const EXAMPLE = readFileSync(new URL("../reference/example.chain.json", import.meta.url), "utf8");

/** Knows one table, `probe.csv`: two rows, 0 dB and −20 dB a decade apart. */
export const context: DocumentContext = {
  formula: await loadFormulaParser(),
  table: (file) =>
    file === "probe.csv"
      ? ok({
          type: "table",
          freqHz: Float64Array.of(10, 100),
          gainDb: Float64Array.of(0, -20),
          phaseDeg: Float64Array.of(0, -90),
        })
      : fail({ found: "there is no such file", allowed: "a file that can be read" }),
};

export const read = (text: string) => readChainText(text, "pump2.chain.json", context);

/** The message for a text that is refused, `ok` for one that is not. */
export function message(text: string): string {
  const loaded = read(text);
  return loaded.ok ? "ok" : problemText(loaded.problem);
}

/** A chain file whose one line of stages is line 4, with further top-level lines behind it. */
export const withStages = (stages: string, rest = ""): string =>
  `{\n  "format": "halfpower-chain",\n  "version": 1,\n  "stages": [${stages}]${rest}\n}\n`;
