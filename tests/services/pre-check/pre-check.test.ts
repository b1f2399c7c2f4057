import { describe, expect, it } from 'vitest';
import { inTransaction } from '@/db/client';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import { ServiceError } from '@/lib/domain/errors';
import { roundAnswer } from '@/lib/services/check/round-answer';
import { changeBooked } from '@/lib/services/booking/change-booked';
import { createBooking } from '@/lib/services/booking/create-booking';
import { getBooking } from '@/lib/services/booking/get-booking';
import { refreshBookings } from '@/lib/services/booking/refresh-bookings';
import { addNote, decideBooking, escalateBooking, setSurgeryDay } from '@/lib/services/booking-entry/write-entry';
import { listHistory } from '@/lib/services/booking-entry/list-history';
import { exportMoves, getOpenMove, listMoves } from '@/lib/services/move-proposal/list-moves';
import { proposeMove } from '@/lib/services/move-proposal/propose-move';
import { proposeMoves } from '@/lib/services/move-proposal/propose-moves';
import { suggestPlaces } from '@/lib/services/move-proposal/suggest-places';
import { withdrawMove } from '@/lib/services/move-proposal/withdraw-move';
import { getPreCheck } from '@/lib/services/pre-check/get-pre-check';
import { getWeek } from '@/lib/services/pre-check/get-week';
import { exportBookings, listBookingTable } from '@/lib/services/pre-check/list-booking-table';
import { readQuestion } from '@/lib/services/pre-check/read-question';
import { recheckBookings } from '@/lib/services/pre-check/recheck-bookings';
import { addSessions, removeSession } from '@/lib/services/scanner-session/change-sessions';
import { listSessions } from '@/lib/services/scanner-session/list-sessions';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { recordReadings } from '@/lib/services/size-reading/record-readings';
import { countQueries } from '@/tests/support/count-queries';
import { as, equipSite, NOW, scannerForm, type EquippedSite } from '@/tests/support/equipped-site';
import { KNOWN } from '@/tests/support/pre-check-questions';

async function sizeAll({ radiographer }: EquippedSite, bookingId: string, overrides: Partial<Record<keyof typeof KNOWN, number>> = {}, now = NOW) {
  const readings = Object.entries({ ...KNOWN, ...overrides }).map(([quantity, value]) => ({ quantity, value, source: 'measured', spread: 0, takenOn: '2026-05-02' }));
  return recordReadings({ ...as(radiographer), now }, { bookingId, readings });
}

const run = ({ site }: EquippedSite, now = NOW) => refreshBookings({ siteId: site.siteId }, now);
const checks = ({ site, booking }: EquippedSite) =>
  site.withApp((trx) => trx.selectFrom('check_result').select(['number', 'result', 'input_hash']).where('site_id', '=', site.siteId).where('booking_id', '=', booking.id).orderBy('number').execute());
const failsWith = (code: string) => (error: unknown) => error instanceof ServiceError && error.code === code;
const days = { from: '2026-05-01', to: '2026-05-31' };

describe('a check in the background', () => {
  it('is what the pure function says of the stored rows, once for one question', async () => {
    const here = await equipSite();
    await sizeAll(here, here.booking.id);
    expect(await run(here)).toBe(1);
    const setup = await inTransaction(here.site.siteId, (trx) => readQuestion(trx, here.site.siteId, here.booking.id));
    const view = (await getPreCheck(as(here.coordinator), { bookingId: here.booking.id }))!;
    const { number, checkedAt, stale, ...stored } = view;
    expect(stored).toEqual(JSON.parse(JSON.stringify(roundAnswer(preCheck(setup!.question)))));
    expect({ number, checkedAt, stale }).toEqual({ number: 1, checkedAt: NOW.toISOString(), stale: false });

    await recheckBookings(as(here.coordinator), { bookingIds: [here.booking.id] });
    expect((await getBooking(as(here.coordinator), { id: here.booking.id })).stale).toBe(true);
    expect(await run(here)).toBe(1);
    expect(await checks(here)).toHaveLength(1);
    // The newest reading counts: of two taken in one moment either could be it.
    const later = new Date(NOW.getTime() + 1000);
    await sizeAll(here, here.booking.id, { 'weight-kg': 230 }, later);
    await run(here, later);
    expect((await checks(here)).map(({ number: one, result }) => [one, result])).toEqual([[1, view.result], [2, 'escalate']]);
  });

  it('two at once write one result', async () => {
    const here = await equipSite();
    await Promise.all([run(here), run(here)]);
    expect(await checks(here)).toHaveLength(1);
  });

  it('follows surgery, sessions and another scanner', async () => {
    const here = await equipSite();
    await sizeAll(here, here.booking.id, { 'weight-kg': 230 });
    await run(here);
    const result = async () => (await getBooking(as(here.coordinator), { id: here.booking.id }));
    expect(await result()).toMatchObject({ result: 'escalate', stale: false });
    await createScanner(as(here.lead), scannerForm({ name: 'Scanner B', limits: { tableLimitKg: 300 } }));
    expect((await result()).stale).toBe(true);
    await run(here);
    expect(await result()).toMatchObject({ result: 'another-scanner', next: { kind: 'propose', text: 'Propose Scanner B' } });
    await setSurgeryDay(as(here.radiographer), { bookingId: here.booking.id, surgeryOn: '2026-05-03' });
    await run(here);
    expect(await result()).toMatchObject({ result: 'size-needed', surgeryOn: '2026-05-03' });
  });
});

