import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { BookingForm } from '@/components/booking/booking-form';
import { SetupNeeded } from '@/components/booking/setup-needed';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { listProtocols } from '@/lib/services/protocol/list-protocols';
import { listScanners } from '@/lib/services/scanner/list-scanners';
import { getSite } from '@/lib/services/site/get-site';
import { addBooking } from '../actions';

export const metadata: Metadata = { title: 'Add a booking' };

export default async function NewBookingPage() {
  const { actor, site, scanners, protocols } = await loadPage(async (context) => ({
    actor: context.actor,
    site: await getSite(context),
    scanners: await listScanners(context),
    protocols: await listProtocols(context),
  }));
  if (!mayAttempt(actor, 'booking.create')) notFound();
  return (
    <PageBody narrow>
      <PageHeader
        title="Add a booking"
        lead="Only what planning needs. Sizes are entered afterwards, or asked for."
        back={{ href: '/bookings', label: 'Bookings' }}
      />
      {scanners.length === 0 || protocols.length === 0 ? (
        <SetupNeeded scanner={scanners.length === 0} mayEdit={mayAttempt(actor, 'scanner.edit')} />
      ) : (
        <BookingForm
          scanners={scanners.map(({ id, scanner }) => ({ value: id, label: scanner.name }))}
          protocols={protocols.map(({ id, name }) => ({ value: id, label: name }))}
          mask={site.accessionMask}
          day={dayKey(new Date())}
          add={addBooking}
        />
      )}
    </PageBody>
  );
}
