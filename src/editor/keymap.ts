import { ask } from "./actions/ask.ts";
import { byColumn, byDecade, byFineStep, exchangePin, pin, toEnd } from "./actions/cursor.ts";
import { openDesign } from "./actions/design.ts";
import { editField, editTolerance, nudge } from "./actions/field.ts";
import { askForName, askToOpen, quit, save } from "./actions/files.ts";
import { dropGhost, flipGhost, keepGhost } from "./actions/ghost.ts";
import { listPlaces, toNextPlace } from "./actions/go-to.ts";
import { openHelp } from "./actions/help.ts";
import { redo, undo } from "./actions/history.ts";
import { chooseNudge, chooseOverlays, chooseWhatToAdd } from "./actions/list.ts";
import { askToKeepChain, askToKeepStage, browsePresets } from "./actions/presets.ts";
import { realiseInHand, snapInHand } from "./actions/real-parts.ts";
import { rowInHand, toField, toRow } from "./actions/rows.ts";
import { duplicate, move, nameOf, remove, takeOut } from "./actions/stages.ts";
import { pan, wholeSweep, zoom } from "./actions/window.ts";
import type { Step } from "./message.ts";
import type { EditorState } from "./state.ts";

/** What one wants to do; the help screen is in this order. */
export const KEY_GROUPS = [
  "Read",
  "Jump",
  "Look",
  "Compare",
  "Walk the chain",
  "Change a value",
  "Change the chain",
  "Real parts",
  "Keep",
  "Leave",
] as const;

/** Keys that do something, with the words for it: dispatch, hint line and help all come from this. */
export interface Binding {
  readonly keys: readonly string[];
  /** As the help shows them. */
  readonly shown: string;
  readonly does: string;
  readonly group: (typeof KEY_GROUPS)[number];
  readonly action: (state: EditorState) => Step;
}

type Group = Binding["group"];

const binding = (
  group: Group,
  keys: string,
  shown: string,
  does: string,
  action: Binding["action"],
): Binding => ({ group, keys: keys.split(" "), shown, does, action });

/** What a person is asked to rename: the stage, the limit or the chain in hand. */
function askToRename(state: EditorState): Step {
  const row = rowInHand(state);
  if (row.type === "stage") return ask(state, { type: "rename" }, "name of the stage", row.stage.name ?? "");
  if (row.type === "limit") return ask(state, { type: "rename" }, "name of the limit", row.limit.name ?? "");
  return ask(state, { type: "rename" }, "title of the chain", state.document.title ?? "");
}

const gainAxisText = ({ gainRange }: EditorState): string =>
  gainRange === undefined ? "" : `${gainRange.lowDb} ${gainRange.highDb}`;