describe('moves', () => {
  async function moving() {
    const here = await equipSite();
    const other = await createScanner(as(here.lead), scannerForm({ name: 'Scanner B', limits: { tableLimitKg: 300 } }));
    await sizeAll(here, here.booking.id, { 'weight-kg': 230 });
    await run(here);
    return { here, other };
  }
  const noon = '2026-05-05T12:00:00.000Z';

  it('room is unknown without sessions, and sessions without bookings and proposed moves with them', async () => {
    const { here, other } = await moving();
    const before = await suggestPlaces(as(here.coordinator), { bookingId: here.booking.id });
    expect(before.scanners.find(({ scannerId }) => scannerId === other.id)).toMatchObject({ standing: 'fits' });
    expect(before.scanners.every(({ starts }) => starts === undefined)).toBe(true);
    expect(before.scanners.find(({ scannerId }) => scannerId === here.scanner.id)).toMatchObject({ standing: 'ruled-out' });

    await addSessions(as(here.coordinator), { scannerId: other.id, sessions: [{ startsAt: noon, endsAt: '2026-05-05T14:00:00Z' }] });
    const [first] = (await suggestPlaces(as(here.coordinator), { bookingId: here.booking.id })).scanners.find(({ scannerId }) => scannerId === other.id)!.starts!;
    expect(first).toBe(noon);
    await proposeMove(as(here.coordinator), { bookingId: here.booking.id, scannerId: other.id, scheduledAt: noon, slotMinutes: before.slotMinutes });
    const [session] = await listSessions(as(here.coordinator), { from: new Date('2026-05-05T00:00:00Z'), before: new Date('2026-05-06T00:00:00Z') });
    expect(session).toMatchObject({ minutes: 120, minutesFree: 120 - before.slotMinutes });
  });

  it('are not offered within two hours nor off the hour first, and a sooner one can still be typed', async () => {
    const { here, other } = await moving();
    const now = new Date('2026-05-05T12:07:00Z');
    await addSessions(as(here.coordinator), { scannerId: other.id, sessions: [{ startsAt: noon, endsAt: '2026-05-05T20:00:00Z' }, { startsAt: '2026-05-06T08:00:00Z', endsAt: '2026-05-06T12:00:00Z' }] });
    const asked = async (at: Date) => {
      const found = await suggestPlaces({ actor: here.coordinator, now: at }, { bookingId: here.booking.id });
      return { starts: found.scanners.find(({ scannerId }) => scannerId === other.id)!.starts, slotMinutes: found.slotMinutes };
    };
    const { starts, slotMinutes } = await asked(now);
    expect(starts).toEqual(['2026-05-05T15:00:00.000Z', '2026-05-06T08:00:00.000Z']);
    expect((await asked(new Date(noon))).starts![0]).toBe('2026-05-05T14:00:00.000Z');
    const soon = '2026-05-05T12:15:00.000Z';
    expect(await proposeMove({ actor: here.coordinator, now }, { bookingId: here.booking.id, scannerId: other.id, scheduledAt: soon, slotMinutes })).toMatchObject({ proposed: { scheduledAt: soon } });
  });

  it('are a task until the API says the same, and are shown side by side while it says something else', async () => {
    const { here, other } = await moving();
    const place = { scannerId: other.id, scheduledAt: noon, slotMinutes: 45 };
    await proposeMove(as(here.coordinator), { bookingId: here.booking.id, ...place, reason: '=cmd|x' });
    expect(await getBooking(as(here.coordinator), { id: here.booking.id })).toMatchObject({ moveProposed: true, scannerId: here.scanner.id, version: 1 });
    expect((await listMoves(as(here.coordinator))).open).toMatchObject([{ accession: 'AB-1234', differs: false, proposed: place }]);
    expect(await exportMoves(as(here.coordinator))).toContain("'=cmd|x");

    const body = { expectedVersion: 1, protocolId: here.protocol.id, ...place, scheduledAt: '2026-05-05T13:00:00.000Z' };
    await changeBooked(as(here.lead), { id: here.booking.id, body });
    expect(await getOpenMove(as(here.coordinator), { bookingId: here.booking.id })).toMatchObject({ differs: true, booked: { scheduledAt: body.scheduledAt } });
    await expect(changeBooked(as(here.lead), { id: here.booking.id, body })).rejects.toSatisfy(failsWith('conflict'));
    await changeBooked(as(here.lead), { id: here.booking.id, body: { ...body, ...place, expectedVersion: 2 } });
    expect(await getOpenMove(as(here.coordinator), { bookingId: here.booking.id })).toBeNull();
    expect((await listMoves(as(here.coordinator))).settled).toMatchObject([{ status: 'agreed' }]);
    const kinds = (await listHistory(as(here.radiologist), { bookingId: here.booking.id })).map(({ kind }) => kind);
    expect(kinds).toEqual(expect.arrayContaining(['move-proposed', 'booked', 'move-agreed', 'result', 'sizes']));
    await run(here);
    expect((await getBooking(as(here.coordinator), { id: here.booking.id })).result).not.toBe('another-scanner');
  });

  it('a second proposal replaces the first; a withdrawn one leaves what is booked', async () => {
    const { here, other } = await moving();
    for (const scheduledAt of [noon, '2026-05-05T15:00:00.000Z']) {
      await proposeMove(as(here.coordinator), { bookingId: here.booking.id, scannerId: other.id, scheduledAt, slotMinutes: 45 });
    }
    expect((await listMoves(as(here.coordinator))).open).toMatchObject([{ proposed: { scheduledAt: '2026-05-05T15:00:00.000Z' } }]);
    await withdrawMove(as(here.coordinator), { bookingId: here.booking.id });
    expect((await getBooking(as(here.coordinator), { id: here.booking.id })).moveProposed).toBe(false);
    await expect(withdrawMove(as(here.coordinator), { bookingId: here.booking.id })).rejects.toSatisfy(failsWith('not-found'));
  });

  it.each([
    ['a scanner that is ruled out', 'scannerId', ({ here }: Awaited<ReturnType<typeof moving>>) => ({ scannerId: here.scanner.id, scheduledAt: noon, slotMinutes: 45 })],
    ['the past', 'scheduledAt', ({ other }: Awaited<ReturnType<typeof moving>>) => ({ scannerId: other.id, scheduledAt: '2026-05-01T12:00:00Z', slotMinutes: 45 })],
    ['what is booked already', 'scheduledAt', ({ here }: Awaited<ReturnType<typeof moving>>) => ({ scannerId: here.scanner.id, scheduledAt: here.booking.scheduledAt, slotMinutes: 40 })],
  ])('to %s are refused beside the field', async (_name, field, place) => {
    const at = await moving();
    const attempt = proposeMove(as(at.here.coordinator), { bookingId: at.here.booking.id, ...place(at) });
    await expect(attempt).rejects.toSatisfy((error) => failsWith('invalid')(error) && field in ((error as ServiceError).fields ?? {}));
    expect((await listMoves(as(at.here.coordinator))).open).toEqual([]);
  });

  it('for many take the soonest free place and say why others have none', async () => {
    const { here, other } = await moving();
    const second = await createBooking(as(here.coordinator), { accession: 'AB-1235', scheduledAt: '2026-05-04T12:40:00Z', slotMinutes: 40, scannerId: here.scanner.id, protocolId: here.protocol.id });
    expect(await proposeMoves(as(here.coordinator), { bookingIds: [here.booking.id, second.id] })).toEqual({
      proposed: 0,
      skipped: [{ accession: 'AB-1234', reason: 'no free place, or room unknown' }, { accession: 'AB-1235', reason: 'its check asks for no move' }],
    });
    await addSessions(as(here.coordinator), { scannerId: other.id, sessions: [{ startsAt: noon, endsAt: '2026-05-05T14:00:00Z' }] });
    expect(await proposeMoves(as(here.coordinator), { bookingIds: [here.booking.id] })).toMatchObject({ proposed: 1, skipped: [] });
    expect((await listMoves(as(here.coordinator))).open).toMatchObject([{ proposed: { scannerId: other.id, scheduledAt: noon } }]);
  });
});

