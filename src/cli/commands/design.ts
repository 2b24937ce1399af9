import { compareFamilies, type FamilyAnswer } from "../../core/design/figures.ts";
import { leastDesign } from "../../core/design/least-order.ts";
import { CIRCUITS, type Circuit, realise } from "../../core/design/realise/realise.ts";
import type { PartsBin, Realisation } from "../../core/design/realise/types.ts";
import { type Requirement, requirementProblem } from "../../core/design/requirement.ts";
import { FILTER_FAMILIES, type FilterFamily } from "../../core/filters/spec.ts";
import { fail, ok, type Result } from "../../core/result.ts";
import { quoted } from "../../core/text.ts";
import { SERIES_NAMES, type SeriesName } from "../../core/units/e-series.ts";
import { type Charset, formatQuantity } from "../../core/units/format.ts";
import { designedChain } from "../../document/designed.ts";
import { positive, readValue, type ValueSpec } from "../../document/value.ts";
import { orList } from "../../document/words.ts";
import { chainText } from "../../document/write.ts";
import { type FileProblem, fileProblem } from "../../effects/file-problem.ts";
import type { Session } from "../io.ts";
import { safeJson } from "../json.ts";
import type { Outcome } from "../outcome.ts";
import { type Column, tableLines } from "../table.ts";

export interface DesignOptions {
  readonly pass?: string;
  readonly passLoss?: string;
  readonly stop?: string;
  readonly stopLoss?: string;
  readonly family?: string;
  readonly as?: string;
  readonly series?: string;
  readonly capacitors?: string;
  readonly resistance?: string;
  readonly gbw?: string;
}

const DEFAULT_FAMILY: FilterFamily = "butterworth";
const ACTIVE_LEVEL_OHM = 10_000;
const LADDER_OHM = 50;

/** `halfpower design`: a chain file to standard output, the families side by side to standard error. */
export async function design({ charset }: Session, options: DesignOptions): Promise<Outcome> {
  const requirement = readRequirement(options);
  if (!requirement.ok) return requirement;
  const family = oneOf("--family", options.family, FILTER_FAMILIES, DEFAULT_FAMILY);
  if (!family.ok) return family;
  const circuit = options.as === undefined ? ok(undefined) : oneOf("--as", options.as, CIRCUITS, CIRCUITS[0]);
  if (!circuit.ok) return circuit;
  const bin = readBin(options, circuit.value);
  if (!bin.ok) return bin;
  const spec = leastDesign(family.value, requirement.value);
  if (!spec.ok) return fail(fileProblem("design", spec.problem.found, spec.problem.allowed));
  const realised =
    circuit.value === undefined
      ? ok(undefined)
      : realise(spec.value, requirement.value, circuit.value, bin.value);
  if (!realised.ok) return fail(fileProblem("--as", realised.problem.found, realised.problem.allowed));
  const document = designedChain(spec.value, requirement.value, realised.value);
  return ok({
    text: safeJson(chainText(document), charset),
    aside: (await comparison(compareFamilies(requirement.value), family.value, charset))
      .map((line) => `${line}\n`)
      .join(""),
    notes: realised.value === undefined ? [] : realisedNotes(realised.value),
  });
}

const LOSS: ValueSpec = { unit: "level", range: "any" };

function readRequirement(options: DesignOptions): Result<Requirement, FileProblem> {
  const values = [
    ["--pass", options.pass, positive("hertz")],
    ["--pass-loss", options.passLoss, LOSS],
    ["--stop", options.stop, positive("hertz")],
    ["--stop-loss", options.stopLoss, LOSS],
  ] as const;
  const read: number[] = [];
  for (const [place, text, spec] of values) {
    if (text === undefined) {
      return fail(
        fileProblem(place, "it is missing", "--pass F --pass-loss dB --stop F --stop-loss dB, all four"),
      );
    }
    const value = readValue(text, spec);
    if (!value.ok) return fail(fileProblem(place, value.problem.found, value.problem.allowed));
    read.push(value.value);
  }
  const [passHz, passLossDb, stopHz, stopLossDb] = read as [number, number, number, number];
  const requirement = { passHz, passLossDb, stopHz, stopLossDb };
  const problem = requirementProblem(requirement);
  return problem === undefined
    ? ok(requirement)
    : fail(fileProblem(OPTION_OF[problem.about], problem.found, problem.allowed));
}

