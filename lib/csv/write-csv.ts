/** Characters with which a spreadsheet takes a cell for a formula. */
const FORMULA = /^[=+\-@\t\r]/;

/** A cell as text: an apostrophe before what would run, quotes round what would split. */
export function csvCell(value: string | number): string {
  const text = typeof value === 'string' && FORMULA.test(value) ? `'${value}` : String(value);
  return /[",;\r\n\t]/.test(text) || text !== text.trim() ? `"${text.replaceAll('"', '""')}"` : text;
}

/** RFC 4180 with a byte-order mark, so that a spreadsheet reads it as UTF-8. */
export function writeCsv(header: readonly string[], rows: readonly (readonly (string | number)[])[]): string {
  return `\ufeff${[header, ...rows].map((row) => `${row.map(csvCell).join(',')}\r\n`).join('')}`;
}
