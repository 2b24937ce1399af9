import type { Host } from "./host.ts";
import type { Timers } from "./timers.ts";

/** Without a shell that could bring it back, the kernel does not stop the process: then it goes on after this. */
const notStoppedAfterMs = 50;

/**
 * Stops the process group for the shell and takes the terminal over again when it goes on. `leave` and `enter` are
 * called around the stop; `enter` alone where the process was stopped without its knowing.
 */
export function watchSuspension(
  host: Host,
  timers: Timers,
  { leave, enter }: { readonly leave: () => void; readonly enter: () => void },
): { suspend(): void; stop(): void } {
  let isSuspended = false;
  let waiting: unknown;

  const suspend = () => {
    if (isSuspended) return;
    isSuspended = true;
    leave();
    host.off("SIGTSTP", suspend);
    host.kill(0, "SIGTSTP");
    waiting = timers.set(resume, notStoppedAfterMs);
  };
  const resume = () => {
    timers.clear(waiting);
    if (isSuspended) host.on("SIGTSTP", suspend);
    isSuspended = false;
    enter();
  };

  host.on("SIGTSTP", suspend);
  host.on("SIGCONT", resume);
  return {
    suspend,
    stop: () => {
      timers.clear(waiting);
      host.off("SIGTSTP", suspend);
      host.off("SIGCONT", resume);
    },
  };
}
