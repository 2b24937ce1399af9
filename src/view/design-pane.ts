import type { FamilyAnswer, FamilyFigures } from "../core/design/figures.ts";
import { FILTER_FAMILIES } from "../core/filters/spec.ts";
import { type Charset, formatQuantity } from "../core/units/format.ts";
import { familyIndex } from "../editor/actions/design.ts";
import { FORM_ROWS } from "../editor/design-form.ts";
import type { DesignDialog } from "../editor/dialog.ts";
import type { Size } from "../editor/state.ts";
import { cut, fitted, fittedLine, wrappedLines } from "./cells.ts";
import { type Line, piece } from "./paint.ts";
import { shownLines } from "./scroll.ts";
import { plainWords, signsOf } from "./signs.ts";
import { typedPieces } from "./typed.ts";

const LABEL_COLUMNS = 12;
const DETAIL_ROWS = 5;

/** What is asked of a filter, the families that do it side by side, and the one in hand in detail. */
export function designPane(dialog: DesignDialog, size: Size, charset: Charset): readonly Line[] {
  const form = FORM_ROWS.map(({ name, label, choices }, k): Line => {
    const isInHand = k === dialog.index;
    const front = piece(
      ` ${isInHand ? signsOf(charset).row : " "} ${fitted(label, LABEL_COLUMNS)}`,
      isInHand ? "inHand" : "faint",
    );
    const value = String(dialog.form[name]);
    if (isInHand && choices === undefined)
      return [front, ...typedPieces(dialog.input, size.columns - 16, charset)];
    return [front, piece(value === "" ? signsOf(charset).none : value, isInHand ? "value" : "plain")];
  });
  const families = FILTER_FAMILIES.map((family, k) =>
    familyLine(family, dialog.families[k], familyIndex(dialog) === k, size.columns, charset),
  );
  const head: Line = [piece("   family         n  Q    at stop", "faint")];
  const lines: readonly Line[] = [[piece("design", "heading")], ...form, head, ...families];
  const line = 1 + dialog.index + (familyIndex(dialog) === undefined ? 0 : 1);
  const rows = Math.max(1, size.rows - DETAIL_ROWS);
  const body = shownLines(
    lines,
    { first: line, last: line + 1, line },
    { columns: size.columns, rows },
    charset,
  );
  const all = [...body, ...details(dialog, size.columns, charset).slice(0, DETAIL_ROWS)];
  while (all.length < size.rows) all.push([]);
  return all.slice(0, size.rows).map((each) => fittedLine(each, size.columns, charset));
}

function familyLine(
  family: string,
  answer: FamilyAnswer | undefined,
  isInHand: boolean,
  columns: number,
  charset: Charset,
): Line {
  const front = piece(
    ` ${isInHand ? signsOf(charset).row : " "} ${fitted(cut(family, 14, charset), 14)}`,
    isInHand ? "inHand" : "plain",
  );
  if (answer === undefined) return [front, piece(" ...", "faint")];
  if (!answer.figures.ok) return [front, piece(cut(" cannot", columns - 17, charset), "faint")];
  const { spec, highestQ, lossAtStopDb } = answer.figures.value;
  return [
    front,
    piece(
      `${fitted(String(spec.order), 2, "right")} ${fitted(highestQ.toPrecision(3), 5)} ${lossAtStopDb.toFixed(1)} dB`,
    ),
  ];
}

/** What is wrong with the form, or the family in hand in figures and how near its parts come to it. */
function details(dialog: DesignDialog, columns: number, charset: Charset): readonly Line[] {
  const words = (text: string) => plainWords(text, charset);
  if (dialog.problem !== undefined) return wrappedLines(words(dialog.problem), columns, "bad");
  const answer = dialog.families[familyIndex(dialog) ?? 0];
  if (answer === undefined) return [];
  if (!answer.figures.ok) return wrappedLines(words(answer.figures.problem.found), columns, "bad");
  const { chosen } = dialog;
  const made =
    chosen === undefined ? [] : chosen.ok ? realisedWords(chosen.value.realisation) : [chosen.problem.found];
  return wrappedLines(
    words([...figureWords(answer.figures.value, charset), ...made].join(", ")),
    columns,
    "plain",
  );
}

const figureWords = (figures: FamilyFigures, charset: Charset): readonly string[] => [
  `ripple ${formatQuantity(figures.rippleDb, "level", 2, charset)}`,
  `delay varies ${formatQuantity(figures.delayVariationS, "second", 3, charset)}`,
  `overshoot ${Number(figures.overshootPercent.toPrecision(2))} %`,
  `settles in ${formatQuantity(figures.settlingTimeS, "second", 3, charset)}`,
];

function realisedWords(
  realisation: { readonly stopErrorDb: number; readonly warnings: readonly string[] } | undefined,
): readonly string[] {
  if (realisation === undefined) return [];
  return [`parts within ${realisation.stopErrorDb.toFixed(2)} dB`, ...realisation.warnings];
}
