import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { matchBookings, readBundle } from '@/lib/fhir';

const PLANTED = ['Adelheid Quarrington', '1961-04-12', 'do not tell her sister'];
const SCANNER = '11111111-1111-4111-8111-111111111111';
const PROTOCOL = '22222222-2222-4222-8222-222222222222';
const matching = { mask: 'HB-####', scanners: { 'room 2': SCANNER }, protocols: { abdomen: PROTOCOL } };

const observation = (code: string, value: number, unit: string, more: object = {}) => ({
  resource: {
    resourceType: 'Observation', status: 'final', code: { coding: [{ system: 'http://loinc.org', code }], text: PLANTED[2] },
    subject: { reference: 'Patient/p1', display: PLANTED[0] }, effectiveDateTime: '2026-11-20T08:00:00+01:00',
    valueQuantity: { value, system: 'http://unitsofmeasure.org', code: unit }, ...more,
  },
});
const appointment = (more: object = {}) => ({
  resource: {
    resourceType: 'Appointment', status: 'booked', start: '2026-12-01T10:40:00+01:00', minutesDuration: 45, comment: PLANTED[2],
    basedOn: [{ reference: 'ServiceRequest/s1' }],
    participant: [{ actor: { reference: 'Patient/p1', display: PLANTED[0] } }, { actor: { reference: 'Device/d1', display: 'Room 2' } }],
    ...more,
  },
});
const order = {
  resource: {
    resourceType: 'ServiceRequest', id: 's1', subject: { reference: 'Patient/p1' }, code: { text: 'Abdomen' }, note: [{ text: PLANTED[2] }],
    identifier: [
      { type: { coding: [{ code: 'PLAC' }] }, value: 'X-1' }, { type: { coding: [{ code: 'ACSN' }] }, value: 'HB-2107' },
    ],
  },
};
const patient = { resource: { resourceType: 'Patient', id: 'p1', name: [{ text: PLANTED[0] }], birthDate: PLANTED[1] } };
const bundle = (...entry: object[]) => ({ resourceType: 'Bundle', type: 'collection', entry });
const rowsOf = (value: unknown) => matchBookings(readBundle(value), matching);

describe('a FHIR bundle', () => {
  it('gives a booking with its sizes in our units, the tape’s place kept', () => {
    const { rows, skipped } = rowsOf(bundle(patient, order, appointment(), observation('29463-7', 308.6, '[lb_av]'), observation('8302-2', 1.72, 'm'), observation('8280-0', 51.2, '[in_i]')));
    expect(skipped).toEqual([]);
    expect(rows).toEqual([{
      number: 3, accession: 'HB-2107', scheduledAt: '2026-12-01T09:40:00.000Z', slotMinutes: 45, scannerId: SCANNER, protocolId: PROTOCOL,
      readings: [
        { quantity: 'weight-kg', value: 140, source: 'measured', takenOn: '2026-11-20' },
        { quantity: 'height-cm', value: 172, source: 'measured', takenOn: '2026-11-20' },
        { quantity: 'girth-cm', value: 130, source: 'measured', takenOn: '2026-11-20', tapeSite: 'umbilicus' },
      ],
    }]);
  });

  it('drops names, birth dates and every text that is not on the list, in rows and in reasons', () => {
    const wrong = { ...appointment({ participant: [] }), resource: { ...appointment({ participant: [] }).resource, basedOn: [{ reference: 'ServiceRequest/s1' }] } };
    const result = JSON.stringify([
      rowsOf(bundle(patient, order, appointment(), observation('56086-2', 130, 'cm'))), rowsOf(bundle(order, wrong)),
      rowsOf(bundle({ resource: { ...order.resource, identifier: [{ type: { coding: [{ code: 'ACSN' }] }, value: PLANTED[0] }] } }, appointment())),
      rowsOf(bundle(order, appointment({ start: PLANTED[2] }), observation('29463-7', 140, PLANTED[2]!))),
    ]);
    for (const text of [...PLANTED, 'Patient/p1', 'X-1']) expect(result).not.toContain(text);
  });

  it('makes a weight of a body mass index and a height only where none was observed', () => {
    const readings = (...more: object[]) => rowsOf(bundle(order, appointment(), observation('39156-5', 47.3, 'kg/m2'), observation('8302-2', 172, 'cm'), ...more)).rows[0]!.readings;
    expect(readings()).toContainEqual({ quantity: 'weight-kg', value: 139.9, source: 'reported', takenOn: '2026-11-20' });
    expect(readings(observation('29463-7', 141, 'kg')).filter(({ quantity }) => quantity === 'weight-kg')).toMatchObject([{ value: 141, source: 'measured' }]);
  });

  it.each([
    ['a cancelled appointment', [order, appointment({ status: 'cancelled' })], /status/],
    ['no order', [appointment()], /ACSN/],
    ['an unknown scanner', [order, appointment({ participant: [{ actor: { reference: 'Device/d9', display: 'Elsewhere' } }] })], /scanner/],
    ['half an hour short of an hour in seconds', [order, appointment({ minutesDuration: 1800 })], /whole minutes/],
    ['a size without a UCUM unit', [order, appointment(), observation('29463-7', 140, 'stone')], /UCUM/],
    ['the same number twice', [order, appointment(), appointment()], /earlier/],
  ])('says why for %s', (_what, entries, reason) => {
    expect(rowsOf(bundle(...entries)).skipped.map(({ reason: text }) => text).join()).toMatch(reason);
  });

  it('takes anything for JSON and answers with rows, reasons or its own error', () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 4 }), fc.jsonValue({ maxDepth: 3 }), (entry, resource) => {
        for (const value of [entry, bundle({ resource } as object), { resourceType: 'Bundle', entry }]) {
          try {
            rowsOf(value);
          } catch (error) {
            expect((error as Error).name).toBe('BundleError');
          }
        }
      }),
      { seed: 20266, numRuns: 300 },
    );
  });
});
