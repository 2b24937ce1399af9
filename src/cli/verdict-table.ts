import type { Verdict } from "../core/limits/limit.ts";
import { type Charset, formatQuantity } from "../core/units/format.ts";
import type { UnitTag } from "../core/units/unit.ts";
import type { ResolvedLimit } from "../document/limits.ts";
import type { ResolvedChain } from "../document/resolve.ts";
import type { LimitQuantity } from "../document/types.ts";
import type { Verdicts } from "../document/verdicts.ts";
import { type Column, tableLines } from "./table.ts";

/** A limit or what folds, as one line. */
export interface VerdictRow extends Verdict {
  readonly name: string;
  readonly quantity: LimitQuantity | "folding";
}

/** Each limit of a chain, and what folds. */
export function verdictRows({ limits }: ResolvedChain, verdicts: Verdicts): readonly VerdictRow[] {
  const { folding } = verdicts;
  return [
    ...verdicts.limits.map((verdict, k) => {
      const { name, quantity } = limits[k] as ResolvedLimit;
      return { ...verdict, name, quantity };
    }),
    ...(folding === undefined
      ? []
      : [
          {
            name: "what folds into the band",
            quantity: "folding" as const,
            pass: folding.pass,
            worstFreqHz: folding.worstFreqHz,
            worstValue: folding.attenuationDb,
            margin: folding.marginDb,
          },
        ]),
  ];
}

const UNITS: Readonly<Record<VerdictRow["quantity"], UnitTag>> = {
  gain: "level",
  phase: "degree",
  delay: "second",
  folding: "level",
};

function columnsOf(charset: Charset): readonly Column<VerdictRow>[] {
  const value = (amount: number, quantity: VerdictRow["quantity"]) =>
    formatQuantity(amount, UNITS[quantity], 5, charset);
  const right = (head: string, cell: Column<VerdictRow>["cell"]) => ({ head, cell, side: "right" as const });
  return [
    { head: "limit", side: "left", cell: ({ name }) => name },
    { head: "on", side: "left", cell: ({ quantity }) => (quantity === "folding" ? "attenuation" : quantity) },
    right("worst", ({ worstValue, quantity }) => value(worstValue, quantity)),
    right("at", ({ worstFreqHz }) => formatQuantity(worstFreqHz, "hertz", 6, charset)),
    right("margin", ({ margin, quantity }) => value(margin, quantity)),
    { head: "", side: "left", cell: ({ pass }) => (pass ? "met" : "NOT met") },
  ];
}

/** A table for people, and in a line below whether all of it is kept. */
export async function verdictLines(
  rows: readonly VerdictRow[],
  charset: Charset,
): Promise<readonly string[]> {
  const words = rows.every(({ pass }) => pass) ? "limits met" : "limits NOT met";
  return [...(await tableLines(columnsOf(charset), rows, charset)), "", words];
}
