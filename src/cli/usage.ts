import type { Command, CommanderError } from "commander";
import { plainText, quoted } from "../core/text.ts";
import { nearNames, suggestion } from "../document/words.ts";
import { type FileProblem, fileProblem } from "../effects/file-problem.ts";

type Words = readonly [found: string, allowed: string];

/** What is wrong with the command line, in the program's own words. */
export function usageProblem(error: CommanderError, command: Command): FileProblem {
  return misspeltCommand(error, command) ?? fileProblem(placeOf(command), ...wordsFor(error, command));
}

function wordsFor({ code, message }: CommanderError, command: Command): Words {
  const named = /'([\s\S]*)'/.exec(message)?.[1] ?? "";
  switch (code) {
    case "commander.unknownOption":
      return unknownOption(named, command);
    case "commander.missingArgument":
      return [`${plainText(named)} is missing`, usageText(command)];
    case "commander.optionMissingArgument":
      return [`${named.split(" ")[0]} has no value`, plainText(named)];
    case "commander.excessArguments": {
      const extra = command.args[command.registeredArguments.length] ?? "";
      return [`${quoted(extra)} is one word too many`, usageText(command)];
    }
    default:
      return ["the command line cannot be read", usageText(command)];
  }
}

/** `presets show`; the program itself is the command line. */
const placeOf = (command: Command): string => pathOf(command).slice(1).join(" ") || "command line";

function pathOf(command: Command): readonly string[] {
  return [...(command.parent === null ? [] : pathOf(command.parent)), command.name()];
}

/** `halfpower read CHAIN FREQ...` */
function usageText(command: Command): string {
  const operands = command.registeredArguments.map((argument) => {
    const name = argument.name() + (argument.variadic ? "..." : "");
    return argument.required ? name : `[${name}]`;
  });
  return [...pathOf(command), ...operands].join(" ");
}

/** Where a command with commands of its own, or the default of one, got a word that is none of them. */
function misspeltCommand({ code }: CommanderError, command: Command): FileProblem | undefined {
  const group = command.commands.length > 0 ? command : command.parent?.parent ? command.parent : null;
  const [word] = command.args;
  if (group === null || word === undefined || word.startsWith("-")) return undefined;
  const names = group.commands.map((one) => one.name());
  if (group !== command && (command.registeredArguments.length > 0 || names.includes(word))) return undefined;
  const isNear = nearNames(word, names).length > 0;
  if (code !== "commander.excessArguments" && !isNear) return undefined;
  return fileProblem(placeOf(group), `there is no command ${quoted(word)}`, suggestion(word, names));
}

function unknownOption(flag: string, command: Command): Words {
  if (/^-[\d.]/.test(flag)) return [`${quoted(flag)} is below zero`, "a value above zero"];
  const known = command.createHelp().visibleOptions(command);
  const names = known.map(({ long }) => long ?? "");
  return [`there is no option ${quoted(flag)}`, suggestion(flag.split("=")[0], names)];
}
