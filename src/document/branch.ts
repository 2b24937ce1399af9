import { type Branch, branchImpedance } from "../core/elements/branch.ts";
import type { Rational } from "../core/rational.ts";
import { beyondNumbers, productVanishes } from "./build.ts";
import type { BranchDocument, SourceDocument } from "./types.ts";
import { positive, type ValueReader, type ValueSpec } from "./value.ts";

/** Source or load: part values in SI units and the impedance they make. */
export interface ResolvedBranch {
  readonly values: Branch;
  /** Absent for an open load. */
  readonly impedance: Rational | undefined;
}

export interface ResolvedSource {
  readonly values: Branch;
  readonly impedance: Rational;
  readonly emfV: number;
}

const SOURCE_R: ValueSpec = { unit: "ohm", range: "nonNegative" };
const DEFAULT_EMF_V = 1;

/** An EMF behind a branch, parts in series unless said otherwise; without any part it is ideal. */
export function resolveSource(source: SourceDocument = {}, reader: ValueReader): ResolvedSource {
  const given = branchValues("source", source, SOURCE_R, "series", reader);
  const emfV = reader.value(["source", "emf"], source.emf, positive("volt"), DEFAULT_EMF_V);
  const values = isEmpty(given) ? { ...given, R: 0 } : given;
  const impedance = branchImpedance(values);
  checkSize("source", values, impedance, reader);
  return { values, impedance, emfV };
}

/** A branch across the output, parts in parallel unless said otherwise; without any part the output is open. */
export function resolveLoad(load: BranchDocument = {}, reader: ValueReader): ResolvedBranch {
  const values = branchValues("load", load, positive("ohm"), "parallel", reader);
  const impedance = isEmpty(values) ? undefined : branchImpedance(values);
  checkSize("load", values, impedance, reader);
  return { values, impedance };
}

function branchValues(
  section: string,
  given: BranchDocument,
  resistance: ValueSpec,
  joined: Branch["joined"],
  reader: ValueReader,
): Branch {
  const R = reader.value([section, "R"], given.R, resistance, undefined);
  const L = reader.value([section, "L"], given.L, positive("henry"), undefined);
  const C = reader.value([section, "C"], given.C, positive("farad"), undefined);
  return {
    ...(R === undefined ? {} : { R }),
    ...(L === undefined ? {} : { L }),
    ...(C === undefined ? {} : { C }),
    joined: given.joined ?? joined,
  };
}

const isEmpty = ({ R, L, C }: Branch): boolean => R === undefined && L === undefined && C === undefined;

function checkSize(
  section: string,
  values: Branch,
  impedance: Rational | undefined,
  reader: ValueReader,
): void {
  // A value that is NaN has been refused by itself.
  const overflows = impedance !== undefined && [...impedance.num, ...impedance.den].includes(Infinity);
  if (overflows || productVanishes({ ...values })) reader.refuse(beyondNumbers([section]));
}
