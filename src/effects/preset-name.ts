import { ok, type Result } from "../core/result.ts";
import { plainText, quoted } from "../core/text.ts";
import { type FileProblem, refuseFile } from "./file-problem.ts";

const MAX_LENGTH = 80;
const PLACE = "preset name";
const ALLOWED = `1 to ${MAX_LENGTH} printable characters`;

/** One way to write a name: without blanks around it, accents composed (Unicode NFC). */
export const tidyName = (name: string): string => name.trim().normalize("NFC");

/**
 * The name that a preset can be kept under. Names that CHAIN on the command line takes for something else, a file, an
 * option or standard input, are refused.
 */
export function presetName(text: string): Result<string, FileProblem> {
  const name = tidyName(text);
  const refuse = (found: string, allowed = ALLOWED) => refuseFile(PLACE, found, allowed);
  if (name === "") return refuse("it is empty");
  const length = [...name.slice(0, 2 * MAX_LENGTH + 2)].length;
  if (length > MAX_LENGTH) return refuse(`it has more than ${MAX_LENGTH} characters`);
  if (plainText(name, Infinity) !== name) return refuse(`${quoted(name)} has characters that do not show`);
  if (name.includes("/")) return refuse(`${quoted(name)} has a slash, as files do`, "a name without a slash");
  if (name.endsWith(".json")) return refuse(`${quoted(name)} stands for a file`, "a name without .json");
  if (name.startsWith("-"))
    return refuse(`${quoted(name)} begins like an option`, "a name without - in front");
  return ok(name);
}
