import { type ChainReadings, sweepReadings } from "../../core/readings.ts";
import { fail, ok, type Result } from "../../core/result.ts";
import type { Charset } from "../../core/units/format.ts";
import { pathText } from "../../document/problem.ts";
import { type ResolvedSweep, resolveSweep } from "../../document/range.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
import type { SweepDocument } from "../../document/types.ts";
import { valueReader } from "../../document/value.ts";
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
import { isOutside, measuredRange, noValue, rangeWords } from "../without-value.ts";

/** The file's own sweep holds where an option is left out. */
export interface SweepOptions extends FormOptions {
  readonly from?: string;
  readonly to?: string;
  readonly perDecade?: string;
}

/** `halfpower sweep CHAIN` */
export async function sweep(
  session: Session,
  chainArgument: string,
  options: SweepOptions,
): Promise<Outcome> {
  const form = outputForm(options);
  if (!form.ok) return form;
  const opened = await openChain(chainArgument, session);
  if (!opened.ok) return opened;
  const { resolved, document, shownName } = opened.value;
  const range = overridden(document.sweep ?? {}, options);
  if (!range.ok) return range;
  const found = sweepReadings(resolved.chain, range.value, resolved.converter?.rateHz);
  if (found.readings.length === 0) {
    const problem = noValue(resolved, range.value.fromHz);
    return fail(fileProblem(shownName, `nowhere in the sweep is a value; ${problem.found}`, problem.allowed));
  }
  const text = await shown(found, resolved, form.value, session.charset);
  return ok({ text, notes: leftOut(found, resolved, shownName) });
}

const OPTION_NAMES = { from: "--from", to: "--to", perDecade: "--per-decade" } as const;

/** The chain's sweep with what was typed in its place. */
function overridden(own: SweepDocument, options: SweepOptions): Result<ResolvedSweep, FileProblem> {
  const { from, to, perDecade } = options;
  const given = {
    ...(from === undefined ? {} : { from }),
    ...(to === undefined ? {} : { to }),
    ...(perDecade === undefined ? {} : { perDecade }),
  };
  const reader = valueReader();
  const resolved = resolveSweep({ ...own, ...given }, reader);
  const [problem] = reader.problems;
  if (problem === undefined) return ok(resolved);
  const name = problem.path[1] as keyof typeof OPTION_NAMES | undefined;
  const place = name !== undefined && name in given ? OPTION_NAMES[name] : pathText(problem.path);
  return fail(fileProblem(place, problem.found, problem.allowed));
}

async function shown(
  { readings: found }: ChainReadings,
  resolved: ResolvedChain,
  form: OutputForm,
  charset: Charset,
): Promise<string> {
  const { title, against } = resolved;
  const hasConverter = resolved.converter !== undefined;
  if (form === "json") return jsonText({ title, against, readings: found }, charset);
  if (form === "csv") return csvText(csvHeader([], hasConverter), found.map(csvRow));
  const table = await tableLines(readingColumns(charset, hasConverter), found, charset);
  return [...heading(resolved), "", ...table, ""].join("\n");
}

/** What is said about rows that have no value. */
function leftOut({ withoutValueHz }: ChainReadings, resolved: ResolvedChain, shownName: string): string[] {
  const [first] = withoutValueHz;
  if (first === undefined) return [];
  const range = measuredRange(resolved);
  const outside = range === undefined ? [] : withoutValueHz.filter((freqHz) => isOutside(range, freqHz));
  const notes = [];
  if (range !== undefined && outside.length > 0) {
    notes.push(`${shownName}: ${rows(outside.length)} left out; there are values from ${rangeWords(range)}`);
  }
  const others = withoutValueHz.length - outside.length;
  if (others > 0) notes.push(`${shownName}: ${rows(others)} left out where there is no finite value`);
  return notes;
}

const rows = (count: number): string => (count === 1 ? "1 row is" : `${count} rows are`);
