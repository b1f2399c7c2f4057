import type { ImportedReading } from '@/lib/domain/import/import-row';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import { readObservation, type Observed } from './read-observation';
import { asList, asObject, asText, codingsOf, type Json, namesOf } from './values';

/** An appointment of a bundle with what is allowed of it; scanner and protocol are still the sender's words. */
export interface BundleBooking {
  /** Place of the Appointment in the bundle, from 1. */
  readonly number: number;
  readonly accession: string;
  readonly scheduledAt: string;
  readonly slotMinutes: number;
  readonly scannerNames: readonly string[];
  readonly protocolNames: readonly string[];
  readonly readings: readonly ImportedReading[];
}

export interface BundleContent {
  readonly bookings: readonly BundleBooking[];
  readonly skipped: readonly { readonly number: number; readonly reason: string }[];
}

export class BundleError extends Error {
  override readonly name = 'BundleError';
}

export const MAX_BUNDLE_ENTRIES = 20_000;
const BOOKED = new Set(['booked', 'pending', 'proposed', 'arrived', 'checked-in', 'waitlist']);
const MOMENT = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d{1,9})?)?(Z|[+-]\d{2}:\d{2})$/;

interface Entry {
  readonly number: number;
  readonly resource: Json;
  readonly keys: readonly string[];
}

function entriesOf(bundle: unknown): Entry[] {
  const { resourceType, entry } = asObject(bundle);
  if (resourceType !== 'Bundle') throw new BundleError('Not a FHIR bundle; allowed: a resource of type Bundle (R4)');
  if (entry !== undefined && !Array.isArray(entry)) throw new BundleError('The bundle’s entry is not a list');
  const list = asList(entry);
  if (list.length > MAX_BUNDLE_ENTRIES) throw new BundleError(`${list.length} entries given; allowed: up to ${MAX_BUNDLE_ENTRIES} in one bundle`);
  return list.map(({ fullUrl, resource }, index) => {
    const body = asObject(resource);
    const id = asText(body.id);
    const keys = [asText(fullUrl), id && `${asText(body.resourceType)}/${id}`].filter((key) => key !== '');
    return { number: index + 1, resource: body, keys };
  });
}

const referenceOf = (value: unknown): string => asText(asObject(value).reference);

/** The accession number: the identifier that says it is one (type ACSN), never another identifier of the order. */
function accessionOf(...resources: readonly Json[]): string {
  for (const { identifier } of resources) {
    const found = asList(identifier).find(({ type }) => codingsOf(type).some(({ code }) => code === 'ACSN'));
    if (found) return asText(found.value).trim();
  }
  return '';
}

function minutesOf({ start, end, minutesDuration }: Json): number | undefined {
  if (typeof minutesDuration === 'number' && Number.isInteger(minutesDuration)) return minutesDuration;
  return MOMENT.test(asText(end)) ? (Date.parse(asText(end)) - Date.parse(asText(start))) / 60_000 : undefined;
}

function scannerNames({ participant }: Json): string[] {
  return asList(participant)
    .map(({ actor }) => asObject(actor))
    .filter(({ reference }) => /^(Device|Location)\//.test(asText(reference)))
    .flatMap(({ reference, display }) => [asText(display), asText(reference).replace(/^\w+\//, '')])
    .filter((name) => name !== '');
}

/** The weight a body mass index and a height come to, where no weight was observed. */
function withWeight(observed: readonly Observed[]): ImportedReading[] {
  const readings = observed.flatMap((one): ImportedReading[] =>
    one.quantity === 'body-mass-index' ? [] : [{ ...one, quantity: one.quantity, source: 'measured' }]);
  const index = observed.find(({ quantity }) => quantity === 'body-mass-index');
  const height = readings.find(({ quantity }) => quantity === 'height-cm');
  if (!index || !height || readings.some(({ quantity }) => quantity === 'weight-kg')) return readings;
  const value = Math.round(index.value * (height.value / 100) ** 2 * 10) / 10;
  const { min, max } = QUANTITY_FACTS['weight-kg'];
  if (value < min || value > max) return readings;
  return [...readings, { quantity: 'weight-kg', value, source: 'reported', ...(index.takenOn ? { takenOn: index.takenOn } : {}) }];
}

/** Sizes by what they hang on: the order they were taken for, else the person of the bundle. Neither leaves. */
function collectSizes(entries: readonly Entry[], skipped: { number: number; reason: string }[]): Map<string, Observed[]> {
  const sizes = new Map<string, Observed[]>();
  for (const { number, resource } of entries) {
    if (resource.resourceType !== 'Observation') continue;
    const read = readObservation(resource);
    if (!read) continue;
    if ('skipped' in read) {
      skipped.push({ number, reason: read.skipped });
      continue;
    }
    const on = [...asList(resource.basedOn), asObject(resource.subject)].map(referenceOf).find((reference) => reference !== '');
    if (on) sizes.set(on, [...(sizes.get(on) ?? []), read.observed]);
    else skipped.push({ number, reason: 'Observation: neither basedOn nor subject says whose size it is' });
  }
  return sizes;
}

function readAppointment(appointment: Entry, order: Entry | undefined, sizes: Map<string, Observed[]>): BundleBooking | { skipped: string } {
  const { resource, number } = appointment;
  if (!BOOKED.has(asText(resource.status))) return { skipped: 'Appointment: its status is not one of a booking that stands' };
  const start = asText(resource.start);
  if (!MOMENT.test(start) || !Number.isFinite(Date.parse(start))) return { skipped: 'Appointment: start is no moment with its offset' };
  const slotMinutes = minutesOf(resource);
  if (slotMinutes === undefined) return { skipped: 'Appointment: neither minutesDuration nor end says how long' };
  const accession = accessionOf(order?.resource ?? {}, resource);
  if (accession === '') return { skipped: 'Appointment: no identifier of type ACSN on it or its ServiceRequest' };
  const person = [referenceOf(order?.resource.subject), ...asList(resource.participant).map(({ actor }) => referenceOf(actor))]
    .filter((reference) => /(^|\/)Patient\//.test(reference) || reference.startsWith('urn:'));
  const hangsOn = [...new Set([...(order?.keys ?? []), ...person])];
  return {
    number, accession, slotMinutes,
    scheduledAt: new Date(start).toISOString(),
    scannerNames: scannerNames(resource),
    protocolNames: [...namesOf(order?.resource.code), ...asList(resource.serviceType).flatMap(namesOf)],
    readings: withWeight(hangsOn.flatMap((key) => sizes.get(key) ?? [])),
  };
}

/**
 * Bookings of a FHIR R4 bundle: Appointment, its ServiceRequest, and Observations by LOINC code in UCUM units. Names,
 * birth dates and every other resource are passed over unread; reasons quote nothing from the bundle but codes of ours.
 */
export function readBundle(bundle: unknown): BundleContent {
  const entries = entriesOf(bundle);
  const orders = new Map(entries.filter(({ resource }) => resource.resourceType === 'ServiceRequest').flatMap((entry) => entry.keys.map((key) => [key, entry] as const)));
  const skipped: { number: number; reason: string }[] = [];
  const sizes = collectSizes(entries, skipped);
  const bookings: BundleBooking[] = [];
  for (const entry of entries) {
    if (entry.resource.resourceType !== 'Appointment') continue;
    const order = asList(entry.resource.basedOn).map((reference) => orders.get(referenceOf(reference))).find((found) => found !== undefined);
    const read = readAppointment(entry, order, sizes);
    if ('skipped' in read) skipped.push({ number: entry.number, reason: read.skipped });
    else bookings.push(read);
  }
  return { bookings, skipped };
}
