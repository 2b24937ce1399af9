import type { Charset } from "../core/units/format.ts";
import type { PresetStore } from "./preset-store.ts";

/** The streams and the environment of one run, so that tests can stand in for them. */
export interface CliIo {
  readonly env: Readonly<Record<string, string | undefined>>;
  readonly stdin: AsyncIterable<Uint8Array | string> & { readonly isTTY?: boolean };
  readonly stdout: CliOutput;
  readonly stderr: CliOutput;
  /** Absent where presets cannot be had. */
  readonly presets?: PresetStore;
}

export interface CliOutput {
  readonly isTTY?: boolean;
  /** Resolves when the text is handed over; rejects with what the system says. */
  readonly write: (text: string) => Promise<void>;
}

/** What a command needs besides its own arguments. */
export interface Session {
  readonly io: CliIo;
  readonly charset: Charset;
}
