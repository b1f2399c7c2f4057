import { beforeAll, describe, expect, it } from 'vitest';
import { archiveScanner } from '@/lib/services/scanner/archive-scanner';
import { createBooking } from '@/lib/services/booking/create-booking';
import { getBooking } from '@/lib/services/booking/get-booking';
import { listBookings, listTodaysBookings } from '@/lib/services/booking/list-bookings';
import { openBench } from '@/lib/services/booking/open-bench';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { recordReadings } from '@/lib/services/size-reading/record-readings';
import { savePlan } from '@/lib/services/plan/save-plan';
import { countQueries } from '@/tests/support/count-queries';
import { as, equipSite, NOW, scannerForm, sizeBooking, type EquippedSite } from '@/tests/support/equipped-site';
import { planBody } from '@/tests/support/plan-body';

let here: EquippedSite;
beforeAll(async () => {
  here = await equipSite();
});

const booking = (accession: string, scheduledAt = '2026-05-06T08:00:00Z') => ({
  accession, scheduledAt, slotMinutes: 30, scannerId: here.scanner.id, protocolId: here.protocol.id,
});

describe('bookings', () => {
  it('are made under an accession number, once', async () => {
    const made = await createBooking(as(here.radiographer), booking('CD-0001'));
    expect(await getBooking(as(here.radiologist), { id: made.id })).toEqual(made);
    expect(made).not.toHaveProperty('verdict');
    await expect(createBooking(as(here.coordinator), booking('CD-0001'))).rejects.toMatchObject({ fields: { accession: expect.stringContaining('booked already') } });
    const outcomes = await Promise.allSettled([1, 2, 3].map(() => createBooking(as(here.coordinator), booking('CD-0002'))));
    expect(outcomes.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    for (const outcome of outcomes) if (outcome.status === 'rejected') expect(outcome.reason).toMatchObject({ code: 'invalid' });
  });

  it.each(['Miller', 'AB-12', '1961-04-12'])('“%s” is no accession number', async (accession) => {
    await expect(createBooking(as(here.coordinator), booking(accession))).rejects.toMatchObject({ code: 'invalid', fields: { accession: expect.any(String) } });
  });

  it('need a scanner and a protocol that are in use at this site', async () => {
    const other = await equipSite();
    await expect(createBooking(as(here.coordinator), { ...booking('CD-0003'), scannerId: other.scanner.id })).rejects.toMatchObject({ fields: { scannerId: expect.any(String) } });
    const { id } = await createScanner(as(here.lead), scannerForm({ name: 'Old one' }));
    await archiveScanner(as(here.lead), { id, expectedVersion: 1 });
    await expect(createBooking(as(here.coordinator), { ...booking('CD-0003'), scannerId: id })).rejects.toMatchObject({ fields: { scannerId: expect.any(String) } });
  });

  it('are listed by time in pages that meet without gap or repeat', async () => {
    const day = '2026-07-01';
    for (let i = 0; i < 7; i += 1) await createBooking(as(here.coordinator), booking(`EF-000${i}`, `${day}T0${Math.floor(i / 3)}:00:00Z`));
    const seen: string[] = [];
    let after: string | undefined;
    do {
      const page = await listBookings(as(here.coordinator), { from: day, to: day, limit: 3, ...(after ? { after } : {}) });
      seen.push(...page.bookings.map(({ accession }) => accession));
      after = page.next;
    } while (after);
    expect([...seen].sort()).toEqual([0, 1, 2, 3, 4, 5, 6].map((i) => `EF-000${i}`));
    expect(seen).toHaveLength(7);
    await expect(listBookings(as(here.coordinator), { after: 'page 2' })).rejects.toMatchObject({ fields: { after: expect.any(String) } });
    await expect(listBookings(as(here.coordinator), { from: day, to: '2026-06-30' })).rejects.toMatchObject({ fields: { to: expect.any(String) } });
  });

  it('of another site are neither listed nor there', async () => {
    const other = await equipSite();
    expect((await listTodaysBookings(as(other.radiographer))).bookings.map(({ id }) => id)).toEqual([other.booking.id]);
    for (const work of [getBooking, (context: ReturnType<typeof as>, { id }: { id: string }) => openBench(context, { bookingId: id })]) {
      await expect(work(as(other.radiographer), { id: here.booking.id })).rejects.toMatchObject({ code: 'not-found' });
    }
  });
});

describe('sizes', () => {
  it('are only ever added, and what lists show follows in the same transaction', async () => {
    const mine = await equipSite();
    const record = await sizeBooking(mine);
    expect(record.patient!.extents.left.value).toBe(240);
    const first = await getBooking(as(mine.radiographer), { id: mine.booking.id });
    expect(first.verdict).toBe('fold-in-keep-clear');
    expect(first.minutesNeeded).toBeGreaterThan(0);
    // A minute later: of two readings of one moment neither is the newer.
    await sizeBooking(mine, 300, 200, new Date(NOW.getTime() + 60_000));
    expect((await getSizeRecord(as(mine.radiologist), { bookingId: mine.booking.id })).readings).toHaveLength(6);
    expect((await getBooking(as(mine.radiographer), { id: mine.booking.id })).verdict).toBe('no-fold-expected');
    await expect(
      mine.site.withApp((trx) => trx.updateTable('size_reading').set({ value: 1 }).execute()),
    ).rejects.toThrow(/permission denied/);
  });

  it('are refused one by one when out of range, from the future, or from someone who only reads', async () => {
    const reading = { quantity: 'breadth-mm', value: 480, source: 'measured', spread: 3, takenOn: '2026-05-02' };
    const record = (change: object, actor = here.radiographer) =>
      recordReadings(as(actor), { bookingId: here.booking.id, readings: [reading, { ...reading, ...change }] });
    await expect(record({ value: 20 })).rejects.toMatchObject({ fields: { 'readings.1.value': '20 given; allowed for breadth, right–left: 50 to 1500 mm' } });
    await expect(record({ takenOn: '2026-05-09' })).rejects.toMatchObject({ fields: { 'readings.1.takenOn': expect.stringContaining('2026-05-09') } });
    await expect(record({ quantity: 'shoe size' })).rejects.toMatchObject({ fields: { 'readings.1.quantity': expect.any(String) } });
    await expect(record({}, here.radiologist)).rejects.toMatchObject({ code: 'not-found' });
    expect((await getSizeRecord(as(here.lead), { bookingId: here.booking.id })).readings).toEqual([]);
  });
});

describe('opening the bench', () => {
  it('brings everything in a handful of queries, with a plan or without', async () => {
    const mine = await equipSite();
    await sizeBooking(mine);
    const open = () => openBench(as(mine.radiographer), { bookingId: mine.booking.id });
    const { result: bench, queries } = await countQueries(open);
    // The site setting, then booking, scanner, protocol with sequences, what was asked for, policy, readings, plan.
    expect(queries).toBeLessThanOrEqual(8);
    expect(bench).toMatchObject({ booking: { accession: 'AB-1234' }, scanner: { version: 1 }, protocol: { version: 1 }, policy: { version: 0 } });
    expect(bench.protocol.keepClear.area).toMatchObject({ kind: 'box', label: 'Liver' });
    await savePlan(as(mine.radiographer), planBody(bench));
    const planned = await countQueries(open);
    expect(planned.result.plan).toMatchObject({ version: 1, state: 'draft' });
    expect(planned.queries).toBeLessThanOrEqual(8);
  });

  it('lists a day in one query, however many bookings it has', async () => {
    const { queries } = await countQueries(() => listTodaysBookings(as(here.radiographer)));
    expect(queries).toBe(2);
  });
});