describe('sessions', () => {
  it('that overlap, end before they begin, or are of another site are refused whole', async () => {
    const [here, there] = [await equipSite(), await equipSite()];
    const session = (from: string, to: string) => ({ startsAt: `2026-05-06T${from}:00Z`, endsAt: `2026-05-06T${to}:00Z` });
    const add = (scannerId: string, ...sessions: ReturnType<typeof session>[]) => addSessions(as(here.coordinator), { scannerId, sessions });
    await add(here.scanner.id, session('08:00', '12:00'));
    await expect(add(here.scanner.id, session('13:00', '14:00'), session('11:00', '12:30'))).rejects.toSatisfy(failsWith('invalid'));
    await expect(add(here.scanner.id, session('14:00', '13:00'))).rejects.toSatisfy(failsWith('invalid'));
    await expect(add(there.scanner.id, session('13:00', '14:00'))).rejects.toSatisfy(failsWith('invalid'));
    const found = await listSessions(as(here.coordinator), { from: new Date('2026-05-06T00:00:00Z'), before: new Date('2026-05-07T00:00:00Z') });
    expect(found).toHaveLength(1);
    await expect(removeSession(as(there.coordinator), { id: found[0]!.id })).rejects.toSatisfy(failsWith('not-found'));
    await removeSession(as(here.coordinator), { id: found[0]!.id });
    await add(here.scanner.id, session('08:00', '12:00'));
  });
});

