import { appFolders } from "../effects/paths.ts";
import { openPresets } from "../effects/presets.ts";
import type { CliIo, CliOutput } from "./io.ts";
import { presetStore } from "./preset-adapter.ts";

/** The process's own streams, environment and presets. */
export function systemIo(): CliIo {
  return {
    env: process.env,
    stdin: process.stdin,
    stdout: output(process.stdout),
    stderr: output(process.stderr),
    presets: presetStore(openPresets(appFolders())),
  };
}

function output(stream: NodeJS.WriteStream): CliOutput {
  // What goes wrong is told by the write itself; without a listener the process would end with a stack trace.
  stream.on("error", () => {});
  return {
    isTTY: stream.isTTY,
    write: (text) =>
      new Promise((resolve, reject) => {
        stream.write(text, (error) => (error ? reject(error) : resolve()));
      }),
  };
}
