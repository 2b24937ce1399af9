#!/usr/bin/env node
import { runCli } from "./cli/run.ts";
import { systemIo } from "./cli/system-io.ts";

// The full screen is read only when it is asked for: commands start without it.
process.exitCode = await runCli(process.argv.slice(2), systemIo(), async (options) =>
  (await import("./workstation.tsx")).runWorkstation(options),
);
