import type { Reading } from "../core/response/exact.ts";
import { plainText } from "../core/text.ts";
import type { Charset } from "../core/units/format.ts";
import type { RawValue } from "../document/types.ts";
import type { FieldDialog } from "../editor/dialog.ts";
import { type Field, fieldsOf, type Row, rowsOf } from "../editor/rows.ts";
import { type EditorState, type Size, verdictsNow } from "../editor/state.ts";
import { cut, fitted, fittedLine, spread, widthOf, wrappedLines } from "./cells.ts";
import { fixed, marginText, signed } from "./numbers.ts";
import { type Line, type Piece, piece } from "./paint.ts";
import { shownLines } from "./scroll.ts";
import { plainWords, signsOf } from "./signs.ts";
import { typedPieces } from "./typed.ts";

const INDENT = "    ";
const LONGEST_RAW = 60;

/** The chain in the order in which the signal meets it, each row with its share at the cursor. */
export function chainPane(
  state: EditorState,
  reading: Reading,
  size: Size,
  charset: Charset,
): readonly Line[] {
  const shares = [...sharesByRow(state, reading, charset), ...verdictTexts(state, charset)];
  const rows = rowsOf(state.document);
  const blocks = (isShort: boolean) =>
    rows.map((row, k) =>
      k === state.row
        ? openedRow(state, row, shares[k] ?? "", size.columns, charset)
        : closedRow(state, row, shares[k] ?? "", size.columns, charset, isShort),
    );
  const full = blocks(false);
  const fits = full.reduce((sum, block) => sum + block.length, 0) <= size.rows;
  return framed(fits ? full : blocks(true), state, size, charset);
}

/** Scrolled so that the row in hand is seen, and in it the value in hand. */
function framed(
  blocks: readonly (readonly Line[])[],
  state: EditorState,
  size: Size,
  charset: Charset,
): readonly Line[] {
  const first = blocks.slice(0, state.row).reduce((sum, block) => sum + block.length, 0);
  const last = first + (blocks[state.row]?.length ?? 1);
  // Name and kind come before the values.
  const line = Math.min(last - 1, first + 2 + state.field);
  return shownLines(blocks.flat(), { first, last, line }, size, charset);
}

/** Shares in dB; a stage that is out of the line has none. */
function sharesByRow({ document }: EditorState, { shares }: Reading, charset: Charset): readonly string[] {
  const text = (k: number) => (shares[k] === undefined ? "" : fixed(shares[k].gainDb, 2, charset));
  let inLine = 0;
  return [
    "share, dB",
    text(0),
    ...document.stages.map(({ off }) => {
      if (off) return "out";
      inLine += 1;
      return text(inLine);
    }),
  ];
}

/** Behind load and converter stand no shares but how far what folds and the limits are kept, in the limit's unit. */
function verdictTexts(state: EditorState, charset: Charset): readonly string[] {
  const verdicts = verdictsNow(state);
  const { folding, limits = [] } = verdicts ?? {};
  return [
    "",
    folding === undefined ? "" : `folds ${signed(folding.marginDb, 1, charset)} dB`,
    ...limits.map(({ margin }, k) =>
      marginText(margin, state.resolved.limits[k]?.quantity ?? "gain", charset),
    ),
  ];
}

const safe = (text: string): string => plainText(text, 200);

function nameOfRow(row: Row): string {
  switch (row.type) {
    case "stage":
      return safe(row.stage.name || row.stage.kind);
    case "limit":
      return safe(row.limit.name || `limit ${row.index + 1}`);
    default:
      return row.type;
  }
}

const numberOfRow = (row: Row): string => (row.type === "stage" ? String(row.index + 1) : "");

function kindOfRow(row: Row): string {
  if (row.type === "stage") return row.stage.kind;
  return row.type === "limit" ? `limit on ${row.limit.quantity}` : "";
}

function headLine(
  row: Row,
  share: string,
  isInHand: boolean,
  columns: number,
  charset: Charset,
  extra = "",
): Line {
  const { row: sign } = signsOf(charset);
  const isOff = row.type === "stage" && row.stage.off === true;
  const look = isInHand ? "inHand" : isOff ? "faint" : "plain";
  const front = `${isInHand ? sign : " "}${fitted(numberOfRow(row), 2, "right")} `;
  return spread(
    [piece(front, look), piece(nameOfRow(row), look), piece(extra, "faint")],
    [piece(` ${share}`, share === "share, dB" ? "faint" : isOff ? "faint" : "value")],
    columns,
    charset,
  );
}

