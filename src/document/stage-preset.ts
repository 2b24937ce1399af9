import * as z from "zod/mini";
import { fail, ok, type Result } from "../core/result.ts";
import type { DocumentContext } from "./context.ts";
import { laidOutDocument } from "./json-layout.ts";
import { type JsonText, readJson } from "./json-text.ts";
import { firstProblem } from "./order.ts";
import { offsetOf, placeAt } from "./place.ts";
import { type DocumentProblem, described, problemAt, within } from "./problem.ts";
import { withoutMark } from "./read.ts";
import { type ResolvedStage, resolveStage } from "./stage.ts";
import { shapeProblems } from "./structure.ts";
import type { StageDocument } from "./types.ts";

export const STAGE_PRESET_FORMAT = "halfpower-stage";
export const STAGE_PRESET_VERSION = 1;

/** One stage kept for use in other chains. Values stay as the person wrote them. */
export interface StagePreset {
  readonly format: typeof STAGE_PRESET_FORMAT;
  readonly version: typeof STAGE_PRESET_VERSION;
  readonly title?: string;
  readonly notes?: string;
  readonly caution?: string;
  readonly stage: StageDocument;
}

/** A stage preset that was read without a problem. */
export interface LoadedStagePreset {
  readonly preset: StagePreset;
  readonly resolved: ResolvedStage;
  readonly text: string;
}

const MAX_TITLE = 500;
const MAX_NOTES = 100_000;
const MAX_CAUTION = 2000;

const text = (maxLength: number) => {
  const error = `a text of at most ${maxLength} characters`;
  return z.optional(z.string({ error }).check(z.maxLength(maxLength, { error })));
};

const NAMES = "format, version, title, notes, caution, stage";

const presetSchema = z.strictObject(
  {
    format: z.literal(STAGE_PRESET_FORMAT, { error: `"${STAGE_PRESET_FORMAT}"` }),
    version: z.literal(STAGE_PRESET_VERSION, { error: `${STAGE_PRESET_VERSION}` }),
    title: text(MAX_TITLE),
    notes: text(MAX_NOTES),
    caution: text(MAX_CAUTION),
    // Checked like a stage of a chain.
    stage: z.optional(z.unknown()),
  },
  { error: ({ code }) => (code === "unrecognized_keys" ? NAMES : `an object with ${NAMES}`) },
);

/** Reads and checks the text of a stage preset; the problem names line, column and path. Never throws. */
export function readStagePresetText(
  text: string,
  fileName: string,
  context: DocumentContext,
): Result<LoadedStagePreset, DocumentProblem> {
  const body = withoutMark(text);
  const json = readJson(body);
  if (!json.ok) {
    const { offset, ...problem } = json.problem;
    return fail({ ...problem, place: placeAt(body, offset, fileName) });
  }
  const { data, root } = json.value;
  const resolved = resolvePreset(data, context);
  if (resolved.ok) return ok({ preset: data as StagePreset, resolved: resolved.value, text });
  return fail({ ...resolved.problem, place: placeOf(resolved.problem, body, root, fileName) });
}

const placeOf = (problem: DocumentProblem, body: string, root: JsonText["root"], fileName: string) =>
  placeAt(body, offsetOf(problem, root), fileName);

function resolvePreset(data: unknown, context: DocumentContext): Result<ResolvedStage, DocumentProblem> {
  const newer = newerVersion(data);
  if (newer !== undefined) return fail(newer);
  const shape = shapeProblems(presetSchema, data);
  const stage = (data as { readonly stage?: unknown } | null)?.stage;
  if (stage === undefined) {
    const missing = problemAt(["stage"], "it is missing", "a stage, as in a chain");
    return fail(firstProblem([...shape, missing], data) as DocumentProblem);
  }
  const resolved = resolveStage(stage, context);
  const problem = firstProblem(
    [...shape, ...(resolved.ok ? [] : [within(["stage"], resolved.problem)])],
    data,
  );
  return problem !== undefined || !resolved.ok ? fail(problem as DocumentProblem) : resolved;
}

/** Asked for first: whatever else is wrong with a file of a newer version follows from that. */
function newerVersion(data: unknown): DocumentProblem | undefined {
  const { format, version } = (data ?? {}) as { readonly format?: unknown; readonly version?: unknown };
  if (format !== STAGE_PRESET_FORMAT || typeof version !== "number") return undefined;
  if (!(version > STAGE_PRESET_VERSION)) return undefined;
  const found = `found ${described(version)}, a newer version of the format`;
  const allowed = `${STAGE_PRESET_VERSION}, the version that this program reads; a newer program is needed for this file`;
  return problemAt(["version"], found, allowed);
}

/** The text of a stage preset. */
export const stagePresetText = (preset: StagePreset): string => laidOutDocument(preset);
