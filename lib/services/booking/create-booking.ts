import { inTransaction, type SiteTransaction } from '@/db/client';
import { accessionTaken, findBooking, insertBooking } from '@/db/queries/booking/bookings';
import { findProtocol } from '@/db/queries/protocol/protocols';
import { findScanner } from '@/db/queries/scanner/scanners';
import { findSite } from '@/db/queries/site/sites';
import { authorise } from '@/lib/domain/access';
import { accessionRefusal } from '@/lib/domain/booking/accession';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import type { BodyRegion } from '@/lib/domain/case/model';
import { type BookingListItem, type CreateBooking, createBookingInput } from '@/lib/schemas/booking';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { nowOf, type ServiceContext } from '../context';
import { orNameTaken } from '../name-taken';
import { bookingsChanged } from '../pre-check/mark-changed';
import { toBookingListItem } from './to-booking-view';

async function requireAccession(trx: SiteTransaction, siteId: string, accession: string): Promise<void> {
  const site = await findSite(trx, siteId);
  if (!site) throw new ServiceError('not-found');
  const refusal = accessionRefusal(accession, site.accessionMask);
  if (refusal) throw invalidField('accession', refusal);
  if (await accessionTaken(trx, siteId, accession)) {
    throw invalidField('accession', `${accession} is booked already; open that booking instead`);
  }
}

async function requireSetup(trx: SiteTransaction, siteId: string, form: CreateBooking): Promise<BodyRegion> {
  const scanner = await findScanner(trx, siteId, form.scannerId);
  if (!scanner || scanner.archivedAt) throw invalidField('scannerId', 'not a scanner in use here; allowed: one of the site’s scanners');
  const protocol = await findProtocol(trx, siteId, form.protocolId);
  if (!protocol || protocol.archivedAt) throw invalidField('protocolId', 'not a protocol in use here; allowed: one of the site’s protocols');
  return protocol.document.region;
}

/** A booking under its accession number: no name, no date of birth, nothing else about the person. */
export async function createBooking(context: ServiceContext, input: unknown): Promise<BookingListItem> {
  const { actor } = context;
  authorise(actor, 'booking.create');
  const form = parseInput(createBookingInput, input);
  const { siteId } = actor;
  return orNameTaken('accession', form.accession, () =>
    inTransaction(siteId, async (trx) => {
      await requireAccession(trx, siteId, form.accession);
      const region = await requireSetup(trx, siteId, form);
      const { accession, slotMinutes, scannerId, protocolId } = form;
      const booking = {
        siteId, accession, slotMinutes, scannerId, protocolId, region,
        scheduledAt: new Date(form.scheduledAt),
        source: actor.kind === 'token' ? ('api' as const) : ('typed' as const),
      };
      const id = await insertBooking(trx, booking, nowOf(context));
      await recordAudit(trx, context, { action: 'booking.create', subjectType: 'booking', subjectId: id, fields: ['created'] });
      await bookingsChanged(trx, siteId, [id], nowOf(context));
      const created = await findBooking(trx, siteId, id);
      authorise(actor, 'booking.create', created);
      return toBookingListItem(created);
    }),
  );
}
