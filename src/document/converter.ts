import { formatQuantity } from "../core/units/format.ts";
import { described, problemAt } from "./problem.ts";
import type { ConverterDocument } from "./types.ts";
import { positive, type ValueReader, type ValueSpec } from "./value.ts";

/** The rate alone says where frequencies fold to; what the rest is needed for is not told where it is not given. */
export interface ResolvedConverter {
  readonly rateHz: number;
  /** Absent: no quantisation noise, and no requirement on what folds but one given by hand. */
  readonly bits?: number;
  /** Peak to peak. Absent: no least significant bit in volts. */
  readonly fullScaleV?: number;
  /** Highest frequency of interest, at most half the rate. Absent: nothing that could be folded into. */
  readonly bandHz?: number;
}

const BITS: ValueSpec = { unit: "number", range: { from: 1, to: 64, whole: true } };

export function resolveConverter(converter: ConverterDocument, reader: ValueReader): ResolvedConverter {
  const given = (name: keyof ConverterDocument, spec: ValueSpec) =>
    reader.value(["converter", name], converter[name], spec, undefined);
  const rateHz = reader.required(["converter", "rate"], converter.rate, positive("samplesPerSecond"));
  const bits = given("bits", BITS);
  const fullScaleV = given("fullScale", positive("volt"));
  const bandHz = given("band", positive("hertz"));
  if (bandHz !== undefined && bandHz > rateHz / 2) {
    const found = `${described(converter.band)} is more than half the rate, so the band would fold onto itself`;
    const allowed = `at most ${formatQuantity(rateHz / 2, "hertz", 6)}`;
    reader.refuse(problemAt(["converter", "band"], found, allowed));
  }
  return {
    rateHz,
    ...(bits === undefined ? {} : { bits }),
    ...(fullScaleV === undefined ? {} : { fullScaleV }),
    ...(bandHz === undefined ? {} : { bandHz }),
  };
}
