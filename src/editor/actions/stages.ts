import { stageKind } from "../../core/stages/index.ts";
import type { StageKind } from "../../core/stages/kind.ts";
import { MAX_STAGES } from "../../document/stages.ts";
import {
  type ChainDocument,
  FORMAT,
  type LimitDocument,
  type LimitQuantity,
  type StageDocument,
  VERSION,
} from "../../document/types.ts";
import { changed } from "../apply.ts";
import { setAt } from "../document-edit.ts";
import { type Message, type Step, step, told } from "../message.ts";
import { rowOfLimit, rowOfStage } from "../rows.ts";
import type { EditorState } from "../state.ts";
import { rowInHand } from "./rows.ts";

/** A stage as the chooser starts it, every part at its initial value. */
export function initialStage(kind: StageKind): StageDocument {
  const given = kind.parts.flatMap(({ name, initial }) => (initial ? [[name, initial] as const] : []));
  return given.length === 0 ? { kind: kind.kind } : { kind: kind.kind, parts: Object.fromEntries(given) };
}

/** A stage alone, behind an ideal source and into an open output. */
export const chainOfOne = (stage: StageDocument, sweep: ChainDocument["sweep"]): ChainDocument => ({
  format: FORMAT,
  version: VERSION,
  title: `${nameOf(stage)} alone`,
  stages: [stage],
  ...(sweep === undefined ? {} : { sweep }),
});

/** What a person calls a stage: its name, else its kind. */
export const nameOf = ({ name, kind }: StageDocument): string => name || kind;

/** Behind the stage in hand; behind the source or the load, first or last. */
export function positionToInsert(state: EditorState): number {
  const row = rowInHand(state);
  if (row.type === "stage") return row.index + 1;
  return row.type === "chain" || row.type === "source" ? 0 : state.document.stages.length;
}

const withStages = (document: ChainDocument, stages: readonly StageDocument[]): ChainDocument => ({
  ...document,
  stages,
});

/** Inserts a stage at the row in hand and takes it in hand. */
export function insertStage(state: EditorState, stage: StageDocument, words: string, again?: Message): Step {
  const { document } = state;
  if (document.stages.length >= MAX_STAGES)
    return told(state, `a chain has at most ${MAX_STAGES} stages`, true);
  const at = positionToInsert(state);
  const stages = [...document.stages.slice(0, at), stage, ...document.stages.slice(at)];
  const after = changed(state, words, withStages(document, stages), again);
  return tookIn(after, state, { row: rowOfStage(at), field: 0 });
}

/** The step with a row taken in hand, unless the change was refused or has to wait. */
function tookIn(after: Step, before: EditorState, inHand: Pick<EditorState, "row" | "field">): Step {
  return after.state.document === before.document
    ? after
    : { ...after, state: { ...after.state, ...inHand } };
}

export function duplicate(state: EditorState): Step {
  const row = rowInHand(state);
  if (row.type === "limit") return duplicateLimit(state, row.index, row.limit);
  if (row.type !== "stage") return told(state, "only a stage or a limit can be duplicated", true);
  return insertStage(state, { ...row.stage }, `duplicate ${nameOf(row.stage)}`);
}

function duplicateLimit(state: EditorState, index: number, limit: LimitDocument): Step {
  const limits = [...(state.document.limits ?? [])];
  limits.splice(index + 1, 0, { ...limit });
  return tookIn(changed(state, "duplicate limit", { ...state.document, limits }), state, {
    row: state.row + 1,
    field: 0,
  });
}

/** Removes the stage or limit in hand; a load, source or converter goes back to none. */
export function remove(state: EditorState): Step {
  const { document } = state;
  const row = rowInHand(state);
  switch (row.type) {
    case "stage":
      return changed(
        state,
        `delete ${nameOf(row.stage)}`,
        withStages(
          document,
          document.stages.filter((_, index) => index !== row.index),
        ),
      );
    case "limit": {
      const limits = (document.limits ?? []).filter((_, index) => index !== row.index);
      return changed(
        state,
        "delete limit",
        setAt(document, ["limits"], limits.length === 0 ? undefined : limits),
      );
    }
    case "chain":
      return told(state, "the chain itself cannot be deleted; O opens another", true);
    default: {
      if (document[row.type] === undefined) return told(state, `there is no ${row.type} to delete`, true);
      return changed(state, `delete ${row.type}`, setAt(document, [row.type], undefined));
    }
  }
}

/** Moves the stage in hand one place along the line. */
export function move(state: EditorState, direction: 1 | -1): Step {
  const row = rowInHand(state);
  if (row.type !== "stage") return told(state, "only a stage can be moved", true);
  const to = row.index + direction;
  const stages = [...state.document.stages];
  if (to < 0 || to >= stages.length) return told(state, "there is no further to move it", true);
  [stages[row.index], stages[to]] = [stages[to] as StageDocument, row.stage];
  const after = changed(state, `move ${nameOf(row.stage)}`, withStages(state.document, stages));
  return tookIn(after, state, { row: rowOfStage(to), field: state.field });
}

/** Takes the stage in hand out of the line, or puts it back. */
export function takeOut(state: EditorState): Step {
  const row = rowInHand(state);
  if (row.type !== "stage") return told(state, "only a stage can be taken out of the line", true);
  const { off = false } = row.stage;
  const words = off ? `put back ${nameOf(row.stage)}` : `take out ${nameOf(row.stage)}`;
  return changed(state, words, setAt(state.document, ["stages", row.index, "off"], off ? undefined : true));
}

export function rename(state: EditorState, name: string): Step {
  const row = rowInHand(state);
  const value = name.trim() || undefined;
  if (row.type === "stage") {
    return changed(
      state,
      `rename ${nameOf(row.stage)}`,
      setAt(state.document, ["stages", row.index, "name"], value),
    );
  }
  if (row.type === "limit")
    return changed(state, "rename limit", setAt(state.document, ["limits", row.index, "name"], value));
  return changed(state, "rename chain", setAt(state.document, ["title"], value));
}

/** Adds a stage of a kind with its initial parts. */
export function addKind(state: EditorState, kind: string, again: Message): Step {
  const found = stageKind(kind);
  if (found === undefined) return step(state);
  return insertStage(state, initialStage(found), `add ${kind}`, again);
}

/** Adds a limit with bounds to be typed over: over the band of interest, else over the sweep. */
export function addLimit(state: EditorState, quantity: LimitQuantity): Step {
  const { document, resolved } = state;
  const { fromHz, toHz } = resolved.sweep;
  const limit: LimitDocument = {
    name: `limit on ${quantity}`,
    quantity,
    from: fromHz,
    to: resolved.converter?.bandHz ?? toHz,
    ...(quantity === "gain"
      ? { atLeast: -1, atMost: 1, re: state.cursorHz }
      : { atMost: quantity === "phase" ? 180 : 1 }),
  };
  const limits = [...(document.limits ?? []), limit];
  const after = changed(state, `add limit on ${quantity}`, { ...document, limits });
  return tookIn(after, state, { row: rowOfLimit(document, limits.length - 1), field: 2 });
}
