import { stripVTControlCharacters } from "node:util";
import { render } from "ink-testing-library";
import { afterEach, expect, it } from "vitest";
import { readChainText } from "../../src/document/read.ts";
import { type EditorState, openedState, type Size } from "../../src/editor/state.ts";
import { App } from "../../src/view/app.tsx";

const context = {
  formula: undefined,
  table: () => ({ ok: false, problem: { found: "", allowed: "" } }) as const,
  folder: "/",
};

function stateAt(size: Size): EditorState {
  const stages = [{ kind: "rc-lowpass", name: "input filter", parts: { R: "1k", C: "100n" } }];
  const text = JSON.stringify({ format: "halfpower-chain", version: 1, title: "level probe", stages });
  const read = readChainText(text, "test", context);
  if (!read.ok) throw new Error(read.problem.found);
  const { document, resolved } = read.value;
  return openedState({ document, resolved, context, file: undefined, size });
}

/** The tree alone, without terminal and effects; the library's screen is 100 columns wide. */
function show(state: EditorState) {
  let now = state;
  const listeners = new Set<() => void>();
  const store = {
    state: () => now,
    subscribe: (listener: () => void) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
  const screen = render(<App store={store} charset="unicode" />);
  opened.push(screen);
  return {
    frame: () => stripVTControlCharacters(screen.lastFrame() ?? ""),
    become: (next: EditorState) => {
      now = next;
      for (const listener of listeners) listener();
    },
  };
}

const opened: { unmount: () => void }[] = [];
afterEach(() => {
  for (const screen of opened.splice(0)) screen.unmount();
});

it("shows state, chain, charts and reading of the store, and follows it", async () => {
  const state = stateAt({ columns: 100, rows: 30 });
  const { frame, become } = show(state);
  expect(frame()).toContain("level probe");
  expect(frame()).toContain("input filter");
  // 1 kΩ and 100 nF at 1 kHz: −10·log10(1 + 0.628319²) = −1.4451 dB.
  expect(frame()).toContain("gain -1.445 dB");
  become({ ...state, cursorHz: 1591.5494309 });
  await expect.poll(frame).toContain("gain -3.010 dB");
  expect(frame().split("\n").length).toBeLessThanOrEqual(30);
});

it("says which size is needed where there is no room", () => {
  expect(show(stateAt({ columns: 59, rows: 18 })).frame()).toContain("60x18 is needed");
});
