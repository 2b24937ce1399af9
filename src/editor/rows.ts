import { stageKind } from "../core/stages/index.ts";
import type { NumberSpec, PartSpec } from "../core/stages/kind.ts";
import type { UnitTag } from "../core/units/unit.ts";
import type { DocumentPath } from "../document/problem.ts";
import type { ChainDocument, LimitDocument, RawValue, StageDocument } from "../document/types.ts";
import { valueAt } from "./document-edit.ts";

/** A row of the chain list, in the order in which the signal meets it. */
export type Row =
  | { readonly type: "chain" }
  | { readonly type: "source" }
  | { readonly type: "stage"; readonly index: number; readonly stage: StageDocument }
  | { readonly type: "load" }
  | { readonly type: "converter" }
  | { readonly type: "limit"; readonly index: number; readonly limit: LimitDocument };

export function rowsOf(document: ChainDocument): readonly Row[] {
  return [
    { type: "chain" },
    { type: "source" },
    ...document.stages.map((stage, index) => ({ type: "stage", index, stage }) as const),
    { type: "load" },
    { type: "converter" },
    ...(document.limits ?? []).map((limit, index) => ({ type: "limit", index, limit }) as const),
  ];
}

/** The row number of a stage: chain and source come before. */
export const rowOfStage = (index: number): number => index + 2;

/** The row number of a limit: they come last, behind load and converter. */
export const rowOfLimit = (document: ChainDocument, index: number): number =>
  document.stages.length + 4 + index;

/** One value that can be edited, by its place in the document. */
export interface Field {
  readonly label: string;
  readonly what: string;
  readonly path: DocumentPath;
  readonly type: "number" | "choice" | "text";
  /** What a bare number means; only for numbers. */
  readonly unit?: UnitTag;
  readonly whole?: boolean;
  readonly choices?: readonly string[];
  /** As the person wrote it; undefined where it is left out. */
  readonly raw: RawValue | undefined;
  /** Shown where it is left out. */
  readonly fallback?: string;
  readonly optional: boolean;
  /** Where the part's tolerance stands, for parts that may have one. */
  readonly tolerance?: { readonly path: DocumentPath; readonly raw: RawValue | undefined };
}

/** What can be edited in a row, in the order of the list. */
export function fieldsOf(document: ChainDocument, row: Row): readonly Field[] {
  switch (row.type) {
    case "stage":
      return stageFields(row.stage, row.index);
    case "chain":
      return CHAIN_FIELDS.map((field) => placed(document, field));
    case "source":
      return SOURCE_FIELDS.map((field) => placed(document, field));
    case "load":
      return LOAD_FIELDS.map((field) => placed(document, field));
    case "converter":
      return CONVERTER_FIELDS.map((field) => placed(document, field));
    case "limit":
      return limitFields(row.index, row.limit).map((field) => placed(document, field));
  }
}

function stageFields(stage: StageDocument, index: number): readonly Field[] {
  const specs = stageKind(stage.kind)?.parts ?? [];
  const given = stage.parts ?? {};
  const constants = Object.keys(given).filter((name) => !specs.some((spec) => spec.name === name));
  return [
    ...specs.map((spec) => partField(spec, stage, index)),
    ...constants.map(
      (name): Field => ({
        label: name,
        what: "constant of the formula",
        path: ["stages", index, "parts", name],
        type: "number",
        unit: "number",
        raw: given[name],
        optional: false,
      }),
    ),
  ];
}

function partField(spec: PartSpec, stage: StageDocument, index: number): Field {
  const shared = {
    label: spec.name,
    what: spec.what,
    path: ["stages", index, "parts", spec.name],
    raw: stage.parts?.[spec.name],
    optional: spec.optional,
  };
  if (spec.type === "number") return { ...shared, type: "number", ...numberField(spec, stage, index) };
  if (spec.type === "choice") return { ...shared, type: "choice", choices: spec.choices };
  return { ...shared, type: "text" };
}

function numberField(spec: NumberSpec, stage: StageDocument, index: number) {
  const whole = typeof spec.range === "object" && spec.range.whole;
  return {
    unit: spec.unit,
    whole,
    ...(spec.fallback === undefined ? {} : { fallback: String(spec.fallback) }),
    ...(whole
      ? {}
      : {
          tolerance: {
            path: ["stages", index, "tolerance", spec.name],
            raw: stage.tolerance?.[spec.name],
          },
        }),
  };
}