describe('the table', () => {
  it('filters, orders and pages in the database, with the same number of queries however many there are', async () => {
    const here = await equipSite();
    for (let index = 0; index < 12; index += 1) {
      await createBooking(as(here.coordinator), {
        accession: `AB-20${String(index).padStart(2, '0')}`, scheduledAt: `2026-05-${String(5 + (index % 4)).padStart(2, '0')}T${String(8 + index)}:00:00Z`.replace(/T(\d):/, 'T0$1:'),
        slotMinutes: index % 2 === 0 ? 5 : 60, scannerId: here.scanner.id, protocolId: here.protocol.id,
      });
    }
    const all = (await listBookingTable(as(here.coordinator), { ...days, limit: 200 })).bookings;
    expect(all).toHaveLength(13);
    await sizeAll(here, all[2]!.id);
    await sizeAll(here, all[3]!.id, { 'weight-kg': 230 });
    while ((await run(here)) > 0);
    for (const sort of ['time', 'result', 'over', 'changed'] as const) {
      for (const descending of [false, true]) {
        const whole = (await listBookingTable(as(here.coordinator), { ...days, sort, descending, limit: 200 })).bookings.map(({ id }) => id);
        const paged: string[] = [];
        let after: string | undefined;
        do {
          const page = await listBookingTable(as(here.coordinator), { ...days, sort, descending, limit: 4, ...(after ? { after } : {}) });
          paged.push(...page.bookings.map(({ id }) => id));
          after = page.next;
        } while (after);
        expect(paged, `${sort} ${descending}`).toEqual(whole);
        expect(new Set(whole).size).toBe(13);
      }
    }
    const worst = await listBookingTable(as(here.coordinator), { ...days, sort: 'result', descending: true, limit: 1 });
    expect(worst.bookings[0]).toMatchObject({ result: 'escalate' });
    expect(worst.counts).toMatchObject({ escalate: 1 });
    expect(Object.values(worst.counts).reduce((sum, count) => sum + count, 0)).toBe(13);
    expect((await listBookingTable(as(here.coordinator), { ...days, find: 'ab-2003' })).bookings).toHaveLength(1);
    expect((await listBookingTable(as(here.coordinator), { ...days, result: 'escalate' })).bookings.map(({ id }) => id)).toEqual([worst.bookings[0]!.id]);
    await expect(listBookingTable(as(here.coordinator), { ...days, after: 'made up' })).rejects.toSatisfy(failsWith('invalid'));

    const { queries } = await countQueries(() => listBookingTable(as(here.coordinator), { ...days, limit: 200 }));
    // The site's setting, the page and the counts.
    expect(queries).toBe(3);
    const csv = await exportBookings(as(here.coordinator), { filter: { ...days } });
    expect(csv.trim().split('\r\n')).toHaveLength(14);
    await expect(exportBookings(as(here.radiographer), { filter: { ...days } })).rejects.toSatisfy(failsWith('not-found'));
  });
});

