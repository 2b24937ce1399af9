const PLUS = 43;
const COMMA = 44;
const MINUS = 45;
const POINT = 46;
const LOWER_E = 101;
const UPPER_E = 69;
const TRUE_MINUS = 0x2212;

/** Longer texts are no measured numbers. */
export const MAX_NUMBER_LENGTH = 64;

/** Reads decimal numbers that all have the same decimal mark: the first one seen settles it. */
export class NumberReader {
  private readonly decimalComma: boolean;
  private mark = 0;

  constructor(decimalComma: boolean) {
    this.decimalComma = decimalComma;
  }

  /** The nearest double, possibly infinite; NaN when the text is no number with the right decimal mark. */
  read(text: string, start: number, end: number): number {
    const mark = decimalMark(text, start, end);
    if (mark < 0 || end - start > MAX_NUMBER_LENGTH) return Number.NaN;
    if (mark > 0 && mark !== this.mark) {
      if (this.mark !== 0 || (mark === COMMA && !this.decimalComma)) return Number.NaN;
      this.mark = mark;
    }
    const from = text.charCodeAt(start) === TRUE_MINUS ? start + 1 : start;
    const digits = text.slice(from, end);
    const value = Number(mark === COMMA ? digits.replace(",", ".") : digits);
    return from === start ? value : -value;
  }

  /** Whether earlier numbers had another decimal mark than this text. */
  hasOtherMark(text: string): boolean {
    const mark = decimalMark(text, 0, text.length);
    return mark > 0 && this.mark > 0 && mark !== this.mark;
  }
}

/** Whether a text is a number at all, with either mark. */
export const looksNumeric = (text: string): boolean => decimalMark(text, 0, text.length) >= 0;

/**
 * Code of the decimal mark of `[sign] digits [mark] [digits] [e [sign] digits]`; 0 without one, -1 when the text has
 * another form. Written out because a million rows pass through it.
 */
function decimalMark(text: string, start: number, end: number): number {
  let index = isSign(text.charCodeAt(start)) ? start + 1 : start;
  const whole = pastDigits(text, index, end);
  let digits = whole - index;
  index = whole;
  let mark = 0;
  const code = index < end ? text.charCodeAt(index) : 0;
  if (code === POINT || code === COMMA) {
    mark = code;
    const fraction = pastDigits(text, index + 1, end);
    digits += fraction - index - 1;
    index = fraction;
  }
  if (digits === 0) return -1;
  return index === end || isExponent(text, index, end) ? mark : -1;
}

function isExponent(text: string, start: number, end: number): boolean {
  const code = text.charCodeAt(start);
  if (code !== LOWER_E && code !== UPPER_E) return false;
  const sign = text.charCodeAt(start + 1);
  const from = sign === PLUS || sign === MINUS ? start + 2 : start + 1;
  return from < end && pastDigits(text, from, end) === end;
}

function pastDigits(text: string, start: number, end: number): number {
  let index = start;
  while (index < end && isDigit(text.charCodeAt(index))) index += 1;
  return index;
}

const isDigit = (code: number): boolean => code >= 48 && code <= 57;

const isSign = (code: number): boolean => code === MINUS || code === PLUS || code === TRUE_MINUS;