/** Name and share, and below them kind and parts; without room both in one line. */
function closedRow(
  state: EditorState,
  row: Row,
  share: string,
  columns: number,
  charset: Charset,
  isShort: boolean,
): readonly Line[] {
  const summary = summaryOf(state, row, charset);
  if (isShort) return [headLine(row, share, false, columns, charset, summary === "" ? "" : `  ${summary}`)];
  const head = headLine(row, share, false, columns, charset);
  if (summary === "") return [head];
  return [head, fittedLine([piece(cut(INDENT + summary, columns, charset), "faint")], columns, charset)];
}

/** `rc-lowpass  R 1k  C 4n7`: what it is and the parts that are given. */
function summaryOf(state: EditorState, row: Row, charset: Charset): string {
  const isNamed = row.type === "stage" && row.stage.name !== undefined;
  const kind = row.type === "stage" && !isNamed ? "" : kindOfRow(row);
  const parts = fieldsOf(state.document, row)
    .filter(
      (field) => field.raw !== undefined && !["title", "notes", "name", "quantity"].includes(field.label),
    )
    .map((field) => `${field.label} ${rawText(field.raw)}`);
  const empty = row.type === "load" ? "open" : row.type === "converter" ? "none" : "";
  return plainWords([kind, ...parts].filter(Boolean).join("  ") || empty, charset);
}

const rawText = (raw: RawValue | undefined): string =>
  raw === undefined ? "" : plainText(String(raw), LONGEST_RAW);

/** The row in hand with every value, its tolerance, and what is wrong with what is being typed. */
function openedRow(
  state: EditorState,
  row: Row,
  share: string,
  columns: number,
  charset: Charset,
): readonly Line[] {
  const fields = fieldsOf(state.document, row);
  const kind = kindOfRow(row);
  const isOff = row.type === "stage" && row.stage.off === true;
  const lines: Line[] = [headLine(row, share, true, columns, charset)];
  if (kind !== "") {
    lines.push(
      fittedLine([piece(`${INDENT}${kind}${isOff ? ", out of the line" : ""}`, "faint")], columns, charset),
    );
  }
  const labelColumns = Math.max(4, Math.min(12, ...[Math.max(...fields.map(({ label }) => label.length))]));
  for (const [k, field] of fields.entries()) {
    const isInHand = k === Math.min(state.field, fields.length - 1);
    lines.push(...fieldLines(state, field, isInHand, labelColumns, columns, charset));
  }
  const caution =
    row.type === "stage" ? row.stage.caution : row.type === "chain" ? state.document.caution : undefined;
  if (caution) lines.push(...wrappedLines(`caution: ${safe(caution)}`, columns, "strong"));
  return lines.map((line) => fittedLine(line, columns, charset));
}

function fieldLines(
  state: EditorState,
  field: Field,
  isInHand: boolean,
  labelColumns: number,
  columns: number,
  charset: Charset,
): readonly Line[] {
  const { value: sign, plusMinus } = signsOf(charset);
  const dialog = isInHand && state.dialog?.type === "field" ? state.dialog : undefined;
  const label = piece(
    `  ${isInHand ? sign : " "} ${fitted(field.label, labelColumns, "left", charset)} `,
    isInHand ? "inHand" : "faint",
  );
  const room = columns - widthOf(label.text);
  const raw = field.tolerance?.raw;
  const tolerance = raw === undefined ? [] : [piece(` ${plusMinus}${rawText(raw)}`, "faint")];
  if (dialog === undefined) {
    return [[label, ...valuePieces(field, isInHand, room, charset), ...tolerance]];
  }
  const typed = dialog.isTolerance
    ? [
        ...valuePieces(field, false, room, charset),
        piece(` ${plusMinus}`, "strong"),
        ...typedPieces(dialog.input, room - 12, charset),
      ]
    : [...typedPieces(dialog.input, room, charset), ...tolerance];
  return [[label, ...typed], ...belowTyped(dialog, columns, charset)];
}

function valuePieces(field: Field, isInHand: boolean, room: number, charset: Charset): readonly Piece[] {
  if (field.raw !== undefined && field.raw !== "") {
    return [piece(cut(plainWords(rawText(field.raw), charset), room, charset), isInHand ? "value" : "plain")];
  }
  return [piece(cut(plainWords(field.fallback ?? "–", charset), room, charset), "faint")];
}

const MOST_PROBLEM_LINES = 4;

/** Below what is being typed: what it is, or what is still missing. */
function belowTyped({ field, problem }: FieldDialog, columns: number, charset: Charset): readonly Line[] {
  const indent = (lines: readonly Line[]) =>
    lines.slice(0, MOST_PROBLEM_LINES).map((line) => [piece(INDENT), ...line]);
  const room = columns - INDENT.length;
  if (problem !== undefined) return indent(wrappedLines(plainWords(safe(problem), charset), room, "bad"));
  return indent(wrappedLines(plainWords(field.what, charset), room, "faint"));
}
