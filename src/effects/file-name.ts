import { existsSync } from "node:fs";

/** A word with a slash or with `.json` at its end is a file, and so is any other that exists; the rest are presets. */
export const isFileName = (name: string): boolean =>
  name.includes("/") || name.endsWith(".json") || existsSync(name);
