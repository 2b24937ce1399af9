import { type Against, type Chain, makeChain } from "../core/chain.ts";
import type { Branch } from "../core/elements/branch.ts";
import { fail, ok, type Result } from "../core/result.ts";
import { plainText } from "../core/text.ts";
import { resolveLoad, resolveSource } from "./branch.ts";
import type { DocumentContext } from "./context.ts";
import { type ResolvedConverter, resolveConverter } from "./converter.ts";
import { versionProblem } from "./format.ts";
import { type ResolvedLimit, resolveLimits } from "./limits.ts";
import { firstProblem } from "./order.ts";
import type { DocumentProblem } from "./problem.ts";
import { type ResolvedSweep, resolveSweep } from "./range.ts";
import { chainSchema } from "./schema.ts";
import type { ResolvedStage } from "./stage.ts";
import { resolveStages } from "./stages.ts";
import { shapeProblems } from "./structure.ts";
import type { ChainDocument, Distribution } from "./types.ts";
import { type ValueReader, type ValueSpec, valueReader } from "./value.ts";

const TEMPERATURE: ValueSpec = { unit: "celsius", range: "aboveAbsoluteZero" };
const DEFAULT_TEMPERATURE_C = 25;

/** A chain file's content with every value checked and in SI units. Texts are safe to show. */
export interface ResolvedChain {
  /** For the engine: stages that are off are left out. */
  readonly chain: Chain;
  /** Empty when there is none. */
  readonly title: string;
  readonly against: Against;
  readonly temperatureC: number;
  readonly emfV: number;
  readonly distribution: Distribution;
  /** One for each stage of the document, also for those that are off. */
  readonly stages: readonly ResolvedStage[];
  readonly source: Branch;
  /** Without any part the output is open. */
  readonly load: Branch;
  readonly converter?: ResolvedConverter;
  readonly sweep: ResolvedSweep;
  readonly limits: readonly ResolvedLimit[];
  /** Those of the chain and of its stages, in the order of the document. */
  readonly cautions: readonly string[];
}

/**
 * Checks and resolves a document, or anything that was read as one; of several problems the first in the order
 * of the document is returned. Stages that were resolved before, with this same context, are the same objects.
 */
export function resolveChain(
  document: ChainDocument,
  context: DocumentContext,
): Result<ResolvedChain, DocumentProblem> {
  const foreign = versionProblem(document);
  if (foreign !== undefined) return fail(foreign);
  const shape = shapeProblems(chainSchema, document);
  const reader = valueReader();
  const resolved = resolveSections(wellShaped(document, shape), context, reader);
  const problem = firstProblem([...shape, ...reader.problems], document);
  return problem === undefined ? ok(resolved) : fail(problem);
}

/** What of the document has its right shape; the rest has no values to look at. */
function wellShaped(document: ChainDocument, shape: readonly DocumentProblem[]): Partial<ChainDocument> {
  if (shape.length === 0) return document;
  const bent = new Set(shape.map(({ path }) => path[0]));
  return Object.fromEntries(Object.entries(document).filter(([section]) => !bent.has(section)));
}

function resolveSections(
  document: Partial<ChainDocument>,
  context: DocumentContext,
  reader: ValueReader,
): ResolvedChain {
  const { against = "emf", distribution = "uniform", converter } = document;
  const source = resolveSource(document.source, reader);
  const load = resolveLoad(document.load, reader);
  const stages = resolveStages(document.stages, context, reader);
  return {
    chain: makeChain({
      source: source.impedance,
      stages: stages.flatMap(({ stage }) => stage ?? []),
      load: load.impedance,
      against,
    }),
    title: plainText(document.title ?? "", Infinity),
    against,
    temperatureC: reader.value(["temperature"], document.temperature, TEMPERATURE, DEFAULT_TEMPERATURE_C),
    emfV: source.emfV,
    distribution,
    stages,
    source: source.values,
    load: load.values,
    ...(converter === undefined ? {} : { converter: resolveConverter(converter, reader) }),
    sweep: resolveSweep(document.sweep, reader),
    limits: resolveLimits(document.limits, reader),
    cautions: cautionsOf(document),
  };
}

function cautionsOf({ caution, stages = [] }: Partial<ChainDocument>): readonly string[] {
  const texts = [caution, ...stages.map((stage) => stage?.caution)];
  return texts.flatMap((text) => (typeof text === "string" && text !== "" ? plainText(text, Infinity) : []));
}
