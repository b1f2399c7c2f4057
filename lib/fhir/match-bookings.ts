import { accessionRefusal } from '@/lib/domain/booking/accession';
import { MAX_IMPORT_ROWS, SLOT_MINUTES, type ImportRow, type SkippedRow } from '@/lib/domain/import/import-row';
import { nameKey } from '@/lib/domain/import/read-row';
import type { BundleBooking, BundleContent } from './read-bundle';

export interface BundleMatching {
  readonly mask: string;
  /** Names in lower case, each with the id it means. */
  readonly scanners: Readonly<Record<string, string>>;
  readonly protocols: Readonly<Record<string, string>>;
}

const idOf = (names: readonly string[], ids: Readonly<Record<string, string>>): string | undefined =>
  names.map(nameKey).filter((key) => Object.hasOwn(ids, key)).map((key) => ids[key]).find((id) => id !== undefined && id !== '');

/** Of sizes observed more than once the newest day counts. */
function newest(readings: BundleBooking['readings']): ImportRow['readings'] {
  const found = new Map<string, ImportRow['readings'][number]>();
  for (const reading of readings) {
    const known = found.get(reading.quantity);
    if (!known || (reading.takenOn ?? '') > (known.takenOn ?? '')) found.set(reading.quantity, reading);
  }
  return [...found.values()];
}

function matchOne(booking: BundleBooking, { mask, scanners, protocols }: BundleMatching): ImportRow | string {
  const { number, accession, scheduledAt, slotMinutes } = booking;
  if (accessionRefusal(accession, mask)) return `Accession number: not in the form ${mask}, or like a name or a date`;
  const { min, max } = SLOT_MINUTES;
  if (!Number.isInteger(slotMinutes) || slotMinutes < min || slotMinutes > max) return `Appointment: not ${min} to ${max} whole minutes long`;
  const scannerId = idOf(booking.scannerNames, scanners);
  if (!scannerId) return 'Appointment: no participating Device or Location goes by the name of a scanner of the site';
  const protocolId = idOf(booking.protocolNames, protocols);
  if (!protocolId) return 'ServiceRequest: its code goes by the name of no protocol of the site';
  return { number, accession, scheduledAt, slotMinutes, scannerId, protocolId, readings: newest(booking.readings) };
}

/** The bookings of a bundle on this site's own scanners and protocols; one accession number counts once. */
export function matchBookings({ bookings, skipped }: BundleContent, matching: BundleMatching): { rows: ImportRow[]; skipped: SkippedRow[] } {
  const rows: ImportRow[] = [];
  const left: SkippedRow[] = [...skipped];
  const seen = new Set<string>();
  for (const booking of bookings) {
    const matched = matchOne(booking, matching);
    if (typeof matched === 'string') left.push({ number: booking.number, reason: matched });
    else if (seen.has(matched.accession)) left.push({ number: booking.number, reason: 'Accession number: stands in an earlier entry; the first one counts' });
    else if (rows.length >= MAX_IMPORT_ROWS) left.push({ number: booking.number, reason: `more than ${MAX_IMPORT_ROWS} bookings` });
    else rows.push(matched);
    if (typeof matched !== 'string') seen.add(matched.accession);
  }
  return { rows, skipped: left.sort((a, b) => a.number - b.number) };
}
