import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** Runs `work` with a home folder of its own, so that no settings or journals of the user take part. */
export async function withHome<T>(
  work: (env: Record<string, string>, folder: string) => Promise<T>,
): Promise<T> {
  const folder = mkdtempSync(join(tmpdir(), "halfpower-bench-"));
  const env = {
    HOME: folder,
    XDG_CONFIG_HOME: join(folder, "config"),
    XDG_STATE_HOME: join(folder, "state"),
    CI: "false",
  };
  try {
    return await work(env, folder);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
