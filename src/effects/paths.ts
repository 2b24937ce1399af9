import { existsSync } from "node:fs";
import { homedir } from "node:os";
import { dirname, isAbsolute, join } from "node:path";
import { fileURLToPath } from "node:url";

/** Where the program keeps its own files. None of these folders need exist. */
export interface AppFolders {
  /** Settings and the user's presets. */
  readonly config: string;
  /** Journals of unsaved work. */
  readonly state: string;
  /** Presets that come with the program. */
  readonly shipped: string;
}

type Environment = Readonly<Record<string, string | undefined>>;

const NAME = "halfpower";

/**
 * Folders by the XDG Base Directory Specification 0.8: `$XDG_CONFIG_HOME` or `~/.config`, `$XDG_STATE_HOME` or
 * `~/.local/state`; a variable that is empty or no absolute path counts as not set.
 */
export function appFolders(environment: Environment = process.env, home = homedir()): AppFolders {
  const base = (variable: string, ...fallback: string[]): string => {
    const value = environment[variable];
    return value !== undefined && isAbsolute(value) ? value : join(home, ...fallback);
  };
  return {
    config: join(base("XDG_CONFIG_HOME", ".config"), NAME),
    state: join(base("XDG_STATE_HOME", ".local", "state"), NAME),
    shipped: shippedPresetsFolder(),
  };
}

const MOST_LEVELS_UP = 4;

/** `presets/` beside the `package.json` above the running file, which lies in `dist/` or in `src/effects/`. */
export function shippedPresetsFolder(fileUrl = import.meta.url): string {
  const start = dirname(fileURLToPath(fileUrl));
  let folder = start;
  for (let level = 0; level < MOST_LEVELS_UP; level++, folder = dirname(folder)) {
    if (existsSync(join(folder, "package.json"))) return join(folder, "presets");
  }
  return join(start, "..", "presets");
}
