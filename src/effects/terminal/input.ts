import { Readable } from "node:stream";
import { type DecoderState, decodeKeys, flushKeys, holdMs, idleDecoder } from "./decode.ts";
import type { Key } from "./key.ts";
import type { Listener } from "./listener.ts";
import type { Timers } from "./timers.ts";

/** What is used of the real standard input. */
export interface KeySource {
  readonly isTTY?: boolean;
  setRawMode?(enabled: boolean): unknown;
  on(event: string, listener: Listener): unknown;
  off(event: string, listener: Listener): unknown;
  resume(): unknown;
  pause(): unknown;
}

/** Hands on the keys of `source`, one at a time, until stopped. */
export function listenToKeys(source: KeySource, timers: Timers, onKey: (key: Key) => void): () => void {
  let state: DecoderState = idleDecoder;
  let waiting: unknown;
  let stopped = false;

  const take = (result: { state: DecoderState; keys: Key[] }) => {
    state = result.state;
    for (const key of result.keys) if (!stopped) onKey(key);
  };
  const onHoldOver = () => {
    waiting = undefined;
    take(flushKeys(state));
  };
  const onData = (chunk: Uint8Array | string) => {
    if (waiting !== undefined) timers.clear(waiting);
    waiting = undefined;
    take(decodeKeys(state, typeof chunk === "string" ? Buffer.from(chunk) : chunk));
    const delayMs = holdMs(state);
    if (delayMs !== undefined && !stopped) waiting = timers.set(onHoldOver, delayMs);
  };

  source.on("data", onData);
  source.resume();
  return () => {
    stopped = true;
    if (waiting !== undefined) timers.clear(waiting);
    source.off("data", onData);
    source.pause();
  };
}

/** A standard input for the drawing library that looks like a terminal and never says anything. */
export class QuietStdin extends Readable {
  readonly isTTY = true;
  readonly fd = -1;
  isRaw = false;

  override _read(): void {}

  setRawMode(enabled: boolean): this {
    this.isRaw = enabled;
    return this;
  }

  ref(): this {
    return this;
  }

  unref(): this {
    return this;
  }
}
