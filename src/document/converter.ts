import { formatQuantity } from "../core/units/format.ts";
import { described, problemAt } from "./problem.ts";
import type { ConverterDocument } from "./types.ts";
import { positive, type ValueReader, type ValueSpec } from "./value.ts";

export interface ResolvedConverter {
  readonly rateHz: number;
  readonly bits: number;
  /** Peak to peak. */
  readonly fullScaleV: number;
  /** Highest frequency of interest, at most half the rate. */
  readonly bandHz: number;
}

const BITS: ValueSpec = { unit: "number", range: { from: 1, to: 64, whole: true } };

export function resolveConverter(converter: ConverterDocument, reader: ValueReader): ResolvedConverter {
  const required = (name: keyof ConverterDocument, spec: ValueSpec) =>
    reader.required(["converter", name], converter[name], spec);
  const rateHz = required("rate", positive("samplesPerSecond"));
  const bits = required("bits", BITS);
  const fullScaleV = required("fullScale", positive("volt"));
  const bandHz = required("band", positive("hertz"));
  if (bandHz > rateHz / 2) {
    const found = `${described(converter.band)} is more than half the rate, so the band would fold onto itself`;
    const allowed = `at most ${formatQuantity(rateHz / 2, "hertz", 6)}`;
    reader.refuse(problemAt(["converter", "band"], found, allowed));
  }
  return { rateHz, bits, fullScaleV, bandHz };
}
