import type { HelpDialog } from "../dialog.ts";
import { type Message, type Step, step } from "../message.ts";
import type { EditorState } from "../state.ts";

export const openHelp = (state: EditorState): Step =>
  step({ ...state, dialog: { type: "help", scroll: 0 }, notice: undefined });

const PAGE = 10;
const SCROLL: Readonly<Record<string, number>> = { up: -1, down: 1, pageup: -PAGE, pagedown: PAGE };

/** Arrows and page keys scroll, any other key closes. The view stops at the end. */
export function helpKey(
  state: EditorState,
  { scroll }: HelpDialog,
  { key }: Message & { type: "key" },
): Step {
  const by = SCROLL[key.name];
  if (by === undefined) return step({ ...state, dialog: undefined });
  return step({ ...state, dialog: { type: "help", scroll: Math.max(0, scroll + by) } });
}
