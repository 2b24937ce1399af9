import { writeSync } from "node:fs";
import type { RealOutput } from "./output.ts";

/** How often a full buffer is tried again, and how long to wait in between: half a second in all. */
const attempts = 100;
const pauseMs = 5;

const pause = () => Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, pauseMs);

const codeOf = (error: unknown): unknown => (error as NodeJS.ErrnoException | undefined)?.code;

/** Whether an error says that nobody is at the other end any more. */
export const isHangup = (error: unknown): boolean =>
  ["EIO", "EPIPE", "ENXIO", "EBADF", "ECONNRESET"].includes(String(codeOf(error)));

/** Writes before it returns, so that it can be the last thing a process does. Throws what `writeSync` throws. */
export function writeNow(output: Pick<RealOutput, "fd" | "write">, text: string): void {
  if (output.fd === undefined) {
    output.write(text);
    return;
  }
  let rest: Uint8Array = Buffer.from(text);
  for (let attempt = 0; rest.length > 0 && attempt < attempts; attempt += 1) {
    try {
      rest = rest.subarray(writeSync(output.fd, rest));
    } catch (error) {
      if (codeOf(error) !== "EAGAIN") throw error;
      pause();
    }
  }
}
