import { Command } from "commander";
import manifest from "../../package.json" with { type: "json" };
import { type CheckOptions, check } from "./commands/check.ts";
import { type DesignOptions, design } from "./commands/design.ts";
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
  addDesign(root, run);
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

function addDesign(root: Command, { session, settle }: Run): void {
  root
    .command("design")
    .summary("a filter from what it has to do")
    .description(
      "Designs the low-pass filter of least order that loses no more than the pass loss up to the pass edge and no " +
        "less than the stop loss from the stop edge on. Writes a chain file, with --as made of real parts; the " +
        "families side by side go to standard error.",
    )
    .option("--pass <FREQ>", "pass edge")
    .option("--pass-loss <DB>", "most that is lost up to the pass edge")
    .option("--stop <FREQ>", "stop edge")
    .option("--stop-loss <DB>", "least that is lost from the stop edge on")
    .option("--family <NAME>", "butterworth (default), chebyshev, inverse-chebyshev, bessel or elliptic")
    .option("--as <CIRCUIT>", "made of real parts: sallen-key, mfb or ladder")
    .option("--series <E>", "E series of resistors, and of a ladder's parts; E96 by default")
    .option("--capacitors <E>", "E series of capacitors; E12 by default")
    .option("--resistance <R>", "impedance level; 10 kohm, or 50 ohm for a ladder")
    .option("--gbw <FREQ>", "gain-bandwidth product of the op amps; ideal ones without it")
    .option("--ascii", ASCII_HELP)
    .addHelpText(
      "after",
      example(
        "halfpower design --pass 1k --pass-loss 1 --stop 9k --stop-loss 60 --as mfb",
        "an anti-alias filter of real parts for a pump channel",
      ),
    )
    .action((options: DesignOptions) => settle(design(session, options)));
}
