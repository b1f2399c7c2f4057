import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { GET as listBookings, POST as createBooking } from '@/app/api/v1/bookings/route';
import { POST as startImport } from '@/app/api/v1/imports/route';
import { POST as stageRows } from '@/app/api/v1/imports/[id]/rows/route';
import { PUT as savePlan } from '@/app/api/v1/plans/[id]/route';
import { SCOPES } from '@/lib/domain/access';
import { SAVE_PLAN_EXAMPLES } from '@/lib/schemas/openapi/examples';
import { tokenFor } from '@/tests/support/api-token';
import { equipSite, type EquippedSite } from '@/tests/support/equipped-site';

type Handler = typeof savePlan;
let here: EquippedSite;
let token: string;
beforeAll(async () => {
  here = await equipSite();
  token = await tokenFor(here.site, [...SCOPES]);
});

async function call(handler: Handler, { id = '', query = '', body }: { id?: string; query?: string; body?: unknown }) {
  const response = await handler(
    new Request(`http://127.0.0.1:3000/api/v1/things${query}`, {
      method: body === undefined ? 'GET' : 'POST',
      headers: { authorization: `Bearer ${token}`, 'content-type': 'application/json', 'idempotency-key': randomUUID() },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    }),
    { params: Promise.resolve({ id }) },
  );
  return { status: response.status, answer: await response.json() };
}

/** No UTF-8 holds half of a pair, no text of the database the character 0. */
const UNSTORABLE = ['a\u0000b', '\ud83d', 'x\udc00'];
/** The pair whole, writing from right to left, combining marks. */
const STORABLE = ['\ud83d\ude42', 'שלום', 'e\u0301', '=1+1'];

describe('text that cannot be stored', () => {
  const planWith = (note: string, name: string) => {
    const { expectedVersion, plan } = structuredClone(SAVE_PLAN_EXAMPLES.plan.value);
    const [only] = plan.sequences;
    const sequences = [{ ...only!, prescription: { ...only!.prescription, name } }];
    return { expectedVersion, plan: { ...plan, scannerId: here.scanner.id, note, sequences } };
  };

  it.each(UNSTORABLE)('%j is refused with the field’s name, in columns and in documents', async (text) => {
    const inNote = await call(savePlan, { id: randomUUID(), body: planWith(text, 'Only') });
    expect(inNote).toMatchObject({ status: 422, answer: { fields: { 'plan.note': expect.stringContaining('allowed') } } });
    const inName = await call(savePlan, { id: randomUUID(), body: planWith('', text) });
    expect(inName).toMatchObject({ status: 422, answer: { fields: { 'plan.sequences.0.prescription.name': expect.stringContaining('allowed') } } });
  });

  it.each(STORABLE)('%j is kept as it was written', async (text) => {
    const { status, answer } = await call(savePlan, { id: randomUUID(), body: planWith(text, text) });
    expect({ status, note: answer.note, name: answer.sequences[0].prescription.name }).toEqual({ status: 200, note: text, name: text });
  });

  it('is refused as a key of an import’s settings too', async () => {
    const settings = (name: string) => ({
      schemaVersion: 1, columns: { accession: 'Number' }, units: {}, dateOrder: 'day-first', source: 'measured', scanners: { [name]: here.scanner.id }, protocols: {},
    });
    expect((await call(startImport, { body: { id: randomUUID(), format: 'csv', settings: settings('\ud83d') } })).status).toBe(422);
    expect((await call(startImport, { body: { id: randomUUID(), format: 'csv', settings: settings('Scanner “A”') } })).status).toBe(201);
  });
});

describe('moments no booking has', () => {
  const row = (scheduledAt: string, accession = 'AB-4001') => ({
    accession, scheduledAt, slotMinutes: 40, scannerId: here.scanner.id, protocolId: here.protocol.id,
  });

  it('are refused, typed or imported; the first and last that are taken are', async () => {
    const importId = randomUUID();
    await call(startImport, { body: { id: importId, format: 'csv' } });
    const stage = (scheduledAt: string) => call(stageRows, { id: importId, body: { rows: [{ number: 1, readings: [], ...row(scheduledAt) }] } });
    for (const moment of ['0000-01-01T00:00:00Z', '1999-12-31T23:59:59Z', '2200-01-01T00:00:00Z', '9999-12-31T23:59:59Z', '2026-02-30T10:00:00Z']) {
      const typed = await call(createBooking, { body: row(moment) });
      expect(typed, moment).toMatchObject({ status: 422, answer: { fields: { scheduledAt: expect.stringContaining('2000 to 2199') } } });
      expect((await stage(moment)).status, moment).toBe(422);
    }
    expect((await stage('2199-12-31T23:59:59Z')).status).toBe(200);
    expect((await call(createBooking, { body: row('2000-01-01T00:00:00+14:00') })).status).toBe(201);
  });
});

describe('a cursor', () => {
  const ask = (after: string) => call(listBookings, { query: `?from=2026-05-01&limit=1&after=${encodeURIComponent(after)}` });

  it.each([
    '2026-99-99T99:99:99.999Z_00000000-0000-4000-8000-000000000000',
    '2026-02-30T00:00:00.000Z_00000000-0000-4000-8000-000000000000',
    '2026-05-04T00:00:00.000Z_------------------------------------',
    '2026-05-04T00:00:00.000Z_00000000-0000-4000-8000-000000000000_x',
    '\u0000', '_', '',
  ])('that no page gave is refused: %j', async (after) => {
    expect(await ask(after)).toMatchObject({ status: 422, answer: { fields: { after: expect.stringContaining('allowed') } } });
  });

  it('that a page gave leads to the next', async () => {
    const booked = await call(createBooking, { body: { accession: 'AB-4100', scheduledAt: '2026-05-06T10:40:00Z', slotMinutes: 40, scannerId: here.scanner.id, protocolId: here.protocol.id } });
    const first = await call(listBookings, { query: '?from=2026-05-01&limit=1' });
    expect(first.answer.bookings).toMatchObject([{ id: here.booking.id }]);
    expect((await ask(first.answer.next)).answer.bookings).toMatchObject([{ id: booked.answer.id }]);
  });
});
