import { beforeAll, describe, expect, it } from 'vitest';
import { POST } from '@/app/api/v1/bookings/route';
import { createApiToken } from '@/lib/services/api-token/create-api-token';
import { listBookings } from '@/lib/services/booking/list-bookings';
import { getSizeRecord } from '@/lib/services/size-reading/get-size-record';
import { as, equipSite, type EquippedSite } from '@/tests/support/equipped-site';

const PLANTED = ['Adelheid Quarrington', '1961-04-12', 'do not tell her sister', 'Patient/p1'];

let here: EquippedSite;
let secret: string;
beforeAll(async () => {
  here = await equipSite();
  secret = (await createApiToken({ actor: here.lead }, { name: 'Bundles', scopes: ['bookings:write'], days: 1 })).secret;
});

const bundleOf = (accession: string, protocol = here.protocol.name) => ({
  resourceType: 'Bundle', type: 'collection',
  entry: [
    { resource: { resourceType: 'Patient', id: 'p1', name: [{ text: PLANTED[0] }], birthDate: PLANTED[1] } },
    { resource: { resourceType: 'ServiceRequest', id: 's1', note: [{ text: PLANTED[2] }], code: { text: protocol }, identifier: [{ type: { coding: [{ code: 'ACSN' }] }, value: accession }] } },
    {
      resource: {
        resourceType: 'Appointment', status: 'booked', start: '2026-05-06T10:40:00Z', minutesDuration: 45, description: PLANTED[2], basedOn: [{ reference: 'ServiceRequest/s1' }],
        participant: [{ actor: { reference: 'Patient/p1', display: PLANTED[0] } }, { actor: { reference: 'Device/x', display: here.scanner.scanner.name } }],
      },
    },
    {
      resource: {
        resourceType: 'Observation', status: 'final', subject: { reference: 'Patient/p1' }, basedOn: [{ reference: 'ServiceRequest/s1' }], effectiveDateTime: '2026-05-01',
        code: { coding: [{ system: 'http://loinc.org', code: '8280-0' }] }, valueQuantity: { value: 131, system: 'http://unitsofmeasure.org', code: 'cm' },
      },
    },
  ],
});
const send = (body: unknown, type = 'application/fhir+json', token = secret) =>
  POST(
    new Request('http://127.0.0.1:3000/api/v1/bookings', {
      method: 'POST', headers: { authorization: `Bearer ${token}`, 'content-type': type }, body: JSON.stringify(body),
    }),
    { params: Promise.resolve({}) },
  );

describe('POST /api/v1/bookings with a FHIR bundle', () => {
  it('books it, keeps sizes with the tape’s place, and writes nothing that is not on the list', async () => {
    const response = await send(bundleOf('BU-0001'));
    expect(response.status).toBe(200);
    expect(await response.json()).toMatchObject({ created: 1, changed: 0, same: 0, skipped: [] });
    const { bookings } = await listBookings(as(here.coordinator), { from: '2026-05-06', to: '2026-05-06' });
    const { readings } = await getSizeRecord(as(here.coordinator), { bookingId: bookings[0]!.id });
    expect(readings).toMatchObject([{ quantity: 'girth-cm', value: 131, source: 'measured', tapeSite: 'umbilicus' }]);
    const stored = await here.site.withApp(async (trx) => [
      await trx.selectFrom('import_row').selectAll().where('site_id', '=', here.site.siteId).execute(),
      await trx.selectFrom('audit_event').selectAll().where('site_id', '=', here.site.siteId).execute(),
      await trx.selectFrom('size_reading').selectAll().where('site_id', '=', here.site.siteId).execute(),
    ]);
    for (const text of PLANTED) expect(JSON.stringify(stored)).not.toContain(text);
    expect(await (await send(bundleOf('BU-0001'))).json()).toMatchObject({ created: 0, changed: 0, same: 1 });
  });

  it('answers why an entry is left out without quoting it', async () => {
    const text = await (await send(bundleOf(PLANTED[0]!))).text();
    expect(JSON.parse(text)).toMatchObject({ created: 0, skipped: [{ number: 3, reason: expect.stringContaining('Accession number') }] });
    for (const planted of PLANTED) expect(text).not.toContain(planted);
  });

  it('refuses what is no bundle, and a token without the scope', async () => {
    expect((await send({ resourceType: 'Patient', name: PLANTED[0] })).status).toBe(422);
    const { secret: reader } = await createApiToken({ actor: here.lead }, { name: 'Reader', scopes: ['bookings:read'], days: 1 });
    expect((await send(bundleOf('BU-0002'), 'application/fhir+json', reader)).status).toBe(404);
  });
});
