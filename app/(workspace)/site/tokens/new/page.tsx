import type { Metadata } from 'next';
import { CreateTokenForm } from '@/components/api-token/create-token-form';
import { PageBody, PageHeader } from '@/components/ui/page';
import { authorise } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { createTokenAction } from '../actions';

export const metadata: Metadata = { title: 'Make an API token' };

export default async function NewTokenPage() {
  await loadPage(async ({ actor }) => authorise(actor, 'api-token.create'));
  return (
    <PageBody narrow>
      <PageHeader title="Make an API token" back={{ href: '/site/tokens', label: 'API tokens' }} />
      <CreateTokenForm create={createTokenAction} />
    </PageBody>
  );
}
