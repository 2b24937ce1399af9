import { Brush } from "./brush.ts";
import type { Dialect } from "./dialect.ts";
import { blankRow, isPicture, type Row, readFrame } from "./frame.ts";
import { paintRow } from "./paint.ts";

/**
 * The picture on the real terminal, and what has to be sent to turn it into the next one. Autowrap has to be off, so
 * that the last column of the last row can be written without scrolling.
 */
export class Screen {
  #columns: number;
  #rows: number;
  /** What the terminal shows; undefined where that is not known. */
  #shown: Row[] | undefined;
  #frame = "";
  readonly #brush: Brush;
  readonly #dialect: Dialect;
  readonly #unicode: boolean;

  constructor(size: { columns: number; rows: number }, dialect: Dialect, unicode: boolean) {
    this.#columns = size.columns;
    this.#rows = size.rows;
    this.#dialect = dialect;
    this.#unicode = unicode;
    this.#brush = new Brush(dialect);
  }

  get columns(): number {
    return this.#columns;
  }

  get rows(): number {
    return this.#rows;
  }

  /** The last frame as it came. */
  get frame(): string {
    return this.#frame;
  }

  /** Whether everything has to be painted anew. */
  get isForgotten(): boolean {
    return this.#shown === undefined;
  }

  /** Takes the next frame without showing it. Writes that are no picture are dropped; returns whether it was one. */
  accept(frame: string): boolean {
    if (!isPicture(frame)) return false;
    this.#frame = frame;
    return true;
  }

  /** The bytes, as text, that make the terminal show the last frame; empty where it does already. */
  update(): string {
    const before = this.#shown ?? this.#startAfresh();
    const rules = { ...this.#dialect, unicode: this.#unicode };
    const after = readFrame(this.#frame, { columns: this.#columns, rows: this.#rows }, rules, before);
    after.forEach((row, y) => {
      paintRow(this.#brush, y, before[y]!, row);
    });
    this.#shown = after;
    return this.#brush.take();
  }

  /** The terminal may show anything now: the next update clears it and paints everything. */
  forget(): void {
    this.#shown = undefined;
  }

  resize(size: { columns: number; rows: number }): void {
    this.#columns = size.columns;
    this.#rows = size.rows;
    this.forget();
  }

  #startAfresh(): Row[] {
    this.#brush.startAfresh();
    const blank = blankRow(this.#columns);
    return new Array<Row>(this.#rows).fill(blank);
  }
}
