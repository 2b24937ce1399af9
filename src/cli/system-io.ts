import type { CliIo, CliOutput } from "./io.ts";

/** The process's own streams, environment and presets. */
export function systemIo(): CliIo {
  return {
    env: process.env,
    stdin: process.stdin,
    stdout: output(process.stdout),
    stderr: output(process.stderr),
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
