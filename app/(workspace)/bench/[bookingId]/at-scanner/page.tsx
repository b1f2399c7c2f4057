import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { AtScanner } from '@/components/at-scanner/at-scanner';
import { identityOf } from '@/components/bench/saving/plan-identity';
import { SizeNeeded } from '@/components/bench/size-needed';
import { firstView } from '@/components/bench/state/first-view';
import { basisOfBooking, documentOfBooking } from '@/components/bench/state/plan-document';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { openBench } from '@/lib/services/booking/open-bench';

export const metadata: Metadata = { title: 'At the scanner' };

export default async function AtScannerPage({ params }: { params: Promise<{ bookingId: string }> }) {
  const { bookingId } = await params;
  const { view, userId, mayEdit } = await loadPage(async (context) => ({
    view: await openBench(context, { bookingId }),
    userId: context.actor.userId,
    mayEdit: mayAttempt(context.actor, 'plan.edit') && mayAttempt(context.actor, 'size-reading.record'),
  }));
  if (!mayEdit) notFound();
  const document = documentOfBooking(view);
  if (!document) return <SizeNeeded bookingId={bookingId} accession={view.booking.accession} missing={view.sizeRecord.missing} />;
  const setting = { policy: view.policy.policy, today: dayKey(new Date()) };
  return (
    <AtScanner
      key={bookingId}
      document={document}
      setting={setting}
      {...firstView(document, setting)}
      basis={{ ...basisOfBooking(view), bookingId }}
      plan={identityOf(view.plan)}
      userId={userId}
      reference={view.booking.accession}
      scannerName={view.scanner.scanner.name}
    />
  );
}
