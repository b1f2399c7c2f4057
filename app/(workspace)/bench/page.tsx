import type { Metadata } from 'next';
import { Bench } from '@/components/bench/bench';
import { BenchChoiceHeading } from '@/components/bench/bench-choice-heading';
import { NothingSetUp } from '@/components/bench/nothing-set-up';
import { identityOf } from '@/components/bench/saving/plan-identity';
import { firstView } from '@/components/bench/state/first-view';
import { documentOfProtocol, prescriptionsOf } from '@/components/bench/state/plan-document';
import { AddToDemonstration } from '@/components/demonstration/capture/add-to-demonstration';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { dayKey } from '@/lib/presentation/moment';
import { listDemonstrations } from '@/lib/services/demonstration/list-demonstrations';
import { getPolicy } from '@/lib/services/site-policy/get-policy';
import { getProtocol } from '@/lib/services/protocol/get-protocol';
import { listProtocols } from '@/lib/services/protocol/list-protocols';
import { listScanners } from '@/lib/services/scanner/list-scanners';

import { addSceneAction, createDemonstrationAction } from '../demonstrations/actions';

export const metadata: Metadata = { title: 'Bench' };

export default async function FreeBenchPage({ searchParams }: { searchParams: Promise<{ scanner?: string; protocol?: string }> }) {
  const wanted = await searchParams;
  const { scanners, protocols, scanner, protocol, policy, actor, teaches } = await loadPage(async (context) => {
    const [scanners, protocols, policy] = await Promise.all([listScanners(context), listProtocols(context), getPolicy(context)]);
    const scanner = scanners.find(({ id }) => id === wanted.scanner) ?? scanners[0];
    const chosen = protocols.find(({ id }) => id === wanted.protocol) ?? protocols[0];
    const protocol = chosen && (await getProtocol(context, { id: chosen.id }));
    const teaches = mayAttempt(context.actor, 'demonstration.edit') ? await listDemonstrations(context) : null;
    return { scanners, protocols, scanner, protocol, policy, actor: context.actor, teaches };
  });
  if (!scanner || !protocol) return <NothingSetUp scanner={scanner !== undefined} mayEdit={mayAttempt(actor, 'scanner.edit')} />;
  const document = documentOfProtocol(protocol, scanner.scanner);
  const setting = { policy: policy.policy, today: dayKey(new Date()) };
  return (
    <Bench
      key={`${scanner.id}/${protocol.id}`}
      document={document}
      setting={setting}
      {...firstView(document, setting)}
      basis={{
        bookingId: null,
        scannerId: scanner.id,
        scannerVersion: scanner.version,
        protocolId: protocol.id,
        protocolVersion: protocol.version,
        policyVersion: policy.version,
      }}
      plan={identityOf(undefined)}
      userId={actor.userId ?? ''}
      mayEdit={mayAttempt(actor, 'plan.edit')}
      keepClearPreset={protocol.keepClear}
      protocolLabel={`${protocol.name} v${protocol.version}`}
      protocolPrescriptions={prescriptionsOf(protocol, scanner.scanner)}
    >
      <BenchChoiceHeading
        scanners={scanners.map(({ id, scanner: { name } }) => ({ id, name }))}
        protocols={protocols.map(({ id, name }) => ({ id, name }))}
        scannerId={scanner.id}
        protocolId={protocol.id}
      />
      {teaches && <AddToDemonstration demonstrations={teaches} add={addSceneAction} begin={createDemonstrationAction} />}
    </Bench>
  );
}