describe('the week', () => {
  it('counts by scanner and day, and says what changed in the last 24 hours', async () => {
    const here = await equipSite();
    await sizeAll(here, here.booking.id);
    await run(here);
    const early = await getWeek(as(here.coordinator), { from: '2026-05-04' });
    const cell = early.cells.find(({ day, scannerId }) => day === '2026-05-04' && scannerId === here.scanner.id)!;
    expect(cell).toMatchObject({ bookings: 1, minutesBooked: 40, minutesUnknown: 0 });
    expect(cell.sessionMinutes).toBeUndefined();
    expect(early.days).toHaveLength(7);
    // What came today has no result of yesterday to differ from.
    expect(early).toMatchObject({ changes: [], added: [{ accession: 'AB-1234', before: null }], changeCounts: { added: 1, changed: 0 } });
    expect(cell).toMatchObject({ added: 1, changed: 0 });
    const result = (await getBooking(as(here.coordinator), { id: here.booking.id })).result!;
    expect(cell.results[result]).toBe(1);

    const later = new Date(NOW.getTime() + 30 * 3_600_000);
    await sizeAll(here, here.booking.id, { 'weight-kg': 230 }, later);
    await run(here, later);
    const week = await getWeek({ actor: here.coordinator, now: new Date(later.getTime() + 1000) }, { from: '2026-05-04' });
    expect(week.changes).toMatchObject([{ accession: 'AB-1234', before: result, result: 'escalate' }]);
    expect(week).toMatchObject({ added: [], changeCounts: { added: 0, changed: 1 } });
  });
});

describe('notes', () => {
  it('go between roles, stay as written, and asking a lead is answered by one', async () => {
    const here = await equipSite();
    const bookingId = here.booking.id;
    await addNote(as(here.radiologist), { bookingId, note: 'Left lobe matters most.' });
    await escalateBooking(as(here.coordinator), { bookingId, note: 'No scanner left.' });
    expect((await getBooking(as(here.lead), { id: bookingId })).escalation).toBe('open');
    await expect(escalateBooking(as(here.coordinator), { bookingId, note: 'Again.' })).rejects.toSatisfy(failsWith('conflict'));
    await expect(decideBooking(as(here.coordinator), { bookingId, note: 'Mine.' })).rejects.toSatisfy(failsWith('not-found'));
    await decideBooking(as(here.lead), { bookingId, note: 'Refer to the open scanner in town.' });
    const lines = await listHistory(as(here.radiographer), { bookingId });
    expect(lines.filter(({ note }) => note).map(({ kind, roles }) => [kind, roles?.[0]]).sort()).toEqual([['decided', 'lead'], ['escalated', 'coordinator'], ['note', 'radiologist']]);
    await expect(addNote(as(here.radiologist), { bookingId, note: '  ' })).rejects.toSatisfy(failsWith('invalid'));
    const educator = await here.site.person('educator');
    await expect(addNote(as(educator), { bookingId, note: 'Hello.' })).rejects.toSatisfy(failsWith('not-found'));
  });

  it('two who ask, or decide, in the same moment: one does, the other is told', async () => {
    const here = await equipSite();
    const bookingId = here.booking.id;
    const ask = (note: string) => escalateBooking(as(here.coordinator), { bookingId, note });
    const decide = (note: string) => decideBooking(as(here.lead), { bookingId, note });
    for (const act of [ask, decide]) {
      const done = await Promise.allSettled(['one', 'two', 'three'].map(act));
      expect(done.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
      for (const each of done) if (each.status === 'rejected') expect(each.reason).toMatchObject({ code: 'conflict' });
    }
    // Notes are not taken turns for: all stay.
    await Promise.all(['a', 'b'].map((note) => addNote(as(here.radiologist), { bookingId, note })));
    const lines = await listHistory(as(here.radiographer), { bookingId });
    expect(lines.filter(({ note }) => note).map(({ kind }) => kind).sort()).toEqual(['decided', 'escalated', 'note', 'note']);
  });

  it('of another site are neither read nor written', async () => {
    const [here, there] = [await equipSite(), await equipSite()];
    await expect(addNote(as(there.coordinator), { bookingId: here.booking.id, note: 'Hello.' })).rejects.toSatisfy(failsWith('not-found'));
    await expect(listHistory(as(there.coordinator), { bookingId: here.booking.id })).rejects.toSatisfy(failsWith('not-found'));
    await expect(recheckBookings(as(there.coordinator), { bookingIds: [here.booking.id] })).rejects.toSatisfy(failsWith('not-found'));
    await expect(suggestPlaces(as(there.coordinator), { bookingId: here.booking.id })).rejects.toSatisfy(failsWith('not-found'));
  });
});
