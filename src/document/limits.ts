import { plainText } from "../core/text.ts";
import type { UnitTag } from "../core/units/unit.ts";
import { type DocumentPath, described, problemAt } from "./problem.ts";
import { notAbove } from "./range.ts";
import type { LimitDocument, LimitQuantity } from "./types.ts";
import { positive, type ValueReader } from "./value.ts";

/** Bounds in dB, degrees or seconds, by quantity. */
export interface ResolvedLimit {
  /** Safe to show. */
  readonly name: string;
  readonly quantity: LimitQuantity;
  readonly fromHz: number;
  readonly toHz: number;
  readonly atLeast?: number;
  readonly atMost?: number;
  /** The gain at this frequency is the zero of the bounds; absent for absolute bounds. */
  readonly reHz?: number;
}

const UNIT: Readonly<Record<LimitQuantity, UnitTag>> = { gain: "level", phase: "degree", delay: "second" };
const MAX_LIMITS = 1000;

export function resolveLimits(
  limits: readonly LimitDocument[] = [],
  reader: ValueReader,
): readonly ResolvedLimit[] {
  if (limits.length > MAX_LIMITS) {
    reader.refuse(
      problemAt(["limits", MAX_LIMITS], `${limits.length} limits`, `at most ${MAX_LIMITS} of them`),
    );
  }
  return limits.slice(0, MAX_LIMITS).map((limit, index) => resolveLimit(limit, index, reader));
}

function resolveLimit(limit: LimitDocument, index: number, reader: ValueReader): ResolvedLimit {
  const path = ["limits", index];
  const fromHz = reader.required([...path, "from"], limit.from, positive("hertz"));
  const toHz = reader.required([...path, "to"], limit.to, positive("hertz"));
  if (toHz <= fromHz) reader.refuse(notAbove([...path, "to"], limit.to, fromHz));
  return {
    name: plainText(limit.name ?? "", Infinity) || `limit ${index + 1}`,
    quantity: limit.quantity,
    fromHz,
    toHz,
    ...bounds(path, limit, reader),
    ...reference(path, limit, reader),
  };
}

function bounds(path: DocumentPath, limit: LimitDocument, reader: ValueReader) {
  const spec = { unit: UNIT[limit.quantity], range: "any" } as const;
  const atLeast = reader.value([...path, "atLeast"], limit.atLeast, spec, undefined);
  const atMost = reader.value([...path, "atMost"], limit.atMost, spec, undefined);
  if (atLeast === undefined && atMost === undefined) {
    reader.refuse(problemAt(path, "the limit has no bound", "atLeast, atMost or both"));
  }
  if (atLeast !== undefined && atMost !== undefined && atLeast > atMost) {
    const found = `${described(limit.atMost)} is below "atLeast"`;
    reader.refuse(problemAt([...path, "atMost"], found, `at least ${described(limit.atLeast)}`));
  }
  return { ...(atLeast === undefined ? {} : { atLeast }), ...(atMost === undefined ? {} : { atMost }) };
}

function reference(path: DocumentPath, limit: LimitDocument, reader: ValueReader) {
  if (limit.re === undefined) return {};
  if (limit.quantity !== "gain") {
    const allowed = '"re" with the quantity "gain" only';
    reader.refuse(problemAt([...path, "re"], `a ${limit.quantity} is not relative`, allowed, "name"));
  }
  return { reHz: reader.required([...path, "re"], limit.re, positive("hertz")) };
}
