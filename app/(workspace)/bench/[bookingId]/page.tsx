import type { Metadata } from 'next';
import { Bench } from '@/components/bench/bench';
import { BookingHeading } from '@/components/bench/booking-heading';
import { identityOf } from '@/components/bench/saving/plan-identity';
import { SizeNeeded } from '@/components/bench/size-needed';
import { firstView } from '@/components/bench/state/first-view';
import { basisOfBooking, documentOfBooking, prescriptionsOf } from '@/components/bench/state/plan-document';
import { AddToDemonstration } from '@/components/demonstration/capture/add-to-demonstration';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { openBench } from '@/lib/services/booking/open-bench';
import { listDemonstrations } from '@/lib/services/demonstration/list-demonstrations';
import { addSceneAction, createDemonstrationAction } from '../../demonstrations/actions';

export const metadata: Metadata = { title: 'Bench' };

export default async function BookingBenchPage({ params }: { params: Promise<{ bookingId: string }> }) {
  const { bookingId } = await params;
  const { view, userId, mayEdit, teaches } = await loadPage(async (context) => ({
    view: await openBench(context, { bookingId }),
    userId: context.actor.userId ?? '',
    mayEdit: mayAttempt(context.actor, 'plan.edit'),
    teaches: mayAttempt(context.actor, 'demonstration.edit') ? await listDemonstrations(context) : null,
  }));
  const document = documentOfBooking(view);
  const heading = (
    <BookingHeading booking={view.booking} scannerName={view.scanner.scanner.name} opening={view.scanner.scanner.boreDiameterMm} />
  );
  if (!document) return <SizeNeeded bookingId={bookingId} accession={view.booking.accession} missing={view.sizeRecord.missing} />;
  const setting = { policy: view.policy.policy, today: dayKey(new Date()) };
  return (
    <Bench
      key={bookingId}
      document={document}
      setting={setting}
      {...firstView(document, setting)}
      basis={basisOfBooking(view)}
      plan={identityOf(view.plan)}
      userId={userId}
      mayEdit={mayEdit}
      keepClearPreset={view.requested?.keepClear ?? view.protocol.keepClear}
      keepClearAsked={view.requested && `Asked for by ${view.requested.by}. ${view.requested.note}`.trim()}
      protocolLabel={`${view.protocol.name} v${view.protocol.version}`}
      protocolPrescriptions={prescriptionsOf(view.protocol, view.scanner.scanner)}
    >
      {heading}
      {teaches && <AddToDemonstration demonstrations={teaches} add={addSceneAction} begin={createDemonstrationAction} reference={view.booking.accession} />}
    </Bench>
  );
}
