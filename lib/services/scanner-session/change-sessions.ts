import { inTransaction } from '@/db/client';
import { findScanner } from '@/db/queries/scanner/scanners';
import { findSession, insertSessions, listSessions, lockScanner, removeSession as setRemoved } from '@/db/queries/scanner-session/scanner-sessions';
import { authorise } from '@/lib/domain/access';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import { dayOf } from '@/lib/domain/site/local-day';
import { parseInput } from '@/lib/schemas/parse-input';
import { addSessionsInput } from '@/lib/schemas/scanner-session';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { nowOf, type ServiceContext } from '../context';
import { setupChanged } from '../pre-check/mark-changed';

interface Span {
  readonly startsAt: Date;
  readonly endsAt: Date;
}

const clash = (a: Span, b: Span): boolean => a.startsAt < b.endsAt && b.startsAt < a.endsAt;

function refuseBadSpans(spans: readonly Span[]): void {
  spans.forEach((span, index) => {
    const hours = (span.endsAt.getTime() - span.startsAt.getTime()) / 3_600_000;
    if (hours <= 0 || hours > 24) throw invalidField(`sessions.${index}.endsAt`, 'not after the start, or more than 24 hours after it; allowed: later on the same day');
    if (spans.slice(0, index).some((other) => clash(other, span))) throw invalidField(`sessions.${index}.startsAt`, 'two of these sessions overlap; allowed: one after the other');
  });
}

/** Says when a scanner is staffed. All or none: one that overlaps what is there refuses the rest with it. */
export async function addSessions(context: ServiceContext, input: unknown): Promise<{ readonly added: number }> {
  const { actor } = context;
  const { siteId } = actor;
  authorise(actor, 'scanner-session.edit');
  const form = parseInput(addSessionsInput, input);
  const spans = form.sessions.map((one) => ({ startsAt: new Date(one.startsAt), endsAt: new Date(one.endsAt) }));
  refuseBadSpans(spans);
  const ordered = [...spans].sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime());
  const whole = { from: ordered[0]!.startsAt, before: new Date(Math.max(...spans.map(({ endsAt }) => endsAt.getTime()))) };
  return inTransaction(siteId, async (trx) => {
    const scanner = await findScanner(trx, siteId, form.scannerId);
    if (!scanner || scanner.archivedAt) throw invalidField('scannerId', 'not a scanner in use here; allowed: one of the site’s scanners');
    authorise(actor, 'scanner-session.edit', scanner);
    await lockScanner(trx, siteId, scanner.id);
    const there = await listSessions(trx, siteId, { ...whole, scannerId: scanner.id });
    const index = spans.findIndex((span) => there.some((other) => clash(other, span)));
    if (index >= 0) throw invalidField(`sessions.${index}.startsAt`, `${scanner.document.scanner.name} has a session then already; allowed: a time without one`);
    const ids = await insertSessions(trx, siteId, spans.map((span) => ({ ...span, scannerId: scanner.id })), authorOf(actor));
    await recordAudit(trx, context, ...ids.map((subjectId) => ({
      action: 'scanner-session.edit' as const, subjectType: 'scanner-session' as const, subjectId, fields: ['created'],
    })));
    await setupChanged(trx, siteId, { scannerId: scanner.id, from: dayOf(whole.from).from, before: dayOf(whole.before).before }, nowOf(context));
    return { added: ids.length };
  });
}

/** Takes a session out; what is booked in it stays and is checked again. */
export async function removeSession(context: ServiceContext, input: { readonly id: string }): Promise<void> {
  const { actor } = context;
  const { siteId } = actor;
  await inTransaction(siteId, async (trx) => {
    const session = await findSession(trx, siteId, input.id);
    authorise(actor, 'scanner-session.edit', session);
    if (!(await setRemoved(trx, siteId, session.id))) throw new ServiceError('conflict');
    await recordAudit(trx, context, { action: 'scanner-session.edit', subjectType: 'scanner-session', subjectId: session.id, fields: ['removed'] });
    await setupChanged(trx, siteId, { scannerId: session.scannerId, ...dayOf(session.startsAt) }, nowOf(context));
  });
}
