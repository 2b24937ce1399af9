// Bundles the benchmark like the program itself and runs it in a process of its own.
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { join } from "node:path";
import { build } from "esbuild";
import { leanInk } from "./lean-ink.mjs";

// In node_modules, so that it finds the packages that are not bundled.
const folder = mkdtempSync(join("node_modules", ".bench-"));
const outfile = join(folder, "bench.mjs");
try {
  await build({
    entryPoints: ["test/bench/run.ts"],
    outfile,
    bundle: true,
    format: "esm",
    platform: "node",
    target: "node20",
    mainFields: ["module", "main"],
    minify: true,
    jsx: "automatic",
    plugins: [leanInk],
    define: { "process.env.NODE_ENV": '"production"' },
    alias: { "react-devtools-core": "./.ci/empty.mjs" },
    external: ["@lydell/node-pty"],
    banner: {
      js: 'import { createRequire as __createRequire } from "node:module"; const require = __createRequire(import.meta.url);',
    },
  });
  const env = { ...process.env, NODE_ENV: "production", CI: "false", HALFPOWER_ROOT: process.cwd() };
  process.exitCode = spawnSync(process.execPath, [outfile], { stdio: "inherit", env }).status ?? 1;
} finally {
  rmSync(folder, { recursive: true, force: true });
}
