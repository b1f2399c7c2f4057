import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { Bench } from '@/components/bench/bench';
import { identityOf } from '@/components/bench/saving/plan-identity';
import { firstView } from '@/components/bench/state/first-view';
import { documentOfPlan, prescriptionsOf } from '@/components/bench/state/plan-document';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { getPlan } from '@/lib/services/plan/get-plan';
import { getProtocol } from '@/lib/services/protocol/get-protocol';
import { getScanner } from '@/lib/services/scanner/get-scanner';
import { getPolicy } from '@/lib/services/site-policy/get-policy';

export const metadata: Metadata = { title: 'Bench' };

/** A saved plan without a booking, on the bench again: the next save is its next version. */
export default async function PlanBenchPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const { plan, scanner, protocol, policy, actor } = await loadPage(async (context) => {
    const plan = await getPlan(context, { id });
    const [scanner, protocol, policy] = await Promise.all([
      getScanner(context, { id: plan.scannerId }),
      plan.protocolId === null ? null : getProtocol(context, { id: plan.protocolId, version: plan.protocolVersion }),
      getPolicy(context),
    ]);
    return { plan, scanner, protocol, policy, actor: context.actor };
  });
  if (plan.bookingId !== null) redirect(`/bench/${plan.bookingId}`);
  const document = documentOfPlan({ ...plan, scanner: scanner.scanner });
  const setting = { policy: policy.policy, today: dayKey(new Date()) };
  return (
    <Bench
      key={id}
      document={document}
      setting={setting}
      {...firstView(document, setting)}
      basis={{
        bookingId: null,
        scannerId: plan.scannerId,
        scannerVersion: scanner.version,
        protocolId: plan.protocolId,
        protocolVersion: plan.protocolVersion,
        policyVersion: policy.version,
      }}
      plan={identityOf(plan)}
      userId={actor.userId ?? ''}
      mayEdit={mayAttempt(actor, 'plan.edit')}
      keepClearPreset={protocol?.keepClear ?? plan.keepClear}
      protocolLabel={protocol ? `${protocol.name} v${protocol.version}` : 'no protocol'}
      protocolPrescriptions={protocol ? prescriptionsOf(protocol, scanner.scanner) : {}}
    >
      <p className="text-sm text-ink-soft">{scanner.scanner.name}</p>
      <h1 className="text-base leading-snug font-semibold">
        <Link href={`/plans/${id}`} className="hover:underline">
          Plan without a booking
        </Link>
      </h1>
    </Bench>
  );
}
