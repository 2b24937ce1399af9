import { fail, type Problem, type Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import { type DocumentProblem, pathText } from "../document/problem.ts";
import { SYSTEM_WORDS } from "./system-words.ts";

/** What went wrong outside the program: at which file or name, what was found there, what is allowed. */
export interface FileProblem extends Problem {
  /** A file, a preset's name or the like; with line, column and path inside where the content is at fault. */
  readonly place: string;
  /** Present where the content is at fault. */
  readonly document?: DocumentProblem;
}

const MAX_PLACE_LENGTH = 300;
const MAX_MESSAGE_LENGTH = 2000;

export const fileProblem = (place: string, found: string, allowed: string): FileProblem => ({
  place: plainText(place, MAX_PLACE_LENGTH),
  found,
  allowed,
});

export const refuseFile = (place: string, found: string, allowed: string): Result<never, FileProblem> =>
  fail(fileProblem(place, found, allowed));

/** `pump2.chain.json:12:31: stages[2].parts.R` as the place. */
export function contentProblem(document: DocumentProblem, fileName: string): FileProblem {
  const { place, path, found, allowed } = document;
  const at = place === undefined ? fileName : `${place.fileName}:${place.line}:${place.column}`;
  return { ...fileProblem(`${at}: ${pathText(path)}`, found, allowed), document };
}

/** One line without control characters. */
export const fileProblemText = ({ place, found, allowed }: FileProblem): string =>
  plainText(`${place}: ${found}; allowed is ${allowed}`, MAX_MESSAGE_LENGTH);

/** The code of an error of the operating system or of Node, as in `ENOENT`. */
export const codeOf = (error: unknown): string | undefined => {
  const code = (error as { readonly code?: unknown } | null | undefined)?.code;
  return typeof code === "string" ? code : undefined;
};

/** What the system refused, in words; what is no refusal of the system is a fault of the program and thrown on. */
export function systemProblem(error: unknown, place: string): FileProblem {
  const code = codeOf(error);
  if (code === undefined) throw error;
  const [found, allowed] = SYSTEM_WORDS[code] ?? [
    `the system refused it (${plainText(code, 40)})`,
    "a file that can be used",
  ];
  return fileProblem(place, found, allowed);
}
