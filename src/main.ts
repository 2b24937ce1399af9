#!/usr/bin/env node
import { runCli } from "./cli/run.ts";
import { systemIo } from "./cli/system-io.ts";

process.exitCode = await runCli(process.argv.slice(2), systemIo());
