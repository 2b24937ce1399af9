import { EventEmitter } from "node:events";
import { describe, expect, it } from "vitest";
import { type Loss, watchEndings } from "../../../src/effects/terminal/endings.ts";

/** Watches a process that is none, and notes what happens in which order. */
function watch({ restore = () => {}, onLost = (_: Loss) => {} } = {}) {
  const happened: string[] = [];
  const host = Object.assign(new EventEmitter(), {
    pid: 7,
    kill: (pid: number, signal: string) => happened.push(`kill ${pid} ${signal}`),
    exit: (code: number) => happened.push(`exit ${code}`),
  });
  const endings = watchEndings(host, {
    onLost: (loss) => {
      happened.push(`lost by ${loss.type}`);
      onLost(loss);
    },
    restore: () => {
      happened.push("restore");
      restore();
    },
    report: (line) => happened.push(line),
  });
  return { host, endings, happened };
}

const failing = (code: string) => () => {
  throw Object.assign(new Error(code), { code });
};

describe("watchEndings(host, options)", () => {
  // signal(7): SIGHUP 1, SIGINT 2, SIGQUIT 3, SIGTERM 15; POSIX shells report 128 + n.
  it.each([
    ["SIGHUP", 129],
    ["SIGINT", 130],
    ["SIGQUIT", 131],
    ["SIGTERM", 143],
  ])("on %s keeps the work, restores, and exits with %i", (signal, code) => {
    const { host, happened } = watch();
    host.emit(signal);
    expect(happened).toEqual(["lost by signal", "restore", `exit ${code}`]);
  });

  it("keeps the work once, however many ends come", () => {
    const { host, endings, happened } = watch();
    host.emit("SIGHUP");
    endings.hangUp();
    host.emit("SIGTERM");
    host.emit("exit", 129);
    expect(happened).toEqual(["lost by signal", "restore", "exit 129"]);
  });

  it("ends by SIGKILL where the line has gone", () => {
    const { host, happened } = watch({ restore: failing("EIO") });
    host.emit("SIGHUP");
    expect(happened).toEqual(["lost by signal", "restore", "kill 7 SIGKILL"]);
  });

  it("exits as usual where restoring fails for another reason", () => {
    const { host, happened } = watch({ restore: failing("ENOSPC") });
    host.emit("SIGTERM");
    expect(happened).toEqual(["lost by signal", "restore", "exit 143"]);
  });

  it("restores although the work cannot be kept", () => {
    const { host, happened } = watch({ onLost: failing("ENOSPC") });
    host.emit("SIGTERM");
    expect(happened).toEqual(["lost by signal", "restore", "exit 143"]);
  });

  it("tells of an exception in one line, whatever was thrown", () => {
    for (const [thrown, line] of [
      [new RangeError("no\nsuch\u001b[31m stage"), "halfpower stopped: RangeError: no such [31m stage"],
      ["text", "halfpower stopped: text"],
      [undefined, "halfpower stopped: undefined"],
    ] as const) {
      const { host, happened } = watch();
      host.emit("uncaughtException", thrown);
      expect(happened).toEqual(["lost by exception", "restore", line, "exit 1"]);
    }
  });

  it("restores on an exit without exiting again, and watches no more after stop()", () => {
    const first = watch();
    first.host.emit("exit", 3);
    expect(first.happened).toEqual(["lost by exit", "restore"]);
    const second = watch();
    second.endings.stop();
    expect(second.host.eventNames()).toEqual([]);
  });
});
