import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll } from "vitest";
import type { CliIo } from "../../src/cli/io.ts";
import type { PresetStore } from "../../src/cli/preset-store.ts";
import { runCli } from "../../src/cli/run.ts";

export interface Ran {
  readonly exitCode: number;
  readonly stdout: string;
  readonly stderr: string;
}

export interface RunSettings {
  readonly env?: Readonly<Record<string, string>>;
  readonly input?: string;
  readonly presets?: PresetStore;
}

const folders: string[] = [];

/** A folder of its own, gone when the tests of the file are done. */
export function folder(): string {
  const path = mkdtempSync(join(tmpdir(), "halfpower-cli-"));
  folders.push(path);
  return path;
}

afterAll(() => {
  for (const path of folders.splice(0)) rmSync(path, { recursive: true, force: true });
});

/** A file of this content in a folder of its own. */
export function fileOf(content: string | object, name = "pump.chain.json"): string {
  const path = join(folder(), name);
  writeFileSync(path, typeof content === "string" ? content : JSON.stringify(content));
  return path;
}

/** Runs the program in this process, in a UTF-8 locale unless told otherwise, and keeps what it writes. */
export async function run(argv: readonly string[], settings: RunSettings = {}): Promise<Ran> {
  const written = { stdout: "", stderr: "" };
  const output = (stream: keyof typeof written) => ({
    write: async (text: string) => {
      written[stream] += text;
    },
  });
  const io: CliIo = {
    env: settings.env ?? { LANG: "C.UTF-8" },
    stdin: (async function* () {
      if (settings.input !== undefined) yield Buffer.from(settings.input);
    })(),
    stdout: output("stdout"),
    stderr: output("stderr"),
    ...(settings.presets === undefined ? {} : { presets: settings.presets }),
  };
  const exitCode = await runCli(argv, io);
  return { exitCode, ...written };
}

export const ASCII = { LC_ALL: "C" };

/** The smallest chain with a shape: 1 kΩ and 100 nF, half power at 1591.549 Hz. */
export const lowpass = (rest: object = {}) => ({
  format: "halfpower-chain",
  version: 1,
  title: "Pump 1, pressure line",
  stages: [{ kind: "rc-lowpass", name: "RFI filter", parts: { R: "1k", C: "100n" } }],
  ...rest,
});
