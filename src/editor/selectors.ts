import type { ResolvedChain } from "../document/resolve.ts";
import type { Look } from "./dialog.ts";
import { chainBehind, type EditorState, shownChain, type Window } from "./state.ts";

/** What is looked at in a list before it is taken. */
export const lookOf = ({ dialog }: EditorState): Look | undefined =>
  dialog?.type === "list" || dialog?.type === "design" ? dialog.look : undefined;

/** The chain that charts and reading show: one that is looked at, else the present one or the one kept. */
export const chainOnCharts = (state: EditorState): ResolvedChain =>
  lookOf(state)?.resolved ?? shownChain(state);

/** The response behind it: none while something else is looked at. */
export const ghostOnCharts = (state: EditorState): ResolvedChain | undefined =>
  lookOf(state)?.resolved === undefined ? chainBehind(state) : undefined;

/** Frequencies of the charts: a preset that is looked at shows its own sweep. */
export function windowOnCharts(state: EditorState): Window {
  const look = lookOf(state)?.resolved;
  if (look === undefined || (state.dialog?.type === "list" && state.dialog.purpose === "add"))
    return state.window;
  return look.sweep;
}
