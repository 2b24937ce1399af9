/** Walks through a text line by line by index; nothing is copied. Lines end in LF, CR LF, or CR where there is no LF. */
export class Lines {
  readonly text: string;
  /** Number of the present line, from 1. */
  line = 0;
  /** Present line without its end: `text.slice(start, end)`. */
  start = 0;
  end = 0;
  private next: number;
  private readonly lineEnd: string;

  constructor(text: string) {
    this.text = text;
    this.next = text.charCodeAt(0) === BYTE_ORDER_MARK ? 1 : 0;
    this.lineEnd = text.includes("\n") ? "\n" : "\r";
  }

  /** Goes to the next line; false behind the last one. */
  advance(): boolean {
    if (this.next >= this.text.length) return false;
    const found = this.text.indexOf(this.lineEnd, this.next);
    this.start = this.next;
    this.end = found < 0 ? this.text.length : found;
    this.next = this.end + 1;
    this.line += 1;
    if (this.end > this.start && this.text.charCodeAt(this.end - 1) === CARRIAGE_RETURN) this.end -= 1;
    return true;
  }

  /** Goes to the next line that is neither blank nor a comment that starts with one of `marks`. */
  advanceToContent(marks: string): boolean {
    while (this.advance()) {
      const first = this.firstVisible();
      if (first < this.end && !marks.includes(this.text[first])) return true;
    }
    return false;
  }

  /** Index of the first character of the present line that is no blank; `end` when there is none. */
  firstVisible(): number {
    let index = this.start;
    while (index < this.end && isBlank(this.text.charCodeAt(index))) index += 1;
    return index;
  }
}

const BYTE_ORDER_MARK = 0xfeff;
const CARRIAGE_RETURN = 13;
const TAB = 9;
const VERTICAL_TAB = 11;
const FORM_FEED = 12;
const SPACE = 32;
const NO_BREAK_SPACE = 0xa0;

export const isBlank = (code: number): boolean =>
  code === SPACE ||
  code === TAB ||
  code === NO_BREAK_SPACE ||
  code === CARRIAGE_RETURN ||
  code === VERTICAL_TAB ||
  code === FORM_FEED;
