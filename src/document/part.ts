import { fail, ok, type Problem, type Result } from "../core/result.ts";
import { stageKind } from "../core/stages/index.ts";
import type { ChoiceSpec, PartSpec, PartValue, StageKind } from "../core/stages/kind.ts";
import { quoted } from "../core/text.ts";
import type { DocumentContext } from "./context.ts";
import { CONSTANT, constantNameProblem } from "./formula-names.ts";
import { described } from "./problem.ts";
import { readValue } from "./value.ts";
import { orList, suggestion } from "./words.ts";

const MAX_FILE_NAME_LENGTH = 1000;

/** One part's value as written, checked by itself: for a part while it is being typed. */
export function checkPart(
  kindName: string,
  partName: string,
  raw: unknown,
  context: DocumentContext,
): Result<PartValue> {
  const kind = stageKind(kindName);
  if (kind === undefined)
    return fail({ found: `there is no kind ${quoted(kindName)}`, allowed: "a kind that there is" });
  const spec = kind.parts.find(({ name }) => name === partName);
  if (spec !== undefined) return checkSpecified(spec, raw, context);
  const unfit = partNameProblem(kind, partName);
  return unfit === undefined ? readValue(raw, CONSTANT) : fail(unfit);
}

/** Why `partName` cannot be given to a stage of this kind. */
export function partNameProblem(kind: StageKind, partName: string): Problem | undefined {
  const names = kind.parts.map(({ name }) => name);
  if (names.includes(partName)) return undefined;
  if (kind.ownConstants === true) return constantNameProblem(partName);
  return { found: `${kind.kind} has no part ${quoted(partName)}`, allowed: suggestion(partName, names) };
}

function checkSpecified(spec: PartSpec, raw: unknown, context: DocumentContext): Result<PartValue> {
  if (spec.type === "number") return readValue(raw, spec);
  if (spec.type === "choice") return checkChoice(spec, raw);
  if (typeof raw !== "string") return refuse(`found ${described(raw)}`, `a text: ${spec.what}`);
  return spec.type === "file" ? checkFile(raw, context) : checkFormula(raw, context);
}

function checkChoice({ choices }: ChoiceSpec, raw: unknown): Result<PartValue> {
  if (typeof raw === "string" && choices.includes(raw)) return ok(raw);
  return refuse(`found ${described(raw)}`, orList(choices.map((choice) => `"${choice}"`)));
}

function checkFile(file: string, context: DocumentContext): Result<PartValue> {
  if (file.trim() === "") return refuse("it is empty", "the name of a file");
  if (file.length <= MAX_FILE_NAME_LENGTH) return context.table(file);
  return refuse(
    `found a text of ${file.length} characters`,
    `a file name of at most ${MAX_FILE_NAME_LENGTH}`,
  );
}

function checkFormula(text: string, { formula }: DocumentContext): Result<PartValue> {
  if (formula === undefined)
    return refuse("formulas cannot be read here", "a kind of stage without a formula");
  const parsed = formula(text);
  return parsed.ok ? ok({ type: "formula", text, tree: parsed.value }) : parsed;
}

const refuse = (found: string, allowed: string) => fail<Problem>({ found, allowed });
