import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { ProtocolForm } from '@/components/protocol/protocol-form';
import { PageBody, PageHeader } from '@/components/ui/page';
import { requireActor } from '@/lib/auth/current-actor';
import { mayAttempt } from '@/lib/domain/access';
import { addProtocol } from '../actions';

export const metadata: Metadata = { title: 'Add a protocol' };

export default async function NewProtocolPage() {
  if (!mayAttempt(await requireActor(), 'protocol.edit')) notFound();
  return (
    <PageBody>
      <PageHeader
        title="Add a protocol"
        lead="Start with one sequence: it is enough for a verdict. Figures filled in are typical ones; type your own over them."
        back={{ href: '/site/protocols', label: 'Protocols' }}
      />
      <ProtocolForm save={addProtocol} mayEdit />
    </PageBody>
  );
}
