import type { ImportRow, RowOutcome, SkippedRow } from '@/lib/domain/import';
import type { StagedRow } from '@/lib/schemas/import';

/** One row of the preview. A row that is left out shows its line only: what stood in it may be anything. */
export interface LedgerRow {
  readonly number: number;
  readonly accession: string;
  readonly outcome: RowOutcome;
  readonly note: string;
}
export interface LedgerPage {
  readonly rows: readonly LedgerRow[];
  readonly total: number;
}

/** What became of every row, short enough to keep for the largest file. */
export class RowLedger {
  private readonly rows: LedgerRow[] = [];
  private readonly tally: Record<RowOutcome, number> = { created: 0, changed: 0, same: 0, skipped: 0 };

  get size(): number {
    return this.rows.length;
  }

  addSkipped({ number, reason }: SkippedRow): void {
    this.add({ number, accession: '', outcome: 'skipped', note: reason });
  }

  addStaged(sent: readonly ImportRow[], answers: readonly StagedRow[]): void {
    const accessions = new Map(sent.map(({ number, accession }) => [number, accession]));
    for (const { number, outcome, note } of answers) {
      this.add({ number, outcome, note, accession: outcome === 'skipped' ? '' : (accessions.get(number) ?? '') });
    }
  }

  counts(): Record<RowOutcome, number> {
    return { ...this.tally };
  }

  page(outcome: RowOutcome | 'all', from: number, size: number): LedgerPage {
    const rows = outcome === 'all' ? [...this.rows] : this.rows.filter((row) => row.outcome === outcome);
    rows.sort((a, b) => a.number - b.number);
    return { rows: rows.slice(from, from + size), total: rows.length };
  }

  private add(row: LedgerRow): void {
    this.rows.push(row);
    this.tally[row.outcome] += 1;
  }
}
