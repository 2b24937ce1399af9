import { isBlank } from "./lines.ts";
import type { Separator } from "./separator.ts";

/** Lines of more fields are refused. */
export const MAX_FIELDS = 100;

const QUOTE = 34;

/** Where the fields of one line lie, without blanks and quotation marks around them; used again for every line. */
export class Fields {
  text = "";
  count = 0;
  readonly starts = new Int32Array(MAX_FIELDS);
  readonly ends = new Int32Array(MAX_FIELDS);

  isEmpty(field: number): boolean {
    return this.starts[field] === this.ends[field];
  }

  at(field: number): string {
    return this.text.slice(this.starts[field], this.ends[field]);
  }

  /** Whether all fields from `from` on are empty. */
  areEmptyFrom(from: number): boolean {
    for (let field = from; field < this.count; field += 1) if (!this.isEmpty(field)) return false;
    return true;
  }

  push(start: number, end: number): void {
    this.starts[this.count] = start;
    this.ends[this.count] = end;
    this.count += 1;
  }
}

export type SplitFault = "too many" | "open quote" | "after quote";

/** Splits `text` from `start` to `end` into `fields`; undefined when that went well. RFC 4180 quoting within a line. */
export function splitFields(
  fields: Fields,
  text: string,
  start: number,
  end: number,
  { code }: Separator,
): SplitFault | undefined {
  const byBlanks = code === 32;
  fields.text = text;
  fields.count = 0;
  let index = start;
  for (;;) {
    while (index < end && isSkipped(text.charCodeAt(index), code)) index += 1;
    if (byBlanks && index >= end) return undefined;
    if (fields.count === MAX_FIELDS) return "too many";
    const isQuoted = index < end && text.charCodeAt(index) === QUOTE;
    const from = isQuoted ? index + 1 : index;
    const fieldEnd = isQuoted ? closingQuote(text, from, end) : endOfField(text, index, end, code);
    if (fieldEnd < 0) return "open quote";
    fields.push(from, isQuoted ? fieldEnd : trimmedEnd(text, from, fieldEnd));
    index = isQuoted ? fieldEnd + 1 : fieldEnd;
    while (isQuoted && index < end && isSkipped(text.charCodeAt(index), code)) index += 1;
    if (index >= end) return undefined;
    if (byBlanks ? isQuoted && !isBlank(text.charCodeAt(index - 1)) : text.charCodeAt(index) !== code)
      return "after quote";
    if (!byBlanks) index += 1;
  }
}

const isSkipped = (found: number, separator: number): boolean =>
  isBlank(found) && (found !== separator || separator === 32);

function endOfField(text: string, start: number, end: number, separator: number): number {
  let index = start;
  if (separator === 32) while (index < end && !isBlank(text.charCodeAt(index))) index += 1;
  else while (index < end && text.charCodeAt(index) !== separator) index += 1;
  return index;
}

function trimmedEnd(text: string, start: number, end: number): number {
  let last = end;
  while (last > start && isBlank(text.charCodeAt(last - 1))) last -= 1;
  return last;
}

/** Index of the quotation mark that closes the field; a doubled one is part of the field. -1: there is none. */
function closingQuote(text: string, start: number, end: number): number {
  for (let index = start; index < end; index += 1) {
    if (text.charCodeAt(index) !== QUOTE) continue;
    if (index + 1 < end && text.charCodeAt(index + 1) === QUOTE) index += 1;
    else return index;
  }
  return -1;
}
