import { Writable } from "node:stream";
import type { Listener } from "./listener.ts";
import type { Screen } from "./screen.ts";

/** What is used of the real standard output. */
export interface RealOutput {
  readonly isTTY?: boolean;
  readonly columns?: number;
  readonly rows?: number;
  readonly fd?: number;
  write(text: string): boolean;
  on(event: string, listener: Listener): unknown;
  once(event: string, listener: Listener): unknown;
  off(event: string, listener: Listener): unknown;
}

/**
 * A standard output for the drawing library: every write is one whole frame, of which only the changed cells go to
 * the real terminal, in one write. While the terminal is behind, frames are left out and the newest is shown.
 */
export class FrameOutput extends Writable {
  readonly isTTY = true;
  readonly #screen: Screen;
  readonly #real: RealOutput;
  #isShowing = false;
  #isBehind = false;

  constructor(screen: Screen, real: RealOutput) {
    super({ decodeStrings: false });
    this.#screen = screen;
    this.#real = real;
  }

  get columns(): number {
    return this.#screen.columns;
  }

  get rows(): number {
    return this.#screen.rows;
  }

  /** The last frame as it came, shown or not. */
  get frame(): string {
    return this.#screen.frame;
  }

  override _write(chunk: string | Buffer, _encoding: BufferEncoding, done: () => void): void {
    if (this.#screen.accept(String(chunk))) this.show();
    done();
  }

  /** From here on frames go to the terminal, the last one first; or no longer. */
  setShowing(isShowing: boolean): void {
    this.#isShowing = isShowing;
    if (!isShowing) return;
    this.repaint();
  }

  /** Forgets what the terminal shows and paints all of it. */
  repaint(): void {
    this.#screen.forget();
    if (this.#screen.frame !== "") this.show();
  }

  /** Takes a new size; who draws hears `resize`. If no frame answers at once, the last one is shown as far as it fits. */
  resize(size: { columns: number; rows: number }): void {
    this.#screen.resize(size);
    this.emit("resize");
    if (this.#screen.isForgotten && this.#screen.frame !== "") this.show();
  }

  /** Sends what differs between the terminal and the last frame. */
  show(): void {
    if (!this.#isShowing || this.#isBehind) return;
    const text = this.#screen.update();
    if (text === "" || this.#real.write(text)) return;
    this.#isBehind = true;
    this.#real.once("drain", () => {
      this.#isBehind = false;
      this.show();
    });
  }
}
