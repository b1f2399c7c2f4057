import { CsvReader, detectDelimiter, TextPieces, type CsvRow, type Delimiter } from '@/lib/csv';
import { looksLikeTitles } from '@/lib/domain/import';

/** Read at a time, so that a file of any size takes the same memory. */
const PIECE_BYTES = 256 * 1024;
/** A bundle is one JSON value and has to be held whole. */
export const MAX_BUNDLE_BYTES = 50_000_000;

/** A chosen file, read from its beginning as often as it is needed. */
export class ImportFile {
  private constructor(
    private readonly file: Blob,
    readonly kind: 'csv' | 'fhir',
    readonly delimiter: Delimiter,
    /** Absent where the first row is a booking already. */
    readonly titles: readonly string[] | undefined,
    readonly width: number,
  ) {}

  static async open(file: Blob): Promise<ImportFile> {
    if (file.size === 0) throw new Error('The file is empty. Allowed: CSV, or a FHIR bundle as JSON.');
    const pieces = new TextPieces();
    const start = pieces.push(new Uint8Array(await file.slice(0, PIECE_BYTES).arrayBuffer()));
    if (/^\s*\{/.test(start)) return new ImportFile(file, 'fhir', ',', undefined, 0);
    const delimiter = detectDelimiter(start);
    const reader = new CsvReader(delimiter);
    const first = reader.push(start)[0] ?? reader.end()[0];
    if (!first || first.fields.length < 2) {
      throw new Error('The first line has one column only. Allowed: columns set apart by commas, semicolons or tabs; or a FHIR bundle as JSON.');
    }
    const titles = looksLikeTitles(first.fields) ? first.fields : undefined;
    return new ImportFile(file, 'csv', delimiter, titles, first.fields.length);
  }

  /** Rows piece by piece, without the titles. */
  async *rows(): AsyncGenerator<readonly CsvRow[]> {
    const pieces = new TextPieces();
    const reader = new CsvReader(this.delimiter);
    let first = this.titles !== undefined;
    const body = (rows: CsvRow[]) => {
      if (!first || rows.length === 0) return rows;
      first = false;
      return rows.slice(1);
    };
    for (let at = 0; at < this.file.size; at += PIECE_BYTES) {
      const bytes = new Uint8Array(await this.file.slice(at, at + PIECE_BYTES).arrayBuffer());
      yield body(reader.push(pieces.push(bytes)));
    }
    yield body([...reader.push(pieces.end()), ...reader.end()]);
  }

  async json(): Promise<unknown> {
    if (this.file.size > MAX_BUNDLE_BYTES) throw new Error(`The bundle is larger than ${MAX_BUNDLE_BYTES / 1_000_000} MB. Send it in parts.`);
    try {
      return JSON.parse(await this.file.text());
    } catch {
      throw new Error('The file begins like JSON and is none. Allowed: a FHIR R4 bundle, or CSV.');
    }
  }
}
