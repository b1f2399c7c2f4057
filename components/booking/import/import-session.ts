import { readNumber } from '@/lib/csv';
import {
  columnTitle, dateOrderOf, guessColumns, guessUnit, IMPORT_FIELDS, MAX_IMPORT_ROWS, nameKey, readImportRow, ROWS_PER_PIECE,
  SIZE_FIELDS, type ImportField, type ImportRow, type ImportSettings, type MappedCells, type SkippedRow,
} from '@/lib/domain/import';
import { matchBookings, readBundle, type BundleContent } from '@/lib/fhir';
import type { StagedRow } from '@/lib/schemas/import';
import { ImportFile } from './import-file';
import { RowLedger, type LedgerPage } from './row-ledger';
import type { ImportServer } from './import-server';
import type { RowOutcome } from '@/lib/domain/import';

export interface ImportBasis {
  readonly mask: string;
  readonly zone: string;
  readonly slotMinutes: number;
}
export interface OpenedFile {
  readonly kind: 'csv' | 'fhir';
  /** One for each column: its title, or its place. */
  readonly columns: readonly string[];
  readonly proposed: ImportSettings['columns'];
}
/** What the mapped columns say about themselves. */
export interface Survey {
  readonly scanners: readonly string[];
  readonly protocols: readonly string[];
  readonly units: ImportSettings['units'];
  readonly dateOrder?: ImportSettings['dateOrder'];
}
export interface Progress {
  readonly done: number;
  readonly total: number;
}

const SURVEYED_ROWS = 20_000;
const VALUES_LOOKED_AT = 500;
const MOST_NAMES = 200;
/** Of a bundle's appointments or a file's bytes nobody can tell the rows beforehand; progress counts what is through. */
const EMPTY_BUNDLE: BundleContent = { bookings: [], skipped: [] };

/** A file from choosing it to having its rows compared: it runs in a worker and hands on nothing that is not mapped. */
export class ImportSession {
  private file: ImportFile | undefined;
  private bundle = EMPTY_BUNDLE;
  private ledger = new RowLedger();
  private stopped = false;
  private first = '';
  private last = '';

  constructor(private readonly server: ImportServer) {}

  async open(file: Blob): Promise<OpenedFile> {
    this.file = await ImportFile.open(file);
    this.bundle = this.file.kind === 'fhir' ? readBundle(await this.file.json()) : EMPTY_BUNDLE;
    const { kind, titles, width } = this.file;
    const columns = Array.from({ length: width }, (_, index) => columnTitle(titles, index));
    return { kind, columns, proposed: titles ? guessColumns(titles) : {} };
  }

  async survey(columns: ImportSettings['columns']): Promise<Survey> {
    if (this.opened().kind === 'fhir') return this.surveyBundle();
    const names = { scanner: new Map<string, string>(), protocol: new Map<string, string>() };
    const values = new Map<ImportField, string[]>();
    let looked = 0;
    for await (const rows of this.opened().rows()) {
      for (const { fields } of rows) {
        const cells = this.cells(fields, columns);
        for (const field of ['scanner', 'protocol'] as const) {
          const name = (cells[field] ?? '').trim();
          if (name !== '' && name.length <= 120 && names[field].size < MOST_NAMES) names[field].set(nameKey(name), name);
        }
        for (const field of IMPORT_FIELDS) {
          const list = values.get(field) ?? [];
          if (list.length < VALUES_LOOKED_AT && cells[field]) values.set(field, [...list, cells[field]]);
        }
      }
      looked += rows.length;
      if (looked >= SURVEYED_ROWS) break;
    }
    const numbers = (field: ImportField) => (values.get(field) ?? []).flatMap((text) => readNumber(text.replace(/\s*\p{L}+\.?$/u, '')) ?? []);
    const units = Object.fromEntries(
      SIZE_FIELDS.filter((field) => columns[field]).map((field) => [field, guessUnit(field, columns[field]!, numbers(field))]).filter(([, unit]) => unit),
    );
    const dateOrder = dateOrderOf((['day', 'start', 'taken-on'] as const).flatMap((field) => values.get(field) ?? []));
    return { scanners: [...names.scanner.values()], protocols: [...names.protocol.values()], units, ...(dateOrder ? { dateOrder } : {}) };
  }

