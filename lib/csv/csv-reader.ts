import { CsvError } from './csv-error';

export type Delimiter = ',' | ';' | '\t';

export interface CsvRow {
  /** Line on which the row begins, from 1. */
  readonly line: number;
  readonly fields: readonly string[];
}

/** A field or row beyond these is a broken quote or no table at all, and must not grow without end. */
export const MAX_FIELD_LENGTH = 10_000;
export const MAX_FIELDS = 300;

type Place = 'field-start' | 'plain' | 'quoted' | 'quote-in-quoted';

/**
 * Rows of comma-separated text (RFC 4180), fed piece by piece: a piece may end anywhere, also between the two quotes
 * of an escaped one or within a line break. CR LF, LF and CR alone end a row; a quote inside a field that did not begin
 * with one stands for itself; empty lines are left out.
 */
export class CsvReader {
  private place: Place = 'field-start';
  private field = '';
  private fields: string[] = [];
  private line = 1;
  private rowLine = 1;
  private afterCr = false;

  constructor(private readonly delimiter: Delimiter) {}

  push(piece: string): CsvRow[] {
    const rows: CsvRow[] = [];
    for (const char of piece) this.take(char, rows);
    return rows;
  }

  /** The last row, which need not end with a line break. */
  end(): CsvRow[] {
    if (this.place === 'quoted') {
      throw new CsvError('unclosed-quote', this.rowLine, `A quote opened in the row of line ${this.rowLine} is never closed.`);
    }
    const rows: CsvRow[] = [];
    if (this.field !== '' || this.fields.length > 0 || this.place !== 'field-start') this.endRow(rows);
    return rows;
  }

  private take(char: string, rows: CsvRow[]): void {
    const lineFeedOfPair = this.afterCr && char === '\n';
    this.afterCr = char === '\r';
    if ((char === '\n' && !lineFeedOfPair) || char === '\r') this.line += 1;
    if (this.place === 'quoted') {
      if (char === '"') this.place = 'quote-in-quoted';
      else this.add(char);
      return;
    }
    if (lineFeedOfPair) {
      if (this.fields.length === 0 && this.field === '') this.rowLine = this.line;
      return;
    }
    if (this.place === 'quote-in-quoted' && char === '"') {
      this.add('"');
      this.place = 'quoted';
    } else if (char === this.delimiter) {
      this.endField();
    } else if (char === '\n' || char === '\r') {
      this.endRow(rows);
    } else if (char === '"' && this.place === 'field-start') {
      this.place = 'quoted';
    } else if (this.place === 'quote-in-quoted') {
      throw new CsvError('text-after-quote', this.line, `Line ${this.line}: text follows a closing quote.`);
    } else {
      this.place = 'plain';
      this.add(char);
    }
  }

  private add(char: string): void {
    if (this.field.length >= MAX_FIELD_LENGTH) {
      throw new CsvError('field-too-long', this.rowLine, `A field in the row of line ${this.rowLine} is longer than ${MAX_FIELD_LENGTH} characters; a quote may be missing.`);
    }
    this.field += char;
  }

  private endField(): void {
    if (this.fields.length >= MAX_FIELDS) {
      throw new CsvError('too-many-fields', this.rowLine, `The row of line ${this.rowLine} has more than ${MAX_FIELDS} fields.`);
    }
    this.fields.push(this.field);
    this.field = '';
    this.place = 'field-start';
  }

  private endRow(rows: CsvRow[]): void {
    const empty = this.fields.length === 0 && this.field === '' && this.place === 'field-start';
    if (!empty) {
      this.endField();
      rows.push({ line: this.rowLine, fields: this.fields });
    }
    this.fields = [];
    this.rowLine = this.line;
  }
}
