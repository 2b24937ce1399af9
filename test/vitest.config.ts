import { defineConfig } from "vitest/config";

export default defineConfig({
  // React runs as built, so that frames in tests are those of the program.
  oxc: { jsx: { runtime: "automatic", development: false } },
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["test/**/*.test.{ts,tsx}"],
    env: { CI: "false", NODE_ENV: "production" },
    testTimeout: 30_000,
  },
});
