import type { Metadata } from 'next';
import { CaughtMailList } from '@/components/mail/caught-mail-list';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { loadPage } from '@/lib/http/load-page';
import { listCaughtMail } from '@/lib/services/mail/list-caught-mail';

export const metadata: Metadata = { title: 'Caught mail' };

export default async function CaughtMailPage() {
  const mails = await loadPage((context) => listCaughtMail(context));
  return (
    <PageBody>
      <PageHeader
        title="Caught mail"
        lead="This installation sends no mail out: what it would have sent is kept here, newest first."
        back={{ href: '/site', label: 'Site' }}
      />
      {mails.length === 0 ? (
        <EmptyState title="No mail yet">Invite a person, and the invitation appears here.</EmptyState>
      ) : (
        <CaughtMailList mails={mails} />
      )}
    </PageBody>
  );
}
