export interface Position {
  readonly x: number;
  readonly y: number;
}

/** A parameter is left out where it is the default, 1. */
const times = (count: number, letter: string): string => `\u001b[${count === 1 ? "" : count}${letter}`;

const shortest = (...candidates: string[]): string =>
  candidates.reduce((best, candidate) => (candidate.length < best.length ? candidate : best));

/** CUP to a column and row counted from 0. */
export function moveAbsolutely({ x, y }: Position): string {
  if (x === 0) return y === 0 ? "\u001b[H" : `\u001b[${y + 1}H`;
  return `\u001b[${y === 0 ? "" : y + 1};${x + 1}H`;
}

function moveInRow(from: number, to: number, columnMoves: boolean): string {
  if (from === to) return "";
  const fromStart = to === 0 ? "\r" : `\r${times(to, "C")}`;
  const relative =
    to > from ? times(to - from, "C") : shortest(times(from - to, "D"), "\b".repeat(from - to));
  return shortest(relative, fromStart, columnMoves ? times(to + 1, "G") : relative);
}

/**
 * The shortest sequence that takes the cursor from one cell to another (both counted from 0), where nothing scrolls.
 * An undefined `from` is a cursor whose place is not known.
 */
export function moveCursor(from: Position | undefined, to: Position, columnMoves: boolean): string {
  const absolute = moveAbsolutely(to);
  if (from === undefined) return absolute;
  if (from.y === to.y) return shortest(absolute, moveInRow(from.x, to.x, columnMoves));
  const vertical = times(Math.abs(to.y - from.y), to.y > from.y ? "B" : "A");
  const inColumn = vertical + moveInRow(from.x, to.x, columnMoves);
  const nextLine = to.y === from.y + 1 ? `\r\n${moveInRow(0, to.x, columnMoves)}` : inColumn;
  return shortest(absolute, inColumn, nextLine);
}
