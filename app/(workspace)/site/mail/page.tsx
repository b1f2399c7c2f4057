import type { Metadata } from 'next';
import { CaughtMailList } from '@/components/mail/caught-mail-list';
import { toMailRow } from '@/components/mail/mail-row';
import { MailTable } from '@/components/mail/mail-table';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { mayAttempt } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { catchesMail, listCaughtMail } from '@/lib/services/mail/list-caught-mail';
import { listMail } from '@/lib/services/mail/list-mail';
import { sendAgain } from './actions';

export const metadata: Metadata = { title: 'Mail' };

export default async function MailPage() {
  const { failed, queued, sent, caught } = await loadPage(async (context) => ({
    ...(await listMail(context)),
    caught: catchesMail() && mayAttempt(context.actor, 'mail.read-caught') ? await listCaughtMail(context) : null,
  }));
  const none = failed.length + queued.length + sent.length === 0;
  return (
    <PageBody wide>
      <PageHeader
        title="Mail"
        lead="What could not be delivered, what waits for another try, and what went out last."
        back={{ href: '/site', label: 'Site' }}
      />
      {none ? (
        <EmptyState title="No mail yet">Invite a person, or ask for sizes by e-mail, and it appears here.</EmptyState>
      ) : (
        <div className="space-y-8">
          <MailTable title="Not delivered" rows={failed.map(toMailRow)} empty="Every mail was accepted." sendAgain={sendAgain} />
          {queued.length > 0 && <MailTable title="On its way" rows={queued.map(toMailRow)} empty="" sendAgain={sendAgain} />}
          <MailTable title="Sent last" rows={sent.map(toMailRow)} empty="Nothing was sent yet." sendAgain={sendAgain} />
        </div>
      )}
      {caught && caught.length > 0 && (
        <section aria-labelledby="caught" className="mt-10">
          <h2 id="caught" className="mb-1 text-xl">Caught here</h2>
          <p className="text-ink-soft">This installation sends no mail out: what it would have sent is kept here, newest first.</p>
          <CaughtMailList mails={caught} />
        </section>
      )}
    </PageBody>
  );
}
