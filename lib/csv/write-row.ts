import type { Delimiter } from './csv-reader';

/** One row as RFC 4180 writes it, without its line break. A single empty field is quoted, or the row would be an empty line. */
export function writeRow(fields: readonly string[], delimiter: Delimiter = ','): string {
  const written = fields.map((field) => (/["\r\n,;\t]/.test(field) || /^\s|\s$/.test(field) ? `"${field.replaceAll('"', '""')}"` : field));
  return written.length === 1 && written[0] === '' ? '""' : written.join(delimiter);
}
