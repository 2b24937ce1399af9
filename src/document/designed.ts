import type { Realisation, RealisedStage } from "../core/design/realise/types.ts";
import type { Requirement } from "../core/design/requirement.ts";
import type { FilterSpec } from "../core/filters/transform.ts";
import { stageKind } from "../core/stages/index.ts";
import { formatQuantity } from "../core/units/format.ts";
import { shortValue } from "../core/units/short-value.ts";
import { type ChainDocument, FORMAT, type RawValue, type StageDocument, VERSION } from "./types.ts";

/** A designed filter as one `filter` stage. */
export function filterStage({ shape, family, order, cornerHz, rippleDb, stopDb }: FilterSpec): StageDocument {
  return {
    kind: "filter",
    name: `${family} ${order}`,
    parts: {
      shape,
      family,
      order,
      ...(cornerHz === undefined ? {} : { corner: shortValue(cornerHz, "hertz") }),
      ...(rippleDb === undefined ? {} : { ripple: rippleDb }),
      ...(stopDb === undefined ? {} : { stop: stopDb }),
    },
  };
}

/** A stage with the values of its parts as an engineer writes them. */
export function realisedStage({ kind, name, values }: RealisedStage): StageDocument {
  const specs = stageKind(kind)?.parts ?? [];
  const written = Object.entries(values).map(([part, value]): [string, RawValue] => {
    const spec = specs.find((each) => each.name === part);
    return [part, spec?.type === "number" && spec.unit !== "gain" ? shortValue(value, spec.unit) : value];
  });
  return { kind, name, parts: Object.fromEntries(written) };
}

/** The designed filter as a chain with what was asked of it as its limits. */
export function designedChain(
  spec: FilterSpec,
  requirement: Requirement,
  realisation: Realisation | undefined,
): ChainDocument {
  const { passHz, passLossDb, stopHz, stopLossDb } = requirement;
  const fromHz = passHz / 1000;
  const relative = realisation?.sourceOhm === undefined ? {} : { re: fromHz };
  return {
    format: FORMAT,
    version: VERSION,
    title: `${spec.family} low-pass of order ${spec.order}, ${formatQuantity(passHz, "hertz")} to ${formatQuantity(stopHz, "hertz")}`,
    ...(realisation?.sourceOhm === undefined
      ? {}
      : { source: { R: shortValue(realisation.sourceOhm, "ohm") } }),
    stages: realisation === undefined ? [filterStage(spec)] : realisation.stages.map(realisedStage),
    ...(realisation?.loadOhm === undefined ? {} : { load: { R: shortValue(realisation.loadOhm, "ohm") } }),
    sweep: { from: shortValue(fromHz, "hertz"), to: shortValue(stopHz * 100, "hertz"), perDecade: 50 },
    limits: [
      {
        name: "pass band",
        quantity: "gain",
        from: shortValue(fromHz, "hertz"),
        to: shortValue(passHz, "hertz"),
        atLeast: -passLossDb,
        ...relative,
      },
      {
        name: "stop band",
        quantity: "gain",
        from: shortValue(stopHz, "hertz"),
        to: shortValue(stopHz * 100, "hertz"),
        atMost: -stopLossDb,
        ...relative,
      },
    ],
  };
}
