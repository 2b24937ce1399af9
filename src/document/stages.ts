import type { DocumentContext } from "./context.ts";
import { problemAt, within } from "./problem.ts";
import { type ResolvedStage, resolveStage } from "./stage.ts";
import type { StageDocument } from "./types.ts";
import type { ValueReader } from "./value.ts";

export const MAX_STAGES = 200;

/** The stages up to the first that is refused; the rest of a refused chain is not needed. */
export function resolveStages(
  stages: readonly StageDocument[] = [],
  context: DocumentContext,
  reader: ValueReader,
): readonly ResolvedStage[] {
  const resolved: ResolvedStage[] = [];
  for (const [index, stage] of stages.slice(0, MAX_STAGES).entries()) {
    const result = resolveStage(stage, context);
    if (!result.ok) {
      reader.refuse(within(["stages", index], result.problem));
      return resolved;
    }
    resolved.push(result.value);
  }
  if (stages.length > MAX_STAGES) {
    reader.refuse(
      problemAt(["stages", MAX_STAGES], `there are ${stages.length} stages`, `at most ${MAX_STAGES}`),
    );
  }
  return resolved;
}
