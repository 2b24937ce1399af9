/** CSV by RFC 4180: lines end with CRLF, what holds a comma, a quotation mark or a line break is quoted. */
export function csvText(header: readonly string[], rows: readonly (readonly CsvCell[])[]): string {
  return [header, ...rows].map((row) => `${row.map(cellText).join(",")}\r\n`).join("");
}

/** Null is an empty field. */
export type CsvCell = string | number | null;

function cellText(cell: CsvCell): string {
  if (cell === null) return "";
  const text = String(cell);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