  private surveyBundle(): Survey {
    const first = (read: (booking: BundleContent['bookings'][number]) => readonly string[]) =>
      [...new Set(this.bundle.bookings.flatMap((booking) => read(booking).slice(0, 1)))].slice(0, MOST_NAMES);
    return { scanners: first((booking) => booking.scannerNames), protocols: first((booking) => booking.protocolNames), units: {} };
  }

  /** Reads all rows and has the server compare them, piece after piece. @returns false when it was stopped */
  async stage(importId: string, settings: ImportSettings, basis: ImportBasis, report: (progress: Progress) => void): Promise<boolean> {
    this.stopped = false;
    this.ledger = new RowLedger();
    [this.first, this.last] = ['', ''];
    let piece: ImportRow[] = [];
    const flush = async () => {
      if (piece.length === 0) return;
      this.ledger.addStaged(piece, (await this.server.stage(importId, piece)).rows);
      piece = [];
      report({ done: this.ledger.size, total: 0 });
    };
    for await (const read of this.read(settings, basis)) {
      if (this.stopped) return false;
      if ('reason' in read) this.ledger.addSkipped(read);
      else {
        piece.push(read);
        if (this.first === '' || read.scheduledAt < this.first) this.first = read.scheduledAt;
        if (read.scheduledAt > this.last) this.last = read.scheduledAt;
      }
      if (piece.length === ROWS_PER_PIECE) await flush();
    }
    await flush();
    report({ done: this.ledger.size, total: this.ledger.size });
    return !this.stopped;
  }

  stop(): void {
    this.stopped = true;
  }

  counts(): Readonly<Record<RowOutcome, number>> {
    return this.ledger.counts();
  }
  /** The days of what is booked, YYYY-MM-DD in the site's zone; null when nothing is. */
  days(zone: string): { readonly from: string; readonly to: string } | null {
    // The only locale whose dates are written as ISO 8601 writes them.
    const day = (moment: string) => new Intl.DateTimeFormat('sv-SE', { timeZone: zone }).format(new Date(moment));
    return this.first === '' ? null : { from: day(this.first), to: day(this.last) };
  }
  page(outcome: RowOutcome | 'all', from: number, size: number): LedgerPage {
    return this.ledger.page(outcome, from, size);
  }

  private async *read(settings: ImportSettings, basis: ImportBasis): AsyncGenerator<ImportRow | SkippedRow> {
    if (this.opened().kind === 'fhir') {
      const { rows, skipped } = matchBookings(this.bundle, { ...basis, scanners: settings.scanners, protocols: settings.protocols });
      yield* skipped;
      yield* rows;
      return;
    }
    const seen = new Set<string>();
    let count = 0;
    for await (const rows of this.opened().rows()) {
      for (const { line, fields } of rows) {
        count += 1;
        if (count > MAX_IMPORT_ROWS) throw new Error(`The file has more than ${MAX_IMPORT_ROWS} rows. Send it in parts.`);
        const read = readImportRow(line, this.cells(fields, settings.columns), { ...basis, settings, readNumber });
        if ('skipped' in read) yield { number: line, reason: read.skipped };
        else if (seen.has(read.row.accession)) yield { number: line, reason: 'Accession number: stands in an earlier row; the first one counts' };
        else yield read.row;
        if ('row' in read) seen.add(read.row.accession);
      }
    }
  }

  private cells(fields: readonly string[], columns: ImportSettings['columns']): MappedCells {
    const { titles, width } = this.opened();
    const place = new Map(Array.from({ length: width }, (_, index) => [columnTitle(titles, index), index] as const).reverse());
    return Object.fromEntries(
      IMPORT_FIELDS.flatMap((field) => {
        const at = columns[field] === undefined ? undefined : place.get(columns[field]);
        return at === undefined ? [] : [[field, fields[at] ?? '']];
      }),
    );
  }

  private opened(): ImportFile {
    if (!this.file) throw new Error('No file is chosen.');
    return this.file;
  }
}

export type { StagedRow };
