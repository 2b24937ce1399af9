import { parseQuantity } from "../../core/units/quantity.ts";
import type { PromptDialog, PromptPurpose } from "../dialog.ts";
import { type Message, type Step, step } from "../message.ts";
import type { EditorState } from "../state.ts";
import { typeInto } from "../text-field.ts";
import { openNamed, saveUnder } from "./files.ts";
import { toTypedFrequency, toTypedLevel } from "./go-to.ts";
import { keepChainAs, keepStageAs, renamePresetTo } from "./presets.ts";
import { solveFor } from "./real-parts.ts";
import { insertStage, rename } from "./stages.ts";

/** A key while a line is being typed. */
export function promptKey(
  state: EditorState,
  dialog: PromptDialog,
  message: Message & { type: "key" },
): Step {
  const { key } = message;
  if (key.name === "escape") return step({ ...state, dialog: undefined });
  if (key.name === "enter") return answered(state, dialog);
  const input = typeInto(dialog.input, key);
  return input === undefined
    ? step(state)
    : step({ ...state, dialog: { ...dialog, input, problem: undefined } });
}

/** What the line was asked for, or the line again with what is wrong with it. */
function answered(state: EditorState, dialog: PromptDialog): Step {
  const closed = { ...state, dialog: undefined };
  const outcome = carryOut(closed, dialog.purpose, dialog.input.text.trim());
  if (typeof outcome !== "string") return outcome;
  return step({ ...state, dialog: { ...dialog, problem: outcome } });
}

function carryOut(state: EditorState, purpose: PromptPurpose, text: string): Step | string {
  switch (purpose.type) {
    case "frequency":
      return toTypedFrequency(state, text);
    case "level":
      return toTypedLevel(state, text);
    case "solve":
      return solveFor(state, text);
    case "gain-axis":
      return setGainAxis(state, text);
    case "rename":
      return rename(state, text);
    case "file-of":
      return text === ""
        ? "a file name is needed"
        : insertStage(state, { kind: purpose.kind, parts: { file: text } }, `add ${purpose.kind}`);
    case "open":
      return text === "" ? "a file or the name of a preset is needed" : openNamed(state, text);
    case "save-as":
      return text === "" ? "a file name is needed" : saveUnder(state, text, purpose.after);
    case "keep-stage":
      return keepStageAs(state, text);
    case "keep-chain":
      return keepChainAs(state, text);
    case "rename-preset":
      return renamePresetTo(state, purpose.name, text);
  }
}

const LEAST_SPAN_DB = 0.01;

/** `-80 20` fixes the gain axis, nothing lets it follow the response again. */
function setGainAxis(state: EditorState, text: string): Step | string {
  if (text === "") return step({ ...state, gainRange: undefined });
  const words = text.split(/\s+/).filter((word) => !/^dB$/i.test(word));
  const bounds = words.map((word) => parseQuantity(word, "level"));
  const [low, high] = bounds;
  if (bounds.length !== 2 || low?.ok !== true || high?.ok !== true) {
    return "allowed is two levels in dB, as in -80 20, or nothing for an axis that follows the response";
  }
  if (high.value - low.value < LEAST_SPAN_DB) return "the second level must lie above the first";
  return step({ ...state, gainRange: { lowDb: low.value, highDb: high.value } });
}
