import { fail, type Problem, type Result } from "../core/result.ts";
import type { NumberRange } from "../core/stages/kind.ts";
import { formatExact } from "../core/units/format.ts";
import { parseQuantity } from "../core/units/quantity.ts";
import { checkRange, rangeText } from "../core/units/range.ts";
import { UNITS, type UnitTag } from "../core/units/unit.ts";
import { type DocumentPath, type DocumentProblem, described, problemAt } from "./problem.ts";

/** What a value is measured in and where it may lie. */
export interface ValueSpec {
  readonly unit: UnitTag;
  readonly range: NumberRange | "aboveAbsoluteZero";
}

export const positive = (unit: UnitTag): ValueSpec => ({ unit, range: "positive" });

/** A value as written, in SI units, where its unit fits and it lies in its range. */
export function readValue(raw: unknown, { unit, range }: ValueSpec): Result<number> {
  if (typeof raw !== "string" && typeof raw !== "number")
    return refuse(`found ${described(raw)}`, wanted({ unit, range }));
  if (typeof raw === "string" && raw.trim() === "") return refuse("it is empty", wanted({ unit, range }));
  const parsed = parseQuantity(raw, unit);
  if (!parsed.ok) return parsed;
  const outside = outsideRange(parsed.value, { unit, range });
  return outside === undefined ? parsed : refuse(`${described(raw)} is out of range`, outside.allowed);
}

/** What is asked for where no value is given. */
export const wanted = ({ unit, range }: ValueSpec): string =>
  typeof range === "object" ? rangeText(range, unit) : UNITS[unit].wanted;

const ABSOLUTE_ZERO_C = -273.15;

function outsideRange(value: number, { unit, range }: ValueSpec): Problem | undefined {
  if (range !== "aboveAbsoluteZero") return checkRange(value, range, unit);
  if (value > ABSOLUTE_ZERO_C) return undefined;
  return { found: "at or below absolute zero", allowed: `more than ${formatExact(ABSOLUTE_ZERO_C, unit)}` };
}

const refuse = (found: string, allowed: string): { readonly ok: false; readonly problem: Problem } =>
  fail({ found, allowed });

const missing = (allowed: string) => refuse("it is missing", allowed);

/** Reads one value after the other and keeps what is wrong with them. */
export interface ValueReader {
  readonly problems: readonly DocumentProblem[];
  /** The value in SI units; `fallback` where it is not given, NaN where it is refused. */
  readonly value: <F extends number | undefined>(
    path: DocumentPath,
    raw: unknown,
    spec: ValueSpec,
    fallback: F,
  ) => number | F;
  /** The value in SI units, NaN where it is missing or refused. */
  readonly required: (path: DocumentPath, raw: unknown, spec: ValueSpec) => number;
  readonly refuse: (problem: DocumentProblem) => void;
}

export function valueReader(): ValueReader {
  const problems: DocumentProblem[] = [];
  const required = (path: DocumentPath, raw: unknown, spec: ValueSpec): number => {
    const read = raw === undefined ? missing(wanted(spec)) : readValue(raw, spec);
    if (read.ok) return read.value;
    problems.push(problemAt(path, read.problem.found, read.problem.allowed));
    return Number.NaN;
  };
  return {
    problems,
    required,
    value: (path, raw, spec, fallback) => (raw === undefined ? fallback : required(path, raw, spec)),
    refuse: (problem) => void problems.push(problem),
  };
}
