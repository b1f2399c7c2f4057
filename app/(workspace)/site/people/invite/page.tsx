import type { Metadata } from 'next';
import { InviteForm } from '@/components/people/invite-form';
import { PageBody, PageHeader } from '@/components/ui/page';
import { authorise } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { invitePersonAction } from '../actions';

export const metadata: Metadata = { title: 'Invite a person' };

export default async function InvitePersonPage() {
  await loadPage(async ({ actor }) => authorise(actor, 'person.invite'));
  return (
    <PageBody narrow>
      <PageHeader
        title="Invite a person"
        lead="They get a mail with a link to choose a password. It works once, for seven days."
        back={{ href: '/site/people', label: 'People' }}
      />
      <InviteForm invite={invitePersonAction} />
    </PageBody>
  );
}
