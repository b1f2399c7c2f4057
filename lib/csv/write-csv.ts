/** Where a spreadsheet may take a cell for a formula: its start, or what follows a tab or return there. */
const AT_START = /^(?=[=+\-@\t\r])/;
/**
 * A spreadsheet set to semicolons or tabs honours no quotes that begin in the middle of what it takes for a cell: it
 * splits within the text, at line breaks too, and may drop quotes that follow.
 */
const AFTER_SPLIT = /(?<=[;\t\r\n])(?="*[=+\-@])/g;

/** A cell as text: an apostrophe before whatever would run, quotes round what would split. */
export function csvCell(value: string | number): string {
  const text = typeof value === 'string' ? value.replace(AFTER_SPLIT, "'").replace(AT_START, "'") : String(value);
  return /[",;\r\n\t]/.test(text) || text !== text.trim() ? `"${text.replaceAll('"', '""')}"` : text;
}

/** RFC 4180 with a byte-order mark, so that a spreadsheet reads it as UTF-8. */
export function writeCsv(header: readonly string[], rows: readonly (readonly (string | number)[])[]): string {
  return `\ufeff${[header, ...rows].map((row) => `${row.map(csvCell).join(',')}\r\n`).join('')}`;
}
