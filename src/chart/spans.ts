/** What a piece of a chart is, for the view to colour. Nothing is told by colour alone. */
export type Role =
  | "label"
  | "axis"
  | "grid"
  | "trace"
  | "ghost"
  | "cursor"
  | "pin"
  | "limit"
  | "level"
  | "fold"
  | "bench"
  | "band"
  | "asymptote";

/** Neighbouring cells of one role. Blank cells of the drawing count as grid. */
export interface Span {
  readonly text: string;
  readonly role: Role;
}

/** Cells one character wide, drawn over one another: what is put last is seen. */
export class Canvas {
  readonly rows: number;
  readonly columns: number;
  readonly #glyphs: string[][];
  readonly #roles: Role[][];

  constructor(rows: number, columns: number) {
    this.rows = rows;
    this.columns = columns;
    this.#glyphs = Array.from({ length: rows }, () => Array<string>(columns).fill(" "));
    this.#roles = Array.from({ length: rows }, () => Array<Role>(columns).fill("grid"));
  }

  /** Outside the canvas nothing is put. */
  put(row: number, column: number, glyph: string, role: Role): void {
    if (!(row >= 0 && row < this.rows && column >= 0 && column < this.columns)) return;
    this.#glyphs[row][column] = glyph;
    this.#roles[row][column] = role;
  }

  /** Puts a text from `column` on, cut at the right. */
  write(row: number, column: number, text: string, role: Role): void {
    for (const [k, glyph] of [...text].entries()) this.put(row, column + k, glyph, role);
  }

  spans(): Span[][] {
    return this.#glyphs.map((glyphs, row) => joined(glyphs, this.#roles[row]));
  }
}

function joined(glyphs: readonly string[], roles: readonly Role[]): Span[] {
  const spans: Span[] = [];
  let from = 0;
  for (let k = 1; k <= glyphs.length; k++) {
    if (k < glyphs.length && roles[k] === roles[from]) continue;
    if (k > from) spans.push({ text: glyphs.slice(from, k).join(""), role: roles[from] });
    from = k;
  }
  return spans;
}
