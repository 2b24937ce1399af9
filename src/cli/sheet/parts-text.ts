import type { Branch } from "../../core/elements/branch.ts";
import { stageKind } from "../../core/stages/index.ts";
import type { PartValue } from "../../core/stages/kind.ts";
import { plainText } from "../../core/text.ts";
import { formatExact, formatPercent, formatQuantity } from "../../core/units/format.ts";
import type { UnitTag } from "../../core/units/unit.ts";
import type { ResolvedStage } from "../../document/stage.ts";
import type { StageDocument } from "../../document/types.ts";

const MOST_TEXT = 60;
const DIGITS = 6;

/** `R 1 kΩ ±1 %` for every part that is given, in the order of the file. */
export function stageParts(stage: ResolvedStage, document: StageDocument): readonly string[] {
  return Object.entries(stage.values).map(([name, value]) => {
    const tolerance = stage.tolerances[name];
    const raw = document.parts?.[name];
    const spread = tolerance === undefined ? "" : ` ±${formatPercent(tolerance)}`;
    return `${name} ${valueText(value, raw, unitOf(stage.kind, name))}${spread}`;
  });
}

/** Constants that a formula brings along have no unit. */
function unitOf(kind: string, part: string): UnitTag {
  const spec = stageKind(kind)?.parts.find(({ name }) => name === part);
  return spec?.type === "number" ? spec.unit : "number";
}

function valueText(value: PartValue, raw: unknown, unit: UnitTag): string {
  if (typeof value === "string") return value;
  if (typeof value === "object") {
    return plainText(value.type === "formula" ? value.text : String(raw), MOST_TEXT);
  }
  // A gain that was written in dB is thought of in dB.
  const isInDb = unit === "gain" && typeof raw === "string" && /dB\s*$/.test(raw);
  return isInDb ? plainText(raw.trim(), MOST_TEXT) : formatQuantity(value, unit, DIGITS);
}

/** `R 350 Ω and C 30 pF in parallel`; empty without a part. */
export function branchText({ R, L, C, joined }: Branch): string {
  const parts = [
    ...(R === undefined ? [] : [`R ${formatExact(R, "ohm")}`]),
    ...(L === undefined ? [] : [`L ${formatExact(L, "henry")}`]),
    ...(C === undefined ? [] : [`C ${formatExact(C, "farad")}`]),
  ];
  return parts.length < 2 ? parts.join("") : `${parts.join(", ")} in ${joined}`;
}
