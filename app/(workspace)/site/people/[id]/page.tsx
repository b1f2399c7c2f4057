import type { Metadata } from 'next';
import Link from 'next/link';
import { PersonStatusBadge } from '@/components/people/people-table';
import { PersonActions } from '@/components/people/person-actions';
import { PersonForm } from '@/components/people/person-form';
import { PageBody, PageHeader } from '@/components/ui/page';
import { Panel } from '@/components/ui/panel';
import { loadPage } from '@/lib/http/load-page';
import { loadPerson } from '@/lib/services/people/load-person';
import * as actions from '../actions';

export const metadata: Metadata = { title: 'Person' };

export default async function PersonPage({ params }: { params: Promise<{ id: string }> }) {
  const { id } = await params;
  const { person, isSelf } = await loadPage(async (context) => ({
    person: await loadPerson(context, { id }),
    isSelf: context.actor.userId === id,
  }));
  const { displayName, roles, version, status, liveTokens } = person;
  return (
    <PageBody narrow>
      <PageHeader title={displayName} lead={person.email} back={{ href: '/site/people', label: 'People' }} />
      <div className="space-y-6">
        <Panel title="Name and roles">
          <PersonForm person={{ id, version, displayName, roles: [...roles] }} edit={actions.editPersonAction} />
        </Panel>
        <Panel title="Account" aside={<PersonStatusBadge status={status} />}>
          <PersonActions
            person={{ id, displayName, status, liveTokens }}
            isSelf={isSelf}
            resend={actions.resendInvitationAction}
            signOut={actions.signOutPersonAction}
            disable={actions.disablePersonAction}
            enable={actions.enablePersonAction}
          />
          <p className="mt-5 text-sm">
            <Link href={`/site/audit?by=${id}`} className="text-link">
              What {displayName} changed, in the audit log
            </Link>
          </p>
        </Panel>
      </div>
    </PageBody>
  );
}
