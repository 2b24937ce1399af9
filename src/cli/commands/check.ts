import type { Folding } from "../../core/limits/folding.ts";
import type { Verdict } from "../../core/limits/limit.ts";
import { fail, ok, type Result } from "../../core/result.ts";
import { type Charset, formatQuantity } from "../../core/units/format.ts";
import type { UnitTag } from "../../core/units/unit.ts";
import type { ResolvedLimit } from "../../document/limits.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
import type { LimitQuantity } from "../../document/types.ts";
import { readValue } from "../../document/value.ts";
import { type Verdicts, verdictsOn } from "../../document/verdicts.ts";
import { type FileProblem, fileProblem } from "../../effects/file-problem.ts";
import { openChain } from "../chain-argument.ts";
import { csvText } from "../csv.ts";
import { heading } from "../heading.ts";
import type { Session } from "../io.ts";
import { jsonText } from "../json.ts";
import { DONE, NOT_MET, type Outcome } from "../outcome.ts";
import { type FormOptions, type OutputForm, outputForm } from "../output-form.ts";
import { type Column, tableLines } from "../table.ts";

export interface CheckOptions extends FormOptions {
  readonly aliasLoss?: string;
}

/** `halfpower check CHAIN` */
export async function check(
  session: Session,
  chainArgument: string,
  options: CheckOptions,
): Promise<Outcome> {
  const form = outputForm(options);
  if (!form.ok) return form;
  const neededDb = neededLoss(options.aliasLoss);
  if (!neededDb.ok) return neededDb;
  const opened = await openChain(chainArgument, session);
  if (!opened.ok) return opened;
  const { resolved } = opened.value;
  const verdicts = verdictsOn(resolved, neededDb.value);
  return ok({
    text: await shown(resolved, verdicts, form.value, session.charset),
    exitCode: verdicts.pass ? DONE : NOT_MET,
  });
}

function neededLoss(text: string | undefined): Result<number | undefined, FileProblem> {
  if (text === undefined) return ok(undefined);
  const value = readValue(text, { unit: "level", range: "positive" });
  return value.ok ? value : fail(fileProblem("--alias-loss", value.problem.found, value.problem.allowed));
}

async function shown(
  resolved: ResolvedChain,
  verdicts: Verdicts,
  form: OutputForm,
  charset: Charset,
): Promise<string> {
  if (form === "json") return jsonText(asJson(resolved, verdicts), charset);
  const rows = rowsOf(resolved, verdicts);
  if (form === "csv") return csvText(CSV_HEADER, rows.map(csvRow));
  const table =
    rows.length === 0
      ? ["no limits and nothing that folds to check"]
      : await tableLines(columnsOf(charset), rows, charset);
  const words = verdicts.pass ? "limits met" : "limits NOT met";
  return [...heading(resolved), "", ...table, ...(rows.length === 0 ? [] : ["", words]), ""].join("\n");
}

/** Nothing that is no number can stand in JSON: null is no output at all, or no value. */
const orNull = (value: number): number | null => (Number.isFinite(value) ? value + 0 : null);

function asJson({ limits }: ResolvedChain, verdicts: Verdicts) {
  const { folding } = verdicts;
  return {
    pass: verdicts.pass,
    limits: verdicts.limits.map(({ pass, worstFreqHz, worstValue, margin }, k) => ({
      name: (limits[k] as ResolvedLimit).name,
      pass,
      worstFreqHz,
      worstValue: orNull(worstValue),
      margin: orNull(margin),
    })),
    ...(folding === undefined ? {} : { folding: foldingJson(folding) }),
  };
}

const foldingJson = ({ pass, worstFreqHz, attenuationDb, neededDb }: Folding) => ({
  pass,
  worstFreqHz,
  attenuationDb: orNull(attenuationDb),
  neededDb,
});

/** A limit or what folds, as one line. */
interface Row extends Verdict {
  readonly name: string;
  readonly quantity: LimitQuantity | "folding";
}

function rowsOf({ limits }: ResolvedChain, verdicts: Verdicts): readonly Row[] {
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

const UNITS: Readonly<Record<Row["quantity"], UnitTag>> = {
  gain: "level",
  phase: "degree",
  delay: "second",
  folding: "level",
};

function columnsOf(charset: Charset): readonly Column<Row>[] {
  const value = (amount: number, quantity: Row["quantity"]) =>
    formatQuantity(amount, UNITS[quantity], 5, charset);
  const right = (head: string, cell: Column<Row>["cell"]) => ({ head, cell, side: "right" as const });
  return [
    { head: "limit", side: "left", cell: ({ name }) => name },
    { head: "on", side: "left", cell: ({ quantity }) => (quantity === "folding" ? "attenuation" : quantity) },
    right("worst", ({ worstValue, quantity }) => value(worstValue, quantity)),
    right("at", ({ worstFreqHz }) => formatQuantity(worstFreqHz, "hertz", 6, charset)),
    right("margin", ({ margin, quantity }) => value(margin, quantity)),
    { head: "", side: "left", cell: ({ pass }) => (pass ? "met" : "NOT met") },
  ];
}

const CSV_HEADER = ["name", "quantity", "pass", "worstFreqHz", "worstValue", "margin"];

const csvRow = ({ name, quantity, pass, worstFreqHz, worstValue, margin }: Row) => [
  name,
  quantity,
  String(pass),
  worstFreqHz,
  orNull(worstValue),
  orNull(margin),
];
