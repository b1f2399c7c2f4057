import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { ImportSession } from '@/components/booking/import/import-session';
import { NO_SETTINGS, type ImportRow, type ImportSettings } from '@/lib/domain/import';

const CSV = readFileSync(fileURLToPath(new URL('../../../fixtures/files/bookings/demo-bookings.csv', import.meta.url)));
const [ONE, TWO, ABDOMEN, PELVIS] = [1, 2, 3, 4].map((n) => `${n}1111111-1111-4111-8111-111111111111`) as [string, string, string, string];
const BASIS = { mask: 'HB-####', zone: 'Europe/Berlin', slotMinutes: 45 };

/** Everything of the file that no column is matched to. */
function planted(): string[] {
  const text = CSV.toString('utf8');
  const names = [...text.matchAll(/^\ufeff?"([^"]+), ([^"]+)"/gm)].flatMap(([, last, first]) => [last!, first!]);
  const births = [...text.matchAll(/";(\d{1,2}\.\d{1,2}\.19\d{2});/g)].map(([, birth]) => birth!);
  return [...new Set([...names, ...births, 'do not tell her sister', 'claustrophobic', 'interpreter', 'second line', '12.04.1961'])];
}

async function openDemo() {
  const sent: ImportRow[] = [];
  const session = new ImportSession({
    start: async () => {}, commit: async () => ({ id: '', created: 0, changed: 0, same: 0 }), cancel: async () => {},
    stage: async (_id, rows) => {
      sent.push(...rows);
      return { rows: rows.map(({ number }) => ({ number, outcome: 'created', note: '' })) };
    },
  });
  const opened = await session.open(new Blob([CSV]));
  const columns = { ...opened.proposed, slot: 'Minutes', scanner: 'Room', protocol: 'Exam' };
  const survey = await session.survey(columns);
  const settings: ImportSettings = {
    ...NO_SETTINGS, columns, units: survey.units, dateOrder: survey.dateOrder ?? 'day-first',
    scanners: { 'room 1': ONE, 'room 2': TWO }, protocols: { abdo: ABDOMEN, pelvis: PELVIS },
  };
  return { session, sent, opened, survey, settings };
}

describe('the 300 rows of the demo file', () => {
  it('are understood from their titles and values', async () => {
    const { opened, survey } = await openDemo();
    expect(opened).toMatchObject({ kind: 'csv', proposed: { accession: 'Accession number', day: 'Exam date', weight: 'Weight (lb)', girth: 'Waist (in)', 'taken-on': 'Measured on' } });
    expect(survey).toMatchObject({ units: { weight: 'lb', height: 'cm', girth: 'in' }, dateOrder: 'day-first' });
    expect(survey.scanners.map((name) => name.toLowerCase().replace(/\s+/g, ' ')).sort()).toEqual(['basement', 'room 1', 'room 2']);
  });

  it('come to 288 bookings and twelve rows left out, each with its reason', async () => {
    const { session, sent, settings } = await openDemo();
    expect(planted().length).toBeGreaterThan(100);
    expect(await session.stage('i', settings, BASIS, () => {})).toBe(true);
    expect(session.counts()).toEqual({ created: 288, changed: 0, same: 0, skipped: 12 });
    const { rows } = session.page('skipped', 0, 50);
    const reasons = rows.map(({ note }) => note.split(':')[0]);
    expect(reasons).toEqual([
      'Accession number', 'Accession number', 'Accession number', 'Day', 'Time', 'Scanner', 'Weight', 'Girth at the iliac crest', 'Slot, minutes',
      'Accession number', 'Sex', 'Accession number',
    ]);
    expect(sent).toHaveLength(288);
    expect(session.days('Europe/Berlin')).toEqual({ from: '2027-01-07', to: '2027-01-18' });
    // Row 90 says "131 cm" in a column of inches.
    expect(sent.find(({ accession }) => accession === 'HB-4090')!.readings).toContainEqual(expect.objectContaining({ quantity: 'girth-cm', value: 131 }));
    expect(sent.find(({ accession }) => accession === 'HB-4110')!.readings.map(({ quantity }) => quantity)).not.toContain('weight-kg');
  });

  it('hand on no name, no birth date and no text that is not matched', async () => {
    const { session, sent, opened, survey, settings } = await openDemo();
    await session.stage('i', settings, BASIS, () => {});
    const out = JSON.stringify([sent, opened.columns, survey, session.page('all', 0, 1000)]);
    expect(out).toContain('HB-4000');
    for (const text of planted()) expect(out, text).not.toContain(text);
  });

  it('stop when they are told to', async () => {
    const { session, settings } = await openDemo();
    const staging = session.stage('i', settings, BASIS, () => {});
    session.stop();
    expect(await staging).toBe(false);
  });
});

it('a file without titles is read by the place of its columns', async () => {
  const session = new ImportSession({ start: async () => {}, commit: async () => ({ id: '', created: 0, changed: 0, same: 0 }), cancel: async () => {}, stage: async (_id, rows) => ({ rows: rows.map(({ number }) => ({ number, outcome: 'created', note: '' })) }) });
  const { columns } = await session.open(new Blob(['HB-1;2027-01-02;10:00\nHB-2;2027-01-03;11:00']));
  expect(columns).toEqual(['column 1', 'column 2', 'column 3']);
});

it.each([['', /empty/], ['one column', /one column only/], ['{"resourceType": "Patient"}', /Not a FHIR bundle/], ['{ broken', /begins like JSON/]])('%j is refused', async (text, reason) => {
  const session = new ImportSession({} as ConstructorParameters<typeof ImportSession>[0]);
  await expect(session.open(new Blob([text]))).rejects.toThrow(reason);
});

/** A file that is never given out whole: only pieces of it, and it remembers the largest. */
class PiecewiseFile extends Blob {
  largest = 0;
  override slice(from?: number, to?: number): Blob {
    this.largest = Math.max(this.largest, Math.min(to ?? this.size, this.size) - (from ?? 0));
    return super.slice(from, to);
  }
  override arrayBuffer(): Promise<ArrayBuffer> {
    return Promise.reject(new Error('The whole file was read at once.'));
  }
  override text(): Promise<string> {
    return Promise.reject(new Error('The whole file was read at once.'));
  }
}

it('a large file is neither read nor sent whole: pieces of a quarter of a megabyte and of 500 rows', async () => {
  const lines = Array.from({ length: 12_000 }, (_, index) => `${['A', 'B'][index % 2]}${String(index).padStart(5, '0')};2027-01-02;10:00;Room 1;Abdo;${'x'.repeat(40)}`);
  const file = new PiecewiseFile([['Accession;Date;Time;Scanner;Protocol;Notes', ...lines].join('\n')]);
  expect(file.size).toBeGreaterThan(3 * 256 * 1024);
  const pieces: number[] = [];
  const session = new ImportSession({
    start: async () => {}, commit: async () => ({ id: '', created: 0, changed: 0, same: 0 }), cancel: async () => {},
    stage: async (_id, rows) => {
      pieces.push(rows.length);
      return { rows: rows.map(({ number }) => ({ number, outcome: 'created', note: '' })) };
    },
  });
  const { proposed } = await session.open(file);
  const settings: ImportSettings = { ...NO_SETTINGS, columns: { ...proposed, accession: 'Accession', scanner: 'Scanner', protocol: 'Protocol' }, scanners: { 'room 1': ONE }, protocols: { abdo: ABDOMEN } };
  expect(await session.stage('i', settings, { ...BASIS, mask: '@#####' }, () => {})).toBe(true);
  expect(session.counts()).toMatchObject({ created: 12_000, skipped: 0 });
  expect(Math.max(...pieces)).toBe(500);
  expect(file.largest).toBeLessThanOrEqual(256 * 1024);
});
