import { randomUUID } from 'node:crypto';
import { sql } from 'kysely';
import { beforeAll, describe, expect, it } from 'vitest';
import type { ImportRow } from '@/lib/domain/import';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { listBookings } from '@/lib/services/booking/list-bookings';
import { cancelImport } from '@/lib/services/import/cancel-import';
import { commitImport } from '@/lib/services/import/commit-import';
import { openImport } from '@/lib/services/import/open-import';
import { eraseStaged } from '@/lib/services/import/erase-staged-rows';
import { stageRows } from '@/lib/services/import/stage-rows';
import { startImport } from '@/lib/services/import/start-import';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { inTransaction } from '@/db/client';
import { ownerDatabase } from '@/tests/support/database';
import { as, equipSite, scannerForm, type EquippedSite } from '@/tests/support/equipped-site';

let here: EquippedSite;
let otherScanner: string;
beforeAll(async () => {
  here = await equipSite();
  otherScanner = (await createScanner(as(here.lead), scannerForm({ name: 'Second scanner' }))).id;
});

const row = (number: number, accession: string, change: Partial<ImportRow> = {}): ImportRow => ({
  number, accession, scheduledAt: '2026-05-11T08:00:00.000Z', slotMinutes: 40, scannerId: here.scanner.id,
  protocolId: here.protocol.id,
  readings: [{ quantity: 'weight-kg', value: 140, source: 'reported', takenOn: '2026-05-01' }, { quantity: 'girth-cm', value: 130, source: 'reported' }],
  ...change,
});

async function stage(rows: readonly ImportRow[]) {
  const { id } = await startImport(as(here.coordinator), { id: randomUUID(), format: 'csv' });
  const staged = await stageRows(as(here.coordinator), { importId: id, rows });
  return { id, staged: staged.rows, good: staged.rows.filter(({ outcome }) => outcome !== 'skipped').length };
}
const bring = async (rows: readonly ImportRow[]) => {
  const { id, staged, good } = await stage(rows);
  return { staged, done: await commitImport(as(here.coordinator), { importId: id, expectedRows: good }) };
};
const bookings = async () => (await listBookings(as(here.coordinator), { from: '2026-05-11', to: '2026-05-20', limit: 200 })).bookings;