type Unplaced = Omit<Field, "raw" | "optional"> & { readonly optional?: boolean };

const placed = (document: ChainDocument, field: Unplaced): Field => ({
  optional: true,
  ...field,
  raw: valueAt(document, field.path) as RawValue | undefined,
});

const number = (
  label: string,
  what: string,
  path: DocumentPath,
  unit: UnitTag,
  fallback?: string,
): Unplaced => ({
  label,
  what,
  path,
  type: "number",
  unit,
  ...(fallback === undefined ? {} : { fallback }),
});

function limitFields(index: number, { quantity }: LimitDocument): readonly Unplaced[] {
  const at = (name: keyof LimitDocument): DocumentPath => ["limits", index, name];
  const unit = LIMIT_UNITS[quantity];
  return [
    { label: "name", what: "name of the limit", path: at("name"), type: "text" },
    {
      label: "quantity",
      what: "what is bounded",
      path: at("quantity"),
      type: "choice",
      choices: ["gain", "phase", "delay"],
      optional: false,
    },
    { ...number("from", "where it begins", at("from"), "hertz"), optional: false },
    { ...number("to", "where it ends", at("to"), "hertz"), optional: false },
    number("atLeast", "lower bound", at("atLeast"), unit),
    number("atMost", "upper bound", at("atMost"), unit),
    ...(quantity === "gain" ? [number("re", "frequency whose gain is the zero", at("re"), "hertz")] : []),
  ];
}

const LIMIT_UNITS: Readonly<Record<LimitDocument["quantity"], UnitTag>> = {
  gain: "level",
  phase: "degree",
  delay: "second",
};

const joined = (end: "source" | "load", fallback: string): Unplaced => ({
  label: "joined",
  what: "how R, L and C stand together",
  path: [end, "joined"],
  type: "choice",
  choices: ["series", "parallel"],
  fallback,
});

const CHAIN_FIELDS: readonly Unplaced[] = [
  { label: "title", what: "title of the chain", path: ["title"], type: "text" },
  {
    label: "against",
    what: "what gain is counted against",
    path: ["against"],
    type: "choice",
    choices: ["emf", "input", "insertion"],
    fallback: "emf",
  },
  number("from", "start of the sweep", ["sweep", "from"], "hertz", "1 Hz"),
  number("to", "end of the sweep", ["sweep", "to"], "hertz", "1 MHz"),
  { ...number("per decade", "points per decade", ["sweep", "perDecade"], "number", "50"), whole: true },
  number("temperature", "temperature of the chain", ["temperature"], "celsius", "25 °C"),
  {
    label: "spread",
    what: "how parts vary within their tolerance",
    path: ["distribution"],
    type: "choice",
    choices: ["uniform", "normal"],
    fallback: "uniform",
  },
  { label: "notes", what: "notes", path: ["notes"], type: "text" },
];

const SOURCE_FIELDS: readonly Unplaced[] = [
  number("emf", "EMF of the source", ["source", "emf"], "volt", "1 V"),
  number("R", "source resistance", ["source", "R"], "ohm", "0 Ω"),
  number("L", "source inductance", ["source", "L"], "henry"),
  number("C", "source capacitance", ["source", "C"], "farad"),
  joined("source", "series"),
];

const LOAD_FIELDS: readonly Unplaced[] = [
  number("R", "load resistance", ["load", "R"], "ohm", "open"),
  number("L", "load inductance", ["load", "L"], "henry"),
  number("C", "load capacitance", ["load", "C"], "farad"),
  joined("load", "parallel"),
];

const CONVERTER_FIELDS: readonly Unplaced[] = [
  number("rate", "samples per second", ["converter", "rate"], "samplesPerSecond"),
  { ...number("bits", "resolution", ["converter", "bits"], "number"), whole: true },
  number("fullScale", "full scale, peak to peak", ["converter", "fullScale"], "volt"),
  number("band", "highest frequency of interest", ["converter", "band"], "hertz"),
];
