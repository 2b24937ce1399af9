import { type Command, CommanderError } from "commander";
import { fail, ok } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import { codeOf, fileProblemText, systemProblem } from "../effects/file-problem.ts";
import { decideDisplay, type ScreenDisplay } from "../effects/terminal/display.ts";
import { toAscii } from "./ascii.ts";
import { type NamedChain, openChain } from "./chain-argument.ts";
import { DEMO_CHAIN, sheet } from "./commands/sheet.ts";
import type { CliIo, Session } from "./io.ts";
import { DONE, type Outcome, REFUSED } from "./outcome.ts";
import { program, type Run } from "./program.ts";
import { usageProblem } from "./usage.ts";

/** What opens the full screen, and what it resolves to when it is left. */
export type OpenWorkstation = (options: {
  readonly chain: NamedChain;
  readonly display: ScreenDisplay;
}) => Promise<number>;

/**
 * One run of the program: results to standard output, messages to standard error. Resolves to the exit status and
 * never rejects: 0 done, 1 limits not met, 2 bad usage or input.
 */
export async function runCli(
  argv: readonly string[],
  io: CliIo,
  openWorkstation?: OpenWorkstation,
): Promise<number> {
  const display = decideDisplay(io.env, io.stdin, io.stdout, { ascii: wantsAscii(argv) });
  const session: Session = { io, charset: display.unicode ? "unicode" : "ascii" };
  const open = async (argument: string = DEMO_CHAIN): Promise<Outcome> => {
    // Keys come from standard input, so that a chain cannot come from there too.
    if (display.mode === "sheet" || openWorkstation === undefined || argument === "-") {
      return sheet(session, argument);
    }
    const chain = await openChain(argument, session);
    if (!chain.ok) return chain;
    return ok({ text: "", exitCode: await openWorkstation({ chain: chain.value, display }) });
  };
  try {
    return await deliver(await outcomeOf(argv, session, open), session);
  } catch (error) {
    return afterFault(error, session);
  }
}

/** Known before the command line is read, because what is wrong with it is said in ASCII too. */
function wantsAscii(argv: readonly string[]): boolean {
  const end = argv.indexOf("--");
  return argv.slice(0, end < 0 ? argv.length : end).includes("--ascii");
}

async function outcomeOf(argv: readonly string[], session: Session, open: Run["open"]): Promise<Outcome> {
  let outcome: Outcome = ok({ text: "" });
  let help = "";
  const settle = async (work: Promise<Outcome>) => {
    outcome = await work;
  };
  const root = program({ session, settle, open }, (text) => {
    help += text;
  });
  let stopped = root;
  for (const command of withCommands(root)) {
    command.exitOverride((error) => {
      stopped = command;
      throw error;
    });
  }
  try {
    await root.parseAsync([...argv], { from: "user" });
    return outcome;
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error;
    if (error.exitCode === 0) return ok({ text: help });
    return fail(usageProblem(error, stopped));
  }
}

const withCommands = (command: Command): readonly Command[] => [
  command,
  ...command.commands.flatMap(withCommands),
];

async function deliver(outcome: Outcome, { io, charset }: Session): Promise<number> {
  const tell = (message: string) => io.stderr.write(asciiIf(`halfpower: ${message}\n`, charset));
  for (const note of io.presets?.notes() ?? []) await tell(note);
  if (!outcome.ok) {
    await tell(fileProblemText(outcome.problem));
    return REFUSED;
  }
  const { text, notes = [], aside = "", exitCode = DONE } = outcome.value;
  if (aside !== "") await io.stderr.write(asciiIf(aside, charset));
  for (const note of notes) await tell(note);
  if (text !== "") await io.stdout.write(asciiIf(text, charset));
  return exitCode;
}

const asciiIf = (text: string, charset: Charset): string => (charset === "ascii" ? toAscii(text) : text);

/** Writing that fails is the system's word; anything else is a fault of the program, told in one line. */
async function afterFault(error: unknown, { io, charset }: Session): Promise<number> {
  // Whoever read the other end has seen enough.
  if (codeOf(error) === "EPIPE") return DONE;
  const said =
    codeOf(error) === undefined
      ? `internal fault: ${plainText(error instanceof Error ? error.message : String(error), 500)}`
      : fileProblemText(systemProblem(error, "standard output"));
  await io.stderr.write(asciiIf(`halfpower: ${said}\n`, charset)).catch(() => undefined);
  return REFUSED;
}
