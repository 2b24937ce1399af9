import { isSureWidth } from "./cells.ts";
import type { Dialect } from "./dialect.ts";
import { moveAbsolutely, moveCursor, type Position } from "./move.ts";
import { plain, type Style, styleChange } from "./style.ts";

/** Collects what is to be sent, and knows where the real cursor stands and in which style it writes. */
export class Brush {
  #sent = "";
  #at: Position | undefined;
  #style: Style = plain;
  readonly #dialect: Dialect;

  constructor(dialect: Dialect) {
    this.#dialect = dialect;
  }

  get at(): Position | undefined {
    return this.#at;
  }

  get style(): Style {
    return this.#style;
  }

  /** What has been collected since the last call. */
  take(): string {
    const sent = this.#sent;
    this.#sent = "";
    return sent;
  }

  /** Whatever was known is no longer true: starts from a cleared screen in plain style. */
  startAfresh(): void {
    this.#sent = "\u001b[m\u001b[H\u001b[2J";
    this.#at = { x: 0, y: 0 };
    this.#style = plain;
  }

  moveTo(to: Position): void {
    this.#sent += moveCursor(this.#at, to, this.#dialect.columnMoves);
    this.#at = to;
  }

  /** Bytes that `moveTo` would send. */
  costOfMove(to: Position): number {
    return moveCursor(this.#at, to, this.#dialect.columnMoves).length;
  }

  /** Writes one cluster. Behind the last column, or a width terminals may see differently, the place is in doubt. */
  put(cluster: string, width: number, style: Style, columns: number): void {
    this.#wear(style);
    const at = this.#at!;
    const isSure = isSureWidth(cluster);
    if (!isSure && width === 2) this.#sent += `  ${moveAbsolutely(at)}`;
    this.#sent += cluster;
    const x = at.x + width;
    this.#at = isSure && x < columns ? { x, y: at.y } : undefined;
  }

  /** Blanks the row from the cursor on, in plain style. */
  eraseRest(): void {
    this.#wear(plain);
    this.#sent += "\u001b[K";
  }

  #wear(style: Style): void {
    this.#sent += styleChange(this.#style, style, this.#dialect.partialReset);
    this.#style = style;
  }
}