export const BINDINGS: readonly Binding[] = [
  binding("Read", "left", "←", "cursor one column down", (state) => byColumn(state, -1)),
  binding("Read", "right", "→", "cursor one column up", (state) => byColumn(state, 1)),
  binding("Read", "shift+left ,", "Shift+← ,", "a fine step down", (state) => byFineStep(state, -1)),
  binding("Read", "shift+right .", "Shift+→ .", "a fine step up", (state) => byFineStep(state, 1)),
  binding("Read", "pagedown", "PgDn", "a decade down", (state) => byDecade(state, -1)),
  binding("Read", "pageup", "PgUp", "a decade up", (state) => byDecade(state, 1)),
  binding("Read", "home", "Home", "to the lower end", (state) => toEnd(state, "low")),
  binding("Read", "end", "End", "to the upper end", (state) => toEnd(state, "high")),
  binding("Read", "p", "p", "pin the cursor, or take the pin up", pin),
  binding("Read", "x", "x", "cursor and pin change places", exchangePin),

  binding("Jump", "f", "f", "to a typed frequency", (state) =>
    ask(state, { type: "frequency" }, "frequency"),
  ),
  binding("Jump", "l", "l", "to the next crossing of a typed level", (state) =>
    ask(state, { type: "level" }, "level in dB"),
  ),
  binding("Jump", "n", "n", "to the next place of note", (state) => toNextPlace(state, 1)),
  binding("Jump", "N", "N", "to the place of note before", (state) => toNextPlace(state, -1)),
  binding("Jump", "g", "g", "a list of them: peaks, nulls, ±180° …", listPlaces),

  binding("Look", "z", "z", "zoom in on the cursor", (state) => zoom(state, "in")),
  binding("Look", "Z", "Z", "zoom out", (state) => zoom(state, "out")),
  binding("Look", "<", "<", "charts to lower frequencies", (state) => pan(state, -1)),
  binding("Look", ">", ">", "charts to higher frequencies", (state) => pan(state, 1)),
  binding("Look", "w", "w", "the whole sweep", wholeSweep),
  binding("Look", "v", "v", "fix the gain axis, or let it follow", (state) =>
    ask(state, { type: "gain-axis" }, "gain axis from and to, in dB", gainAxisText(state)),
  ),
  binding("Look", "y", "y", "what is laid over the charts", chooseOverlays),

  binding("Compare", "b", "b", "keep the response behind the charts", keepGhost),
  binding("Compare", "space", "Space", "before and after change places", flipGhost),
  binding("Compare", "B", "B", "drop the response kept", dropGhost),

  binding("Walk the chain", "up", "↑", "the row above", (state) => toRow(state, -1)),
  binding("Walk the chain", "down", "↓", "the row below", (state) => toRow(state, 1)),
  binding("Walk the chain", "tab", "Tab", "the next value of the row", (state) => toField(state, 1)),
  binding("Walk the chain", "backtab", "Shift+Tab", "the value before", (state) => toField(state, -1)),

  binding("Change a value", "enter", "Enter", "edit it, or type a number over it", (state) =>
    editField(state),
  ),
  binding("Change a value", "+ =", "+", "one step up", (state) => nudge(state, "up")),
  binding("Change a value", "- _", "-", "one step down", (state) => nudge(state, "down")),
  binding("Change a value", "e", "e", "choose the step: E series or percent", chooseNudge),
  binding("Change a value", "t", "t", "tolerance of the value in hand", editTolerance),
  binding("Change a value", "u", "u", "undo", undo),
  binding("Change a value", "U ctrl+r", "U Ctrl+R", "do again", redo),

  binding("Change the chain", "a", "a", "add a stage or a limit", chooseWhatToAdd),
  binding("Change the chain", "d", "d", "duplicate", duplicate),
  binding("Change the chain", "delete backspace", "Del", "delete", remove),
  binding("Change the chain", "shift+up {", "Shift+↑ {", "move towards the source", (state) =>
    move(state, -1),
  ),
  binding("Change the chain", "shift+down }", "Shift+↓ }", "move towards the load", (state) =>
    move(state, 1),
  ),
  binding("Change the chain", "o", "o", "take out of the line, or put back", takeOut),
  binding("Change the chain", "r", "r", "rename", askToRename),

  binding("Real parts", "D", "D", "design a filter from its edges", openDesign),
  binding("Real parts", "R", "R", "make an ideal stage of real parts", realiseInHand),
  binding("Real parts", "E", "E", "snap the stage's parts to the series", snapInHand),
  binding("Real parts", "i", "i", "solve it for a gain at the cursor", (state) =>
    ask(state, { type: "solve" }, "gain at the cursor, in dB"),
  ),

  binding("Keep", "s", "s", "save", (state) => save(state)),
  binding("Keep", "S", "S", "save under a name", (state) => askForName(state)),
  binding("Keep", "O", "O", "open a file or a preset", askToOpen),
  binding("Keep", "P", "P", "browse presets", browsePresets),
  binding("Keep", "k", "k", "keep the stage in hand as a preset", askToKeepStage),
  binding("Keep", "K", "K", "keep the chain as a preset", askToKeepChain),

  binding("Leave", "?", "?", "this help", openHelp),
  binding("Leave", "q ctrl+c", "q Ctrl+C", "leave", quit),
];

const byKey = new Map(BINDINGS.flatMap((each) => each.keys.map((key) => [key, each] as const)));

export const bindingOf = (word: string): Binding | undefined => byKey.get(word);

/** What the hint line says of the keys in the present context, most wanted first. */
export function hintsOf(state: EditorState): readonly (readonly [keys: string, does: string])[] {
  switch (state.dialog?.type) {
    case "field":
      return [
        ["Enter", "take"],
        ["Tab", "take, next value"],
        ["Esc", "as before"],
      ];
    case "prompt":
      return [
        ["Enter", "go"],
        ["Esc", "back"],
      ];
    case "list":
      return listHints(state.dialog.purpose);
    case "design":
      return [
        ["↑ ↓", "rows"],
        ["← →", "choose"],
        ["Enter", "on a family: insert it"],
        ["Esc", "back"],
      ];
    case "question":
      return state.dialog.answers.map(({ key, words }) => [key, words]);
    case "help":
      return [
        ["↑ ↓ PgUp PgDn", "scroll"],
        ["any other key", "back"],
      ];
    default:
      return rowHints(state);
  }
}

function listHints(purpose: string): readonly (readonly [string, string])[] {
  const move = ["↑ ↓", "choose"] as const;
  const close = ["Esc", "back"] as const;
  if (purpose === "overlays") return [move, ["Enter", "show or not"], close];
  if (purpose === "presets") {
    return [
      move,
      ["Enter", "take"],
      ["letters", "narrow down"],
      ["Ctrl+R", "rename"],
      ["Del", "remove"],
      close,
    ];
  }
  return [move, ["Enter", "take"], ["letters", "narrow down"], close];
}

function rowHints(state: EditorState): readonly (readonly [string, string])[] {
  const row = rowInHand(state);
  // All keys and the way out come before what may be cut off on a narrow screen.
  const always = [
    ["?", "all keys"],
    ["← →", "cursor"],
    ["↑ ↓", "rows"],
    ["Tab", "values"],
    ["Enter", "edit"],
    ["q", "leave"],
  ] as const;
  const rest = [
    ["a", "add"],
    ["u", "undo"],
    ["s", "save"],
    ["D", "design"],
  ] as const;
  if (row.type !== "stage") return [...always, ...rest];
  return [
    ...always,
    ["+ -", "nudge"],
    ["o", row.stage.off ? `put back ${nameOf(row.stage)}` : "take out"],
    ...rest,
  ];
}
