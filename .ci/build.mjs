// Bundles the program into dist/: one entry file, with mathjs and the full screen in chunks of their own that are
// read only when a formula stage or the workstation asks for them.
import { chmodSync, renameSync, rmSync } from "node:fs";
import { build } from "esbuild";
import { leanInk } from "./lean-ink.mjs";

// Made beside the old one and exchanged, so that a running program or a test never finds half of it.
const outdir = `dist.${process.pid}`;
await build({
  entryPoints: { halfpower: "src/main.ts" },
  outdir,
  bundle: true,
  splitting: true,
  format: "esm",
  platform: "node",
  target: "node20",
  // As ES modules where a library has both: only those can be put into the bundle in parts.
  mainFields: ["module", "main"],
  minify: true,
  keepNames: false,
  legalComments: "none",
  chunkNames: "chunk-[hash]",
  jsx: "automatic",
  plugins: [leanInk],
  // Without fetch the layout library decodes its own data instead of loading the whole of Node's web client.
  define: { "process.env.NODE_ENV": '"production"', fetch: "undefined" },
  alias: { "react-devtools-core": "./.ci/empty.mjs" },
  banner: {
    js: 'import { createRequire as __createRequire } from "node:module"; const require = __createRequire(import.meta.url);',
  },
});
chmodSync(`${outdir}/halfpower.js`, 0o755);
rmSync("dist", { recursive: true, force: true });
renameSync(outdir, "dist");
