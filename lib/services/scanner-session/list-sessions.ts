import { inTransaction } from '@/db/client';
import { listTaken } from '@/db/queries/move-proposal/move-proposals';
import { listSessions as readSessions } from '@/db/queries/scanner-session/scanner-sessions';
import { authorise } from '@/lib/domain/access';
import { freeSpans, minutesFree } from '@/lib/domain/pre-check/room';
import type { SessionView } from '@/lib/schemas/scanner-session';
import type { ServiceContext } from '../context';

const DAY_MS = 86_400_000;

/** Sessions of some days with the room that is left in each. */
export async function listSessions({ actor }: ServiceContext, span: { readonly from: Date; readonly before: Date }): Promise<SessionView[]> {
  authorise(actor, 'scanner.read');
  authorise(actor, 'booking.read');
  return inTransaction(actor.siteId, async (trx) => {
    const sessions = await readSessions(trx, actor.siteId, span);
    const taken = await listTaken(trx, actor.siteId, { from: new Date(span.from.getTime() - DAY_MS), before: span.before });
    const byTime = [...sessions].sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
    return byTime.map((session) => ({
      id: session.id, scannerId: session.scannerId, scannerName: session.scannerName,
      startsAt: session.startsAt.toISOString(), endsAt: session.endsAt.toISOString(),
      minutes: (session.endsAt.getTime() - session.startsAt.getTime()) / 60_000,
      minutesFree: minutesFree(freeSpans([session], taken.filter(({ scannerId }) => scannerId === session.scannerId))),
    }));
  });
}
