import type { Metadata } from 'next';
import { PeopleTable } from '@/components/people/people-table';
import { LinkButton } from '@/components/ui/button';
import { PageBody, PageHeader } from '@/components/ui/page';
import { loadPage } from '@/lib/http/load-page';
import { listPeople } from '@/lib/services/people/list-people';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const people = await loadPage(listPeople);
  return (
    <PageBody>
      <PageHeader
        title="People"
        lead="Everyone with an account at this site. One person may hold several roles."
        back={{ href: '/site', label: 'Site' }}
        actions={
          <LinkButton href="/site/people/invite" variant="primary">
            Invite a person
          </LinkButton>
        }
      />
      <PeopleTable people={people} />
    </PageBody>
  );
}
