import type { SiteTransaction } from '@/db/client';
import { findBooking, type BookingOverview } from '@/db/queries/booking/bookings';
import { findKeepClearRequest } from '@/db/queries/keep-clear-request/keep-clear-requests';
import { findPlanOfBooking } from '@/db/queries/plan/plans';
import { findProtocol } from '@/db/queries/protocol/protocols';
import { listSessions } from '@/db/queries/scanner-session/scanner-sessions';
import { listScanners } from '@/db/queries/scanner/scanners';
import { findPolicy } from '@/db/queries/site-policy/policies';
import { listSizeReadings } from '@/db/queries/size-reading/size-readings';
import { ServiceError } from '@/lib/domain/errors';
import type { KeepClearRequestDocument } from '@/lib/domain/keep-clear-request/document';
import type { PreCheckQuestion } from '@/lib/domain/pre-check/pre-check';
import { dayOf } from '@/lib/domain/site/local-day';
import { effectivePolicy } from '../site-policy/effective-policy';

export interface CheckSetup {
  readonly booking: BookingOverview;
  readonly question: PreCheckQuestion;
  readonly policyVersion: number;
}

/** Its note and who asked are no part of the question: they change no answer. */
const askedFor = ({ keepClear, keepClearPreset, toleratedFoldOutsidePct }: KeepClearRequestDocument) => ({ keepClear, keepClearPreset, toleratedFoldOutsidePct });

/** Everything a check rests on, in its newest versions: eight queries, whatever the site holds. */
export async function readQuestion(trx: SiteTransaction, siteId: string, bookingId: string): Promise<CheckSetup | null> {
  const booking = await findBooking(trx, siteId, bookingId);
  if (!booking) return null;
  const scanners = await listScanners(trx, siteId, { includeArchived: true });
  const scanner = scanners.find(({ id }) => id === booking.scannerId);
  const protocol = await findProtocol(trx, siteId, booking.protocolId);
  // Foreign keys hold both; without them nothing could be checked.
  if (!scanner || !protocol) throw new ServiceError('not-found');
  const policy = effectivePolicy(await findPolicy(trx, siteId));
  const request = await findKeepClearRequest(trx, siteId, bookingId);
  const readings = await listSizeReadings(trx, siteId, bookingId);
  const plan = await findPlanOfBooking(trx, siteId, bookingId);
  const sessions = await listSessions(trx, siteId, { ...dayOf(booking.scheduledAt), scannerId: scanner.id });
  return {
    booking,
    policyVersion: policy.version,
    question: {
      booking: { scheduledAt: booking.scheduledAt, slotMinutes: booking.slotMinutes, surgeryOn: booking.surgeryOn },
      readings,
      scanner,
      others: scanners.filter(({ id, archivedAt }) => id !== scanner.id && archivedAt === null),
      protocol,
      policy: policy.policy,
      pathway: policy.pathway,
      sessions: sessions.map(({ startsAt, endsAt }) => ({ startsAt, endsAt })),
      ...(request ? { request: askedFor(request.document) } : {}),
      ...(plan ? { plan: { state: plan.state, version: plan.version, document: plan.document } } : {}),
    },
  };
}
