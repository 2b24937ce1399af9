// Bundles the program into dist/: one entry file, with mathjs and the full screen in chunks of their own that are
// read only when a formula stage or the workstation asks for them.
import { rmSync } from "node:fs";
import { build } from "esbuild";

rmSync("dist", { recursive: true, force: true });
await build({
  entryPoints: { halfpower: "src/main.ts" },
  outdir: "dist",
  bundle: true,
  splitting: true,
  format: "esm",
  platform: "node",
  target: "node20",
  minify: true,
  keepNames: false,
  legalComments: "none",
  chunkNames: "chunk-[hash]",
  jsx: "automatic",
  define: { "process.env.NODE_ENV": '"production"' },
  alias: { "react-devtools-core": "./.ci/empty.mjs" },
  banner: {
    js: 'import { createRequire as __createRequire } from "node:module"; const require = __createRequire(import.meta.url);',
  },
});
