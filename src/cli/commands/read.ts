import { type ChainReading, readings } from "../../core/readings.ts";
import { fail, ok, type Result } from "../../core/result.ts";
import { type Charset, formatQuantity } from "../../core/units/format.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
import { positive, readValue } from "../../document/value.ts";
import { type FileProblem, fileProblem } from "../../effects/file-problem.ts";
import { openChain } from "../chain-argument.ts";
import { csvText } from "../csv.ts";
import { heading } from "../heading.ts";
import type { Session } from "../io.ts";
import { jsonText } from "../json.ts";
import type { Outcome } from "../outcome.ts";
import { type FormOptions, type OutputForm, outputForm } from "../output-form.ts";
import { csvHeader, csvRow, readingColumns } from "../reading-columns.ts";
import { tableLines } from "../table.ts";
import { noValue } from "../without-value.ts";

/** `halfpower read CHAIN FREQ…` */
export async function read(
  session: Session,
  chainArgument: string,
  frequencies: readonly string[],
  options: FormOptions,
): Promise<Outcome> {
  const form = outputForm(options);
  if (!form.ok) return form;
  const freqsHz = readFrequencies(frequencies);
  if (!freqsHz.ok) return freqsHz;
  const opened = await openChain(chainArgument, session);
  if (!opened.ok) return opened;
  const { resolved, shownName } = opened.value;
  const { converter, chain, sweep } = resolved;
  const found = readings(chain, sweep, freqsHz.value, converter?.rateHz);
  const [missingHz] = found.withoutValueHz;
  if (missingHz !== undefined) {
    const problem = noValue(resolved, missingHz);
    return fail(fileProblem(shownName, problem.found, problem.allowed));
  }
  return ok({ text: await shown(found.readings, resolved, form.value, session.charset) });
}

function readFrequencies(texts: readonly string[]): Result<readonly number[], FileProblem> {
  const freqsHz: number[] = [];
  for (const [k, text] of texts.entries()) {
    const value = readValue(text, positive("hertz"));
    const place = texts.length === 1 ? "FREQ" : `FREQ ${k + 1} of ${texts.length}`;
    if (!value.ok) return fail(fileProblem(place, value.problem.found, value.problem.allowed));
    freqsHz.push(value.value);
  }
  return ok(freqsHz);
}

async function shown(
  found: readonly ChainReading[],
  resolved: ResolvedChain,
  form: OutputForm,
  charset: Charset,
): Promise<string> {
  const { title, against } = resolved;
  if (form === "json") return jsonText({ title, against, readings: found }, charset);
  const hasConverter = resolved.converter !== undefined;
  if (form === "csv") {
    const names = found[0]?.shares?.map(({ name }) => name) ?? [];
    return csvText(csvHeader(names, hasConverter), found.map(csvRow));
  }
  const table = await tableLines(readingColumns(charset, hasConverter), found, charset);
  return [...heading(resolved), "", ...table, ...(await shareTables(found, charset)), ""].join("\n");
}

const FREQUENCIES_BESIDE_EACH_OTHER = 6;

/** What each stage adds, a row for a stage and a column for a frequency. */
async function shareTables(found: readonly ChainReading[], charset: Charset): Promise<readonly string[]> {
  const lines: string[] = [];
  for (let from = 0; from < found.length; from += FREQUENCIES_BESIDE_EACH_OTHER) {
    const beside = found.slice(from, from + FREQUENCIES_BESIDE_EACH_OTHER);
    const rows = beside[0].shares?.map(({ name }, index) => ({ name, index })) ?? [];
    const columns = [
      { head: "share of", side: "left" as const, cell: ({ name }: { name: string }) => name },
      ...beside.map(({ freqHz, shares }) => ({
        head: formatQuantity(freqHz, "hertz", 6, charset),
        side: "right" as const,
        cell: ({ index }: { index: number }) => shareText(shares?.[index].gainDb ?? null, charset),
      })),
    ];
    lines.push("", ...(await tableLines(columns, rows, charset)));
  }
  return lines;
}

const shareText = (gainDb: number | null, charset: Charset): string =>
  gainDb === null ? "-" : formatQuantity(gainDb, "level", 5, charset);
