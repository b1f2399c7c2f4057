import type { Metadata } from 'next';
import { ImportView } from '@/components/booking/import/import-view';
import { SetupNeeded } from '@/components/booking/setup-needed';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { openImport } from '@/lib/services/import/open-import';

export const metadata: Metadata = { title: 'Bring bookings in' };

const SLOT_MINUTES = 45;

export default async function ImportPage() {
  const { view, mayEdit } = await loadPage(async (context) => ({
    view: await openImport(context),
    mayEdit: mayAttempt(context.actor, 'scanner.edit'),
  }));
  return (
    <PageBody>
      <PageHeader
        title="Bring bookings in"
        lead="From a file of your booking system. What is booked there decides; sizes are added, none is overwritten."
        back={{ href: '/bookings', label: 'Bookings' }}
      />
      {view.scanners.length === 0 || view.protocols.length === 0 ? (
        <SetupNeeded scanner={view.scanners.length === 0} mayEdit={mayEdit} />
      ) : (
        // Wall-clock times are those of the site, whose zone this server keeps.
        <ImportView {...view} zone={Intl.DateTimeFormat().resolvedOptions().timeZone} slotMinutes={SLOT_MINUTES} />
      )}
    </PageBody>
  );
}