describe('an import', () => {
  it('makes bookings with sizes, and the same file again changes nothing', async () => {
    const rows = [row(2, 'GH-0001'), row(3, 'GH-0002', { readings: [] })];
    const first = await bring(rows);
    expect(first.staged.map(({ outcome, note }) => [outcome, note])).toEqual([['created', '2 sizes'], ['created', '']]);
    expect(first.done).toMatchObject({ created: 2, changed: 0, same: 0 });
    const made = (await bookings()).find(({ accession }) => accession === 'GH-0001')!;
    const record = await getSizeRecord(as(here.lead), { bookingId: made.id });
    expect(record.readings.map(({ quantity, value, source, takenOn }) => [quantity, value, source, takenOn]).sort()).toEqual([
      ['girth-cm', 130, 'reported', '2026-05-04'], ['weight-kg', 140, 'reported', '2026-05-01'],
    ]);
    const before = await bookings();
    const again = await bring(rows);
    expect(again.staged.map(({ outcome }) => outcome)).toEqual(['same', 'same']);
    expect(again.done).toMatchObject({ created: 0, changed: 0, same: 2 });
    expect(await bookings()).toEqual(before);
    expect((await getSizeRecord(as(here.lead), { bookingId: made.id })).readings).toHaveLength(2);
  });

  it('changes what is booked and says which part', async () => {
    await bring([row(2, 'GH-0010')]);
    const { staged, done } = await bring([
      row(2, 'GH-0010', { scannerId: otherScanner, scheduledAt: '2026-05-12T09:30:00.000Z', readings: [{ quantity: 'weight-kg', value: 151, source: 'measured', takenOn: '2026-05-03' }] }),
    ]);
    expect(staged).toEqual([{ number: 2, outcome: 'changed', note: 'scanner, time, 1 size' }]);
    expect(done).toMatchObject({ created: 0, changed: 1, same: 0 });
    expect((await bookings()).find(({ accession }) => accession === 'GH-0010')).toMatchObject({
      scannerId: otherScanner, scheduledAt: '2026-05-12T09:30:00.000Z',
    });
    const events = await here.site.withApp((trx) =>
      trx.selectFrom('audit_event').select('fields').where('site_id', '=', here.site.siteId).where('action', '=', 'booking.import').where('subject_type', '=', 'booking').execute(),
    );
    expect(events.map(({ fields }) => fields)).toContainEqual(['scanner', 'scheduledAt', 'weight-kg']);
    const history = await here.site.withApp((trx) =>
      trx.selectFrom('booking_entry').select(['kind', 'data']).where('site_id', '=', here.site.siteId).execute(),
    );
    expect(history).toEqual([{
      kind: 'booked',
      data: {
        schemaVersion: 1,
        from: { scanner: here.scanner.scanner.name, at: '2026-05-11T08:00:00.000Z', slotMinutes: 40 },
        to: { scanner: 'Second scanner', at: '2026-05-12T09:30:00.000Z', slotMinutes: 40 },
      },
    }]);
    const states = await here.site.withApp((trx) =>
      trx.selectFrom('booking_state').innerJoin('booking', (join) => join.onRef('booking.site_id', '=', 'booking_state.site_id').onRef('booking.id', '=', 'booking_state.booking_id')).select('stale').where('accession', '=', 'GH-0010').execute(),
    );
    expect(states).toEqual([{ stale: 1 }]);
  });

  it('leaves out what cannot be booked, without repeating it, and books the rest', async () => {
    const { staged, done } = await bring([
      row(2, 'Millerová'), row(3, 'GH-0020', { scannerId: randomUUID() }), row(4, 'GH-0021'), row(5, 'GH-0021', { slotMinutes: 50 }), row(6, '12-04-1961'),
    ]);
    expect(staged.map(({ outcome }) => outcome)).toEqual(['skipped', 'skipped', 'created', 'skipped', 'skipped']);
    expect(JSON.stringify(staged)).not.toMatch(/Miller|1961/);
    expect(staged[3]!.note).toContain('earlier row');
    expect(done).toMatchObject({ created: 1 });
  });

  it('takes a piece twice as one, and a commit twice as one', async () => {
    const { id } = await startImport(as(here.coordinator), { id: randomUUID(), format: 'csv' });
    for (let time = 0; time < 2; time += 1) await stageRows(as(here.coordinator), { importId: id, rows: [row(2, 'GH-0030')] });
    const first = await commitImport(as(here.coordinator), { importId: id, expectedRows: 1 });
    expect(await commitImport(as(here.coordinator), { importId: id, expectedRows: 1 })).toEqual(first);
    await expect(stageRows(as(here.coordinator), { importId: id, rows: [row(3, 'GH-0031')] })).rejects.toMatchObject({ code: 'conflict' });
  });

  it('does nothing when rows are missing, or after it was stopped', async () => {
    const { id } = await stage([row(2, 'GH-0040')]);
    await expect(commitImport(as(here.coordinator), { importId: id, expectedRows: 2 })).rejects.toMatchObject({ code: 'conflict' });
    await cancelImport(as(here.coordinator), { id });
    await expect(commitImport(as(here.coordinator), { importId: id, expectedRows: 1 })).rejects.toMatchObject({ code: 'conflict' });
    expect((await bookings()).map(({ accession }) => accession)).not.toContain('GH-0040');
  });

  it('is nobody’s but the pathway’s, and no other site’s', async () => {
    await expect(startImport(as(here.radiographer), { id: randomUUID(), format: 'csv' })).rejects.toMatchObject({ code: 'not-found' });
    const { id } = await stage([row(2, 'GH-0050')]);
    const other = await equipSite();
    await expect(commitImport(as(other.coordinator), { importId: id, expectedRows: 1 })).rejects.toMatchObject({ code: 'not-found' });
    await expect(stageRows(as(other.coordinator), { importId: id, rows: [row(3, 'GH-0051')] })).rejects.toMatchObject({ code: 'not-found' });
  });

  it('of the same booking by two people at once makes it once', async () => {
    const [one, two] = [await stage([row(2, 'GH-0060')]), await stage([row(2, 'GH-0060')])];
    const done = await Promise.all([one, two].map(({ id }) => commitImport(as(here.coordinator), { importId: id, expectedRows: 1 })));
    expect(done.map(({ created, same }) => created + same)).toEqual([1, 1]);
    expect(done.reduce((sum, { created }) => sum + created, 0)).toBe(1);
  });

  it('keeps how files are read for the site', async () => {
    const settings = { ...(await openImport(as(here.coordinator))).settings, columns: { accession: 'Acc no', day: 'Date' }, scanners: { 'room 2': here.scanner.id } };
    await startImport(as(here.coordinator), { id: randomUUID(), format: 'csv', settings });
    expect((await openImport(as(here.coordinator))).settings).toEqual(settings);
  });

  it('keeps no staged row once it is over, and keeps those of one that goes on', async () => {
    const committed = await stage([row(2, 'GH-0070'), row(3, 'GH-0071')]);
    const stopped = await stage([row(2, 'GH-0072')]);
    const going = await stage([row(2, 'GH-0073')]);
    const { siteId } = here.site;
    await commitImport(as(here.coordinator), { importId: committed.id, expectedRows: 2 });
    await cancelImport(as(here.coordinator), { id: stopped.id });
    expect(await eraseStaged({ siteId })).toBeGreaterThanOrEqual(3);
    const left = await here.site.withApp((trx) => trx.selectFrom('import_row').select(['batch_id', 'accession']).where('batch_id', 'in', [committed.id, stopped.id, going.id]).execute());
    expect(left).toEqual([{ batch_id: going.id, accession: 'GH-0073' }]);
    expect(await eraseStaged({ siteId })).toBe(0);
    // Sent again after its rows are gone, a commit answers what it did.
    expect(await commitImport(as(here.coordinator), { importId: committed.id, expectedRows: 2 })).toMatchObject({ created: 2 });
    expect(await commitImport(as(here.coordinator), { importId: going.id, expectedRows: 1 })).toMatchObject({ created: 1 });
  });

  it('that was left lying for a day loses its rows, and cannot be committed without them', async () => {
    const { id } = await stage([row(2, 'GH-0080')]);
    await inTransaction(here.site.siteId, (trx) => sql`update import_batch set created_at = now() - interval '25 hours' where id = ${id}`.execute(trx), ownerDatabase());
    await eraseStaged({ siteId: here.site.siteId });
    await expect(commitImport(as(here.coordinator), { importId: id, expectedRows: 1 })).rejects.toMatchObject({ code: 'conflict' });
  });
});
