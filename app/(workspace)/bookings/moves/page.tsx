import type { Metadata } from 'next';
import { BookingViews } from '@/components/booking/booking-views';
import { MoveTasks } from '@/components/booking/move-tasks';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { listMoves } from '@/lib/services/move-proposal/list-moves';

export const metadata: Metadata = { title: 'Moves' };

export default async function MovesPage() {
  const { open, settled, mayExport } = await loadPage(async (context) => ({
    ...(await listMoves(context)),
    mayExport: mayAttempt(context.actor, 'booking.export'),
  }));
  return (
    <PageBody wide>
      <PageHeader
        title="Moves"
        lead="Change these in your booking system. Each closes by itself when an import or the API shows the proposed place."
        actions={mayExport && open.length > 0 && <LinkButton href="/bookings/moves/export" prefetch={false}>Download as CSV</LinkButton>}
      />
      <BookingViews current="moves" />
      {open.length === 0 ? (
        <EmptyState title="Nothing to change">Moves are proposed on the page of a booking, or for many at once in the list.</EmptyState>
      ) : (
        <MoveTasks moves={open} caption="Moves to make in the booking system" />
      )}
      {settled.length > 0 && (
        <>
          <h2 className="mt-8 mb-3 text-xl">Settled last</h2>
          <MoveTasks moves={settled} caption="Moves settled last" settled />
        </>
      )}
    </PageBody>
  );
}
