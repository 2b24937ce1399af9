import type { Folding } from "../../core/limits/folding.ts";
import { fail, ok, type Result } from "../../core/result.ts";
import type { Charset } from "../../core/units/format.ts";
import type { ResolvedLimit } from "../../document/limits.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
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
import { type VerdictRow, verdictLines, verdictRows } from "../verdict-table.ts";

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
  const rows = verdictRows(resolved, verdicts);
  if (form === "csv") return csvText(CSV_HEADER, rows.map(csvRow));
  const table =
    rows.length === 0 ? ["no limits and nothing that folds to check"] : await verdictLines(rows, charset);
  return [...heading(resolved), "", ...table, ""].join("\n");
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

const CSV_HEADER = ["name", "quantity", "pass", "worstFreqHz", "worstValue", "margin"];

const csvRow = ({ name, quantity, pass, worstFreqHz, worstValue, margin }: VerdictRow) => [
  name,
  quantity,
  String(pass),
  worstFreqHz,
  orNull(worstValue),
  orNull(margin),
];
