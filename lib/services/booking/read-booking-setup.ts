import type { SiteTransaction } from '@/db/client';
import { findBooking, type BookingOverview } from '@/db/queries/booking/bookings';
import { findKeepClearRequest } from '@/db/queries/keep-clear-request/keep-clear-requests';
import { findPlanOfBooking } from '@/db/queries/plan/plans';
import { findProtocol } from '@/db/queries/protocol/protocols';
import { findScanner } from '@/db/queries/scanner/scanners';
import { findPolicy } from '@/db/queries/site-policy/policies';
import { listSizeReadings } from '@/db/queries/size-reading/size-readings';
import type { Scanner, SitePolicy } from '@/lib/domain/case/model';
import { ServiceError } from '@/lib/domain/errors';
import { policyForExam, type KeepClearRequest } from '@/lib/domain/keep-clear-request/document';
import type { PlanRecord } from '@/lib/domain/plan/plan';
import type { ProtocolRecord } from '@/lib/domain/protocol/document';
import type { ScannerRecord } from '@/lib/domain/scanner/document';
import type { PolicyView } from '@/lib/schemas/site-policy';
import type { SizeRecordView } from '@/lib/schemas/size-reading';
import { effectivePolicy } from '../site-policy/effective-policy';
import { toSizeRecord } from '../size-reading/to-size-record';

/** Everything a booking rests on, in its newest versions. */
export interface BookingSetup {
  readonly booking: BookingOverview;
  readonly scanner: ScannerRecord;
  readonly protocol: ProtocolRecord;
  readonly policy: PolicyView;
  readonly sizeRecord: SizeRecordView;
  readonly plan: PlanRecord | null;
  /** What a radiologist asked to be kept free of fold. */
  readonly request: KeepClearRequest | null;
}

/** Seven queries, whatever the booking holds. Null when there is no such booking. */
export async function readBookingSetup(
  trx: SiteTransaction,
  where: { readonly siteId: string; readonly bookingId: string; readonly now: Date },
): Promise<BookingSetup | null> {
  const { siteId, bookingId, now } = where;
  const booking = await findBooking(trx, siteId, bookingId);
  if (!booking) return null;
  const scanner = await findScanner(trx, siteId, booking.scannerId);
  const protocol = await findProtocol(trx, siteId, booking.protocolId);
  // Foreign keys hold both; without them nothing could be shown.
  if (!scanner || !protocol) throw new ServiceError('not-found');
  const request = await findKeepClearRequest(trx, siteId, bookingId);
  const policy = effectivePolicy(await findPolicy(trx, siteId));
  const readings = await listSizeReadings(trx, siteId, bookingId);
  const plan = await findPlanOfBooking(trx, siteId, bookingId);
  const sizeRecord = toSizeRecord({
    readings,
    region: booking.region,
    tissueReachMm: scanner.document.scanner.tissueReachMm,
    policy: policy.policy,
    now,
  });
  return {
    booking, scanner, protocol, sizeRecord, plan, request,
    policy: { ...policy, policy: policyForExam(policy.policy, request?.document.toleratedFoldOutsidePct) },
  };
}

/** The scanner and policy a plan version was worked out with; read again only where they are not today's. */
export async function readPlannedSetup(
  trx: SiteTransaction,
  plan: PlanRecord,
  known?: Pick<BookingSetup, 'scanner' | 'policy'>,
): Promise<{ readonly scanner: Scanner; readonly policy: SitePolicy }> {
  const { scannerId, scannerVersion, policyVersion } = plan.document;
  const sameScanner = known?.scanner.id === scannerId && known.scanner.version === scannerVersion;
  const scanner = sameScanner ? known.scanner : await findScanner(trx, plan.siteId, scannerId, scannerVersion);
  if (!scanner) throw new ServiceError('not-found');
  const policy =
    known?.policy.version === policyVersion
      ? known.policy
      : effectivePolicy(policyVersion === 0 ? null : await findPolicy(trx, plan.siteId, policyVersion));
  return { scanner: scanner.document.scanner, policy: policyForExam(policy.policy, plan.toleratedFoldOutsidePct) };
}
