import type { Metadata } from 'next';
import { BookingViews } from '@/components/booking/booking-views';
import { dayRange } from '@/components/booking/requested-days';
import { SessionForm } from '@/components/booking/session-form';
import { SessionList } from '@/components/booking/session-list';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { addDays, dayKey, formatDay, formatTime } from '@/lib/presentation/moment';
import { listScanners } from '@/lib/services/scanner/list-scanners';
import { listSessions } from '@/lib/services/scanner-session/list-sessions';
import { addScannerSessions, removeScannerSession } from '../actions';

export const metadata: Metadata = { title: 'Sessions' };

const DAYS = 14;
const midnight = (day: string) => new Date(`${day}T00:00:00`);

export default async function SessionsPage({ searchParams }: { searchParams: Promise<{ from?: string }> }) {
  const { from: asked } = await searchParams;
  const from = asked ? dayRange({ from: asked, to: asked }, new Date()).from : dayKey(new Date());
  const shifted = (days: number) => dayKey(addDays(midnight(from), days));
  const { sessions, scanners, mayEdit } = await loadPage(async (context) => ({
    sessions: await listSessions(context, { from: midnight(from), before: midnight(shifted(DAYS)) }),
    scanners: await listScanners(context),
    mayEdit: mayAttempt(context.actor, 'scanner-session.edit'),
  }));
  const rows = sessions.map(({ startsAt, endsAt, scannerName, ...session }) => ({
    ...session, scanner: scannerName, day: formatDay(new Date(startsAt)), span: `${formatTime(new Date(startsAt))}–${formatTime(new Date(endsAt))}`,
  }));
  return (
    <PageBody wide>
      <PageHeader
        title="Sessions"
        lead={`When each scanner is staffed: room is sessions without bookings and proposed moves. ${formatDay(midnight(from))} to ${formatDay(midnight(shifted(DAYS - 1)))}.`}
        actions={<><LinkButton href={`/bookings/sessions?from=${shifted(-DAYS)}`}>Earlier fortnight</LinkButton><LinkButton href={`/bookings/sessions?from=${shifted(DAYS)}`}>Later fortnight</LinkButton></>}
      />
      <BookingViews current="sessions" />
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[minmax(0,9fr)_minmax(0,5fr)]">
        {rows.length === 0
          ? <EmptyState title="No session on these days">Without sessions the room on a scanner is unknown.</EmptyState>
          : <SessionList rows={rows} remove={mayEdit ? removeScannerSession : undefined} />}
        {mayEdit && <SessionForm scanners={scanners.map(({ id, scanner }) => ({ value: id, label: scanner.name }))} day={from} add={addScannerSessions} />}
      </div>
    </PageBody>
  );
}
