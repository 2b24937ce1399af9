import { type FamilyAnswer, familyFigures } from "../core/design/figures.ts";
import { leastDesign } from "../core/design/least-order.ts";
import { realiseSteps } from "../core/design/realise/realise.ts";
import { FILTER_FAMILIES, type FilterFamily } from "../core/filters/spec.ts";
import { ok } from "../core/result.ts";
import { designedChain } from "../document/designed.ts";
import { resolveChain } from "../document/resolve.ts";
import type { Chosen, Command, Designed } from "../editor/message.ts";
import type { EditorContext } from "../editor/state.ts";

type DesignCommand = Command & { readonly type: "design" };

let latest = 0;

/**
 * Works the families out one by one, with a turn for waiting keys between them, then makes the one in hand. Undefined
 * when a later request has come meanwhile.
 */
export async function designAll(
  { id, request, family }: DesignCommand,
  context: EditorContext,
): Promise<Designed | undefined> {
  const turn = ++latest;
  const families: FamilyAnswer[] = [];
  for (const each of FILTER_FAMILIES) {
    await nextTurn();
    if (turn !== latest) return undefined;
    families.push(familyFigures(each, request.requirement));
  }
  const chosen = await made(FILTER_FAMILIES[family] as FilterFamily, request, () => turn === latest);
  if (chosen === undefined) return undefined;
  if (!chosen.ok) return { id, families, chosen, look: undefined };
  const document = designedChain(chosen.value.spec, request.requirement, chosen.value.realisation);
  const resolved = resolveChain(document, context);
  const look = { value: "design", resolved: resolved.ok ? resolved.value : undefined, problem: undefined };
  return { id, families, chosen, look };
}

const nextTurn = () => new Promise((resolve) => setImmediate(resolve));

/** Step by step; undefined when it is no longer wanted. */
async function made(
  family: FilterFamily,
  { requirement, circuit, bin }: DesignCommand["request"],
  isWanted: () => boolean,
): Promise<Chosen | undefined> {
  const spec = leastDesign(family, requirement);
  if (!spec.ok) return spec;
  if (circuit === undefined) return ok({ spec: spec.value, realisation: undefined });
  const steps = realiseSteps(spec.value, requirement, circuit, bin);
  for (;;) {
    await nextTurn();
    if (!isWanted()) return undefined;
    const next = steps.next();
    if (!next.done) continue;
    return next.value.ok ? ok({ spec: spec.value, realisation: next.value.value }) : next.value;
  }
}