const OPTION_OF: Readonly<Record<keyof Requirement, string>> = {
  passHz: "--pass",
  passLossDb: "--pass-loss",
  stopHz: "--stop",
  stopLossDb: "--stop-loss",
};

function oneOf<T extends string>(
  place: string,
  text: string | undefined,
  allowed: readonly T[],
  otherwise: T,
): Result<T, FileProblem> {
  if (text === undefined) return ok(otherwise);
  const found = allowed.find((each) => each.toLowerCase() === text.toLowerCase());
  return found === undefined ? fail(fileProblem(place, `found ${quoted(text)}`, orList(allowed))) : ok(found);
}

function readBin(options: DesignOptions, circuit: Circuit | undefined): Result<PartsBin, FileProblem> {
  const resistors = oneOf<SeriesName>("--series", options.series, SERIES_NAMES, "E96");
  if (!resistors.ok) return resistors;
  const capacitors = oneOf<SeriesName>("--capacitors", options.capacitors, SERIES_NAMES, "E12");
  if (!capacitors.ok) return capacitors;
  const level = optionalValue("--resistance", options.resistance, positive("ohm"));
  if (!level.ok) return level;
  const gbwHz = optionalValue("--gbw", options.gbw, positive("hertz"));
  if (!gbwHz.ok) return gbwHz;
  return ok({
    resistors: resistors.value,
    capacitors: capacitors.value,
    resistanceOhm: level.value ?? (circuit === "ladder" ? LADDER_OHM : ACTIVE_LEVEL_OHM),
    ...(gbwHz.value === undefined ? {} : { gbwHz: gbwHz.value }),
  });
}

function optionalValue(
  place: string,
  text: string | undefined,
  spec: ValueSpec,
): Result<number | undefined, FileProblem> {
  if (text === undefined) return ok(undefined);
  const value = readValue(text, spec);
  return value.ok ? value : fail(fileProblem(place, value.problem.found, value.problem.allowed));
}

/** The families side by side; one that cannot do it says why. */
async function comparison(
  answers: readonly FamilyAnswer[],
  taken: FilterFamily,
  charset: Charset,
): Promise<readonly string[]> {
  const able = answers.flatMap(({ family, figures }) => (figures.ok ? [{ family, ...figures.value }] : []));
  type Row = (typeof able)[number];
  const right = (head: string, cell: Column<Row>["cell"]) => ({ head, cell, side: "right" as const });
  const table = await tableLines<Row>(
    [
      {
        head: "family",
        side: "left",
        cell: ({ family }) => (family === taken ? `${family} (taken)` : family),
      },
      right("order", ({ spec }) => String(spec.order)),
      right("highest Q", ({ highestQ }) => highestQ.toPrecision(3)),
      right("ripple", ({ rippleDb }) => formatQuantity(rippleDb, "level", 3, charset)),
      right("delay varies", ({ delayVariationS }) => formatQuantity(delayVariationS, "second", 3, charset)),
      right("overshoot", ({ overshootPercent }) => `${Number(overshootPercent.toPrecision(3))} %`),
      right("settles in", ({ settlingTimeS }) => formatQuantity(settlingTimeS, "second", 3, charset)),
      right("loss at stop", ({ lossAtStopDb }) => formatQuantity(lossAtStopDb, "level", 4, charset)),
    ],
    able,
    charset,
  );
  const unable = answers.flatMap(({ figures }) => (figures.ok ? [] : [figures.problem.found]));
  return [...table, ...unable];
}

const realisedNotes = ({ passErrorDb, stopErrorDb, warnings }: Realisation): readonly string[] => [
  `realised: within ${passErrorDb.toFixed(3)} dB of the ideal up to the pass edge, ${stopErrorDb.toFixed(3)} dB up to the stop edge`,
  ...warnings.map((warning) => `caution: ${warning}`),
];
