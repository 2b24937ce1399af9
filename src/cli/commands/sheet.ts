import { ok } from "../../core/result.ts";
import type { Charset } from "../../core/units/format.ts";
import type { ResolvedChain } from "../../document/resolve.ts";
import { verdictsOn } from "../../document/verdicts.ts";
import { openChain } from "../chain-argument.ts";
import { heading } from "../heading.ts";
import type { Session } from "../io.ts";
import type { Outcome } from "../outcome.ts";
import { chainLines } from "../sheet/chain-lines.ts";
import { chartLines } from "../sheet/chart-lines.ts";
import { readingLines } from "../sheet/reading-lines.ts";
import { wrapped } from "../sheet/wrap.ts";
import { verdictLines, verdictRows } from "../verdict-table.ts";

/** What is shown when no chain is named. */
export const DEMO_CHAIN = "strain-bridge";

const DEFAULT_COLUMNS = 80;
const LEAST_COLUMNS = 40;
const MOST_COLUMNS = 400;

/** The chain, both charts and a table of readings as text: `halfpower [CHAIN]` without a full screen. */
export async function sheet(session: Session, chainArgument = DEMO_CHAIN): Promise<Outcome> {
  const opened = await openChain(chainArgument, session);
  if (!opened.ok) return opened;
  const { resolved, document } = opened.value;
  const { charset } = session;
  const columns = columnsOf(session.io.env.COLUMNS);
  const lines = [
    ...heading(resolved).flatMap((line) => wrapped(line, columns)),
    "",
    ...(await chainLines(resolved, document, columns, charset)),
    "",
    ...chartLines(resolved, columns, charset),
    "",
    ...(await readingLines(resolved, charset)),
    ...(await limitLines(resolved, charset)),
  ];
  return ok({ text: lines.map((line) => `${line.trimEnd()}\n`).join("") });
}

/** Limits and what folds, as in `check`; nothing for a chain without. */
async function limitLines(resolved: ResolvedChain, charset: Charset): Promise<readonly string[]> {
  const rows = verdictRows(resolved, verdictsOn(resolved));
  return rows.length === 0 ? [] : ["", ...(await verdictLines(rows, charset))];
}

/** As the shell says, within reason. */
function columnsOf(text: string | undefined): number {
  if (text === undefined || !/^\d{1,4}$/.test(text)) return DEFAULT_COLUMNS;
  return Math.min(MOST_COLUMNS, Math.max(LEAST_COLUMNS, Number(text)));
}
