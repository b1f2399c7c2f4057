import { inTransaction } from '@/db/client';
import { authorise } from '@/lib/domain/access';
import { onScanner } from '@/lib/domain/case/lines';
import type { BenchView } from '@/lib/schemas/booking';
import { nowOf, type ServiceContext } from '../context';
import { toKeepClearRequestView } from '../keep-clear-request/to-keep-clear-request-view';
import { toPlanView } from '../plan/to-plan-view';
import { toProtocolView } from '../protocol/to-protocol-view';
import { toScannerView } from '../scanner/to-scanner-view';
import { keepClearFor } from '@/lib/domain/booking/assess-as-booked';
import { readBookingSetup, readPlannedSetup } from './read-booking-setup';
import { toBookingListItem } from './to-booking-view';

/**
 * Everything the bench needs of a booking, in one answer: the protocol's sequences are on the booked scanner's own
 * step and its keep-clear preset is laid into this patient.
 */
export async function openBench(context: ServiceContext, input: { readonly bookingId: string }): Promise<BenchView> {
  const { actor } = context;
  const { siteId } = actor;
  return inTransaction(siteId, async (trx) => {
    const setup = await readBookingSetup(trx, { siteId, bookingId: input.bookingId, now: nowOf(context) });
    authorise(actor, 'plan.read', setup?.booking);
    const { booking, scanner, protocol, policy, sizeRecord, plan, request } = setup!;
    const protocolView = toProtocolView(protocol);
    const { patient } = sizeRecord;
    return {
      booking: toBookingListItem(booking),
      sizeRecord,
      scanner: toScannerView(scanner),
      protocol: {
        ...protocolView,
        ...(patient ? { keepClear: keepClearFor(protocol.document, patient) } : {}),
        sequences: protocolView.sequences.map((sequence) => ({
          ...sequence,
          prescription: onScanner(sequence.prescription, scanner.document.scanner),
        })),
      },
      policy,
      ...(request ? { requested: toKeepClearRequestView(request, patient) } : {}),
      ...(plan ? { plan: toPlanView(plan, await readPlannedSetup(trx, plan, setup!)) } : {}),
    };
  });
}
