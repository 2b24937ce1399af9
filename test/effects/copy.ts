import { type ChildProcess, execFile, spawn } from "node:child_process";
import { chmodSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { build } from "esbuild";

export interface CopyOptions {
  /** The system lets no file grow beyond. */
  readonly fileLimitKb?: number;
  /** Without the rights of the superuser, where the tests have them. */
  readonly asNobody?: boolean;
}

/** The bundled `fixture/copy.ts`, to be run by processes of their own. */
export interface Copies {
  /** Runs to its end and resolves to its answer. */
  run(args: readonly string[], options?: CopyOptions): Promise<unknown>;
  /** Resolves to its first answer while it runs on. */
  start(args: readonly string[]): Promise<{ readonly child: ChildProcess; readonly answer: unknown }>;
  remove(): void;
}

const REQUIRE =
  'import { createRequire as __createRequire } from "node:module"; const require = __createRequire(import.meta.url);';

export async function bundledCopies(): Promise<Copies> {
  const folder = mkdtempSync(join(tmpdir(), "halfpower-copy-"));
  // Read by a user without rights as well.
  chmodSync(folder, 0o755);
  const file = join(folder, "copy.mjs");
  await build({
    entryPoints: [new URL("fixture/copy.ts", import.meta.url).pathname],
    outfile: file,
    bundle: true,
    format: "esm",
    platform: "node",
    target: "node20",
    // As in the build of the program.
    mainFields: ["module", "main"],
    banner: { js: REQUIRE },
  });
  return {
    run: (args, options) => output([process.execPath, file, ...args], options),
    start: (args) => started(file, args),
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}

/** Without the trap the system would end the process at the limit instead of refusing to write. */
const limitedTo = (kb: number): readonly string[] => [
  "/bin/bash",
  "-c",
  `trap '' XFSZ; ulimit -f ${kb}; exec "$@"`,
  "bash",
];

/** Numbers of user and group "nobody" on Linux. */
const NOBODY = { uid: 65534, gid: 65534 };

function output(program: readonly string[], { fileLimitKb, asNobody }: CopyOptions = {}): Promise<unknown> {
  const limit = fileLimitKb === undefined ? [] : limitedTo(fileLimitKb);
  const [command, ...args] = [...limit, ...program] as [string, ...string[]];
  const user = asNobody && process.getuid?.() === 0 ? NOBODY : {};
  return new Promise((resolve, reject) => {
    execFile(command, args, user, (error, stdout, stderr) => {
      if (error === null) resolve(JSON.parse(stdout));
      else reject(new Error(`${error.message}\n${stderr}`));
    });
  });
}

function started(file: string, args: readonly string[]): ReturnType<Copies["start"]> {
  const child = spawn(process.execPath, [file, ...args], { stdio: ["ignore", "pipe", "inherit"] });
  return new Promise((resolve, reject) => {
    let text = "";
    child.stdout.on("data", (chunk) => {
      text += chunk;
      if (text.endsWith("\n")) resolve({ child, answer: JSON.parse(text) });
    });
    child.once("exit", (code) => reject(new Error(`it ended with ${code} and without an answer`)));
  });
}

/** Ends a process at once, as no handler can notice, and waits until it is gone. */
export const killed = (child: ChildProcess): Promise<void> =>
  new Promise((resolve) => {
    child.once("exit", () => resolve());
    child.kill("SIGKILL");
  });
