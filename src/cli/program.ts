import { Command } from "commander";
import manifest from "../../package.json" with { type: "json" };
import { type CheckOptions, check } from "./commands/check.ts";
import { read } from "./commands/read.ts";
import { type SweepOptions, sweep } from "./commands/sweep.ts";
import { ASCII_HELP, CAUTION, CHAIN_HELP, example, STATUS, SUMMARY, WITHOUT_COMMAND } from "./help.ts";
import type { Session } from "./io.ts";
import type { Outcome } from "./outcome.ts";
import type { FormOptions } from "./output-form.ts";
import { addPresets } from "./program-presets.ts";

/** What the commands work with and hand their outcome to. */
export interface Run {
  readonly session: Session;
  readonly settle: (work: Promise<Outcome>) => Promise<void>;
  /** The workstation, or the sheet where there is no full screen. */
  readonly open: (chain: string | undefined) => Promise<Outcome>;
}

const HELP_COLUMNS = 80;

/** Every command and option. Commander's own messages are thrown as errors, its help goes to `write`. */
export function program(run: Run, write: (text: string) => void): Command {
  const root = rootCommand(write)
    .description(SUMMARY)
    .argument("[CHAIN]", CHAIN_HELP)
    .addHelpText("after", `\n${WITHOUT_COMMAND}\n\n${STATUS}\n\n${CAUTION}`)
    .action((chain: string | undefined) => run.settle(run.open(chain)));
  addRead(root, run);
  addSweep(root, run);
  addCheck(root, run);
  const { presets } = run.session.io;
  if (presets !== undefined) addPresets(root, run, presets);
  return root;
}

function rootCommand(write: (text: string) => void): Command {
  return new Command("halfpower")
    .configureOutput({
      writeOut: write,
      writeErr: () => {},
      getOutHelpWidth: () => HELP_COLUMNS,
      getErrHelpWidth: () => HELP_COLUMNS,
      getOutHasColors: () => false,
      getErrHasColors: () => false,
    })
    .exitOverride()
    .showSuggestionAfterError(false)
    .enablePositionalOptions()
    .helpCommand(false)
    .helpOption("-h, --help", "show this help")
    .version(manifest.version, "-V, --version", "show the version")
    .option("--ascii", ASCII_HELP);
}

function addRead(root: Command, { session, settle }: Run): void {
  root
    .command("read")
    .summary("readings at these frequencies")
    .description("Readings of a chain at single frequencies, and what each stage adds to the gain there.")
    .argument("<CHAIN>", CHAIN_HELP)
    .argument("<FREQ...>", 'frequencies in Hz, as in 50, 12.5k, 4k7 or "1 MHz"')
    .option("--json", "one JSON document")
    .option("--csv", "CSV with a header")
    .option("--ascii", ASCII_HELP)
    .addHelpText(
      "after",
      example(
        "halfpower read strain-bridge 10 1k 19k",
        "what the strain bridge of pump 2 passes, and what folds",
      ),
    )
    .action((chain: string, frequencies: string[], options: FormOptions) =>
      settle(read(session, chain, frequencies, options)),
    );
}

function addSweep(root: Command, { session, settle }: Run): void {
  root
    .command("sweep")
    .summary("the table over frequency")
    .description("Readings of a chain over its sweep, or over another range; at most 200000 points.")
    .argument("<CHAIN>", CHAIN_HELP)
    .option("--from <FREQ>", "first frequency, instead of the chain's own")
    .option("--to <FREQ>", "last frequency")
    .option("--per-decade <N>", "points per decade, 1 to 10000")
    .option("--json", "one JSON document")
    .option("--csv", "CSV with a header")
    .option("--ascii", ASCII_HELP)
    .addHelpText(
      "after",
      example(
        "halfpower sweep strain-bridge --from 10 --to 20k --per-decade 20 --csv",
        "the strain bridge of pump 2 as a table for a report",
      ),
    )
    .action((chain: string, options: SweepOptions) => settle(sweep(session, chain, options)));
}

function addCheck(root: Command, { session, settle }: Run): void {
  root
    .command("check")
    .summary("each limit with margin and where")
    .description(
      "Checks each limit of a chain, and what folds into the converter's band, on the exact response: the worst " +
        "value, where it is, and the margin. Exit status 1 where one is not met.",
    )
    .argument("<CHAIN>", CHAIN_HELP)
    .option("--alias-loss <DB>", "wanted of what folds, instead of 6.02 bits + 1.76 dB")
    .option("--json", "one JSON document")
    .option("--csv", "CSV with a header")
    .option("--ascii", ASCII_HELP)
    .addHelpText(
      "after",
      example("halfpower check strain-bridge", "whether the strain bridge of pump 2 keeps its limits"),
    )
    .action((chain: string, options: CheckOptions) => settle(check(session, chain, options)));
}
