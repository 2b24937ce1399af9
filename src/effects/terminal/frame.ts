import { asciiOf, clustersOf } from "./cells.ts";
import { applySgr, plain, type Style, type StyleRules } from "./style.ts";

/** One row of the screen: for every column a cluster and its style. The second column of a wide one is empty. */
export interface Row {
  readonly clusters: readonly string[];
  readonly styles: readonly Style[];
  /** What the row was read from, so that an unchanged line need not be read again. */
  readonly source: string;
  readonly styleBefore: Style;
  readonly styleAfter: Style;
}

export interface FrameRules extends StyleRules {
  /** False where only ASCII may be written. */
  readonly unicode: boolean;
}

/** An SGR sequence, any other control sequence or string, or one control character. ECMA-48, 5.4 and 5.6. */
const control =
  /\u001b\[([\d;:]*)m|\u001b\[[0-?]*[ -/]*[@-~]|\u001b[\]PX^_][^\u0007\u001b]*(?:\u0007|\u001b\\)|\u001b[ -/]*[0-~]|[\u0000-\u001f\u007f-\u009f]/g;

export function blankRow(columns: number): Row {
  const styles = new Array<Style>(columns).fill(plain);
  const clusters = new Array<string>(columns).fill(" ");
  return { clusters, styles, source: "", styleBefore: plain, styleAfter: plain };
}

/** Whether a write is a picture at all, or only sequences that hide a cursor, clear a screen and the like. */
export const isPicture = (text: string): boolean =>
  /[^\n]/.test(text.replace(control, (match) => (match === "\n" ? "\n" : "")));

/**
 * Rows of a frame: lines parted by line feeds, with SGR sequences; every other sequence is left out. Too long a line
 * is cut, too short a one and a missing one filled with blanks. Unchanged rows of `before` come back as they are.
 */
export function readFrame(
  text: string,
  size: { readonly columns: number; readonly rows: number },
  rules: FrameRules,
  before: readonly Row[],
): Row[] {
  const lines = text.split("\n");
  const rows: Row[] = [];
  let style = plain;
  for (let y = 0; y < size.rows; y += 1) {
    const line = lines[y] ?? "";
    const old = before[y];
    const isKnown =
      old?.source === line && old.styleBefore.key === style.key && old.clusters.length === size.columns;
    const row = isKnown ? old : readRow(line, style, size.columns, rules);
    rows.push(row);
    style = row.styleAfter;
  }
  return rows;
}

function readRow(source: string, styleBefore: Style, columns: number, rules: FrameRules): Row {
  const clusters: string[] = [];
  const styles: Style[] = [];
  let style = styleBefore;
  let from = 0;
  let isFull = false;
  const write = (text: string) => {
    for (const { cluster, width } of clustersOf(rules.unicode ? text : asciiOf(text))) {
      isFull ||= clusters.length + width > columns;
      if (isFull) return;
      clusters.push(cluster);
      styles.push(style);
      if (width === 2) {
        clusters.push("");
        styles.push(style);
      }
    }
  };
  for (const match of source.matchAll(control)) {
    write(source.slice(from, match.index));
    from = match.index + match[0].length;
    if (match[1] !== undefined) style = applySgr(style, match[1], rules);
  }
  write(source.slice(from));
  while (clusters.length < columns) {
    clusters.push(" ");
    styles.push(plain);
  }
  return { clusters, styles, source, styleBefore, styleAfter: style };
}
