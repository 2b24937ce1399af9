import { defineConfig } from "vitest/config";

export default defineConfig({
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["test/**/*.test.{ts,tsx}"],
    env: { CI: "false", NODE_ENV: "production" },
    testTimeout: 30_000,
  },
});
