import type { EditorState } from "../editor/state.ts";

/** The state as the views see it: what it is now, and a call whenever it is another one. */
export interface Store {
  readonly state: () => EditorState;
  readonly subscribe: (listener: () => void) => () => void;
}
