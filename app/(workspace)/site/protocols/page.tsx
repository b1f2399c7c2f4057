import type { Metadata } from 'next';
import { ProtocolTable } from '@/components/protocol/protocol-table';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { listProtocols } from '@/lib/services/protocol/list-protocols';

export const metadata: Metadata = { title: 'Protocols' };

export default async function ProtocolsPage() {
  const { protocols, mayEdit } = await loadPage(async (context) => ({
    protocols: await listProtocols(context, { includeArchived: true }),
    mayEdit: mayAttempt(context.actor, 'protocol.edit'),
  }));
  return (
    <PageBody>
      <PageHeader
        title="Protocols"
        lead="What is run for an exam: sequences with their figures, and the area that must stay free of fold."
        back={{ href: '/site', label: 'Site' }}
        actions={
          mayEdit && (
            <LinkButton href="/site/protocols/new" variant="primary">
              Add a protocol
            </LinkButton>
          )
        }
      />
      <ProtocolTable protocols={protocols} mayEdit={mayEdit} />
    </PageBody>
  );
}
