import { render } from "ink";
import type { Charset } from "./core/units/format.ts";
import { verdictsOn } from "./document/verdicts.ts";
import type { Message } from "./editor/message.ts";
import { type EditorState, type Judged, openedState } from "./editor/state.ts";
import { update } from "./editor/update.ts";
import type { OpenedChain } from "./effects/chain-files.ts";
import type { ContextChain } from "./effects/chain-text.ts";
import { type Journal, openJournal } from "./effects/journal.ts";
import { appFolders } from "./effects/paths.ts";
import { journalled, offerLeftWork, originOf, perform } from "./effects/perform.ts";
import { openPresets, type Presets } from "./effects/presets.ts";
import type { ScreenDisplay } from "./effects/terminal/display.ts";
import { openTerminal, type Terminal } from "./effects/terminal/open.ts";
import { App } from "./view/app.tsx";

/** A chain to begin with; with path and stamp it has a file to be saved to. */
export type FirstChain = ContextChain & Partial<OpenedChain>;

export interface WorkstationOptions {
  readonly chain: FirstChain;
  readonly display: ScreenDisplay;
}

/** Opens the full screen on a chain and resolves to the exit status when it is left. */
export async function runWorkstation({ chain, display }: WorkstationOptions): Promise<number> {
  const folders = appFolders();
  const terminal = openTerminal({
    stdin: process.stdin,
    stdout: process.stdout,
    display,
    // Every edit is in the journal already.
    onLost: () => {},
  });
  const presets = openPresets(folders);
  const journal = openJournal(folders.state);
  const charset = display.unicode ? "unicode" : "ascii";
  await startWorkstation({ terminal, chain, presets, journal, charset }).left;
  return 0;
}

export interface Surroundings {
  readonly terminal: Terminal;
  readonly chain: FirstChain;
  readonly presets: Presets;
  readonly journal: Journal;
  readonly charset: Charset;
}

export interface RunningWorkstation {
  readonly state: () => EditorState;
  readonly dispatch: (message: Message) => void;
  /** Resolves when the person has left and the terminal is given back. */
  readonly left: Promise<void>;
}

/** State, views and effects joined together in a terminal that is open already. */
export function startWorkstation({
  terminal,
  chain,
  presets,
  journal,
  charset,
}: Surroundings): RunningWorkstation {
  const { document, resolved, context } = chain;
  const size = { columns: terminal.columns, rows: terminal.rows };
  let state = openedState({ document, resolved, context, file: originOf(chain), size });
  const listeners = new Set<() => void>();
  let leave = () => {};
  const left = new Promise<void>((resolve) => {
    leave = resolve;
  });

  const dispatch = (message: Message): void => {
    const before = state;
    const { state: after, commands } = update(before, message);
    state = after;
    if (after.document !== before.document || after.saved !== before.saved) {
      journalled(after, after.saved, journal);
    }
    if (after.resolved !== before.resolved) judge();
    if (after !== before) for (const listener of listeners) listener();
    for (const command of commands) void perform(command, means).catch(tellFault);
  };
  const quit = () => {
    journal.clear();
    leave();
  };
  const judge = judgeLater(
    () => state,
    (judged) => dispatch({ type: "judged", judged }),
  );
  const means = { presets, journal, state: () => state, dispatch, quit };
  /** A fault of the program ends it as an exception would, with the terminal given back. */
  const tellFault = (error: unknown): void => {
    setImmediate(() => {
      throw error;
    });
  };

  const store = {
    state: () => state,
    subscribe: (listener: () => void) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
  const screen = render(<App store={store} charset={charset} />, {
    stdout: terminal.stdout,
    stdin: terminal.stdin,
    debug: true,
    patchConsole: false,
    exitOnCtrlC: false,
  });
  terminal.onKey((key) => dispatch({ type: "key", key }));
  terminal.onResize((to) => dispatch({ type: "resized", size: to }));
  judge();
  setImmediate(() => lookAround({ presets, journal, dispatch }));
  return {
    state: () => state,
    dispatch,
    left: left.then(() => {
      screen.unmount();
      terminal.close();
    }),
  };
}

/** Verdicts on the latest chain, after the frame that shows it; keys that wait go first. */
function judgeLater(state: () => EditorState, tell: (judged: Judged) => void): () => void {
  let waiting: NodeJS.Immediate | undefined;
  return () => {
    clearImmediate(waiting);
    waiting = setImmediate(() => {
      const { resolved } = state();
      tell({ resolved, verdicts: verdictsOn(resolved) });
    });
  };
}

/** After the first frame: work that was left behind, and what was found amiss with settings and journals. */
async function lookAround({
  presets,
  journal,
  dispatch,
}: Pick<Surroundings, "presets" | "journal"> & {
  readonly dispatch: (message: Message) => void;
}): Promise<void> {
  offerLeftWork({ journal, dispatch });
  await presets.list();
  for (const text of [...journal.notes(), ...presets.notes()]) dispatch({ type: "told", text, bad: true });
}
