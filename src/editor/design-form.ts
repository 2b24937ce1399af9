import { CIRCUITS, type Circuit } from "../core/design/realise/realise.ts";
import type { PartsBin } from "../core/design/realise/types.ts";
import { type Requirement, requirementProblem } from "../core/design/requirement.ts";
import { idealSignalToNoiseDb } from "../core/limits/folding.ts";
import { fail, ok, type Problem, type Result } from "../core/result.ts";
import { SERIES_NAMES, type SeriesName } from "../core/units/e-series.ts";
import { parseQuantity } from "../core/units/quantity.ts";
import { shortValue } from "../core/units/short-value.ts";
import type { UnitTag } from "../core/units/unit.ts";
import type { ResolvedConverter } from "../document/converter.ts";

/** What is asked for in a design, as typed and chosen. */
export interface DesignForm {
  readonly pass: string;
  readonly passLoss: string;
  readonly stop: string;
  readonly stopLoss: string;
  readonly madeOf: "ideal" | Circuit;
  readonly resistors: SeriesName;
  readonly capacitors: SeriesName;
  readonly impedance: string;
  readonly gbw: string;
}

export interface FormRow {
  readonly name: keyof DesignForm;
  readonly label: string;
  /** What can be chosen; a row without is typed. */
  readonly choices?: readonly string[];
}

export const FORM_ROWS: readonly FormRow[] = [
  { name: "pass", label: "pass edge" },
  { name: "passLoss", label: "pass loss" },
  { name: "stop", label: "stop edge" },
  { name: "stopLoss", label: "stop loss" },
  { name: "madeOf", label: "made of", choices: ["ideal", ...CIRCUITS] },
  { name: "resistors", label: "resistors", choices: SERIES_NAMES },
  { name: "capacitors", label: "capacitors", choices: SERIES_NAMES },
  { name: "impedance", label: "impedance" },
  { name: "gbw", label: "op amp gbw" },
];

/**
 * A form to begin with. With a converter it protects the band: what would fold into it begins at the rate less the
 * band, and has to be down by what its bits can tell.
 */
export function startingForm(converter: ResolvedConverter | undefined): DesignForm {
  const {
    rateHz,
    bandHz = rateHz === undefined ? undefined : rateHz / 10,
    bits,
  } = converter ?? { rateHz: undefined };
  const isKnown = rateHz !== undefined && bandHz !== undefined;
  return {
    pass: isKnown ? shortValue(bandHz, "hertz") : "1k",
    passLoss: "0.5",
    stop: isKnown ? shortValue(rateHz - bandHz, "hertz") : "10k",
    stopLoss: bits === undefined ? "60" : String(Number(idealSignalToNoiseDb(bits).toFixed(2))),
    madeOf: "ideal",
    resistors: "E96",
    capacitors: "E12",
    impedance: "10k",
    gbw: "",
  };
}

export interface DesignRequest {
  readonly requirement: Requirement;
  readonly circuit: Circuit | undefined;
  readonly bin: PartsBin;
}

/** The form as a request, or what is wrong with it by the row that it is about. */
export function requestOf(
  form: DesignForm,
): Result<DesignRequest, Problem & { readonly row: keyof DesignForm }> {
  const passHz = positive(form, "pass", "hertz");
  if (!passHz.ok) return passHz;
  const passLossDb = positive(form, "passLoss", "level");
  if (!passLossDb.ok) return passLossDb;
  const stopHz = positive(form, "stop", "hertz");
  if (!stopHz.ok) return stopHz;
  const stopLossDb = positive(form, "stopLoss", "level");
  if (!stopLossDb.ok) return stopLossDb;
  const impedance = positive(form, "impedance", "ohm");
  if (!impedance.ok) return impedance;
  const gbwHz = form.gbw.trim() === "" ? ok(undefined) : positive(form, "gbw", "hertz");
  if (!gbwHz.ok) return gbwHz;
  const requirement = {
    passHz: passHz.value,
    passLossDb: passLossDb.value,
    stopHz: stopHz.value,
    stopLossDb: stopLossDb.value,
  };
  const problem = requirementProblem(requirement);
  if (problem !== undefined) return fail({ ...problem, row: ROW_OF[problem.about] });
  return ok({
    requirement,
    circuit: form.madeOf === "ideal" ? undefined : form.madeOf,
    bin: {
      resistors: form.resistors,
      capacitors: form.capacitors,
      resistanceOhm: impedance.value,
      ...(gbwHz.value === undefined ? {} : { gbwHz: gbwHz.value }),
    },
  });
}

const ROW_OF: Readonly<Record<keyof Requirement, keyof DesignForm>> = {
  passHz: "pass",
  passLossDb: "passLoss",
  stopHz: "stop",
  stopLossDb: "stopLoss",
};

function positive(
  form: DesignForm,
  row: "pass" | "passLoss" | "stop" | "stopLoss" | "impedance" | "gbw",
  unit: UnitTag,
): Result<number, Problem & { readonly row: keyof DesignForm }> {
  const value = parseQuantity(form[row], unit);
  if (!value.ok) return fail({ ...value.problem, row });
  return value.value > 0
    ? value
    : fail({ found: `${form[row]} is not above zero`, allowed: "more than zero", row });
}
