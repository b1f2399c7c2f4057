import type { Metadata } from 'next';
import { TokenTable } from '@/components/api-token/token-table';
import { LinkButton } from '@/components/ui/button';
import { EmptyState, PageBody, PageHeader } from '@/components/ui/page';
import { loadPage } from '@/lib/http/load-page';
import { formatDate } from '@/lib/presentation/moment';
import { listApiTokens } from '@/lib/services/api-token/list-api-tokens';
import { revokeTokenAction } from './actions';

export const metadata: Metadata = { title: 'API tokens' };

export default async function TokensPage() {
  const tokens = await loadPage(listApiTokens);
  const make = (
    <LinkButton href="/site/tokens/new" variant="primary">
      Make a token
    </LinkButton>
  );
  return (
    <PageBody>
      <PageHeader
        title="API tokens"
        lead="A token lets another system of yours use the API of this site, within what it may do and until it expires."
        back={{ href: '/site', label: 'Site' }}
        actions={tokens.length > 0 && make}
      />
      {tokens.length === 0 ? (
        <EmptyState title="No token has been made yet" action={make}>
          Make one when your booking system should send bookings here, or a script should run checks.
        </EmptyState>
      ) : (
        <TokenTable
          revoke={revokeTokenAction}
          tokens={tokens.map(({ id, name, scopes, state, createdByName, createdAt, expiresAt }) => ({
            id,
            name,
            scopes,
            state,
            madeBy: createdByName,
            madeOn: formatDate(createdAt),
            expiresOn: formatDate(expiresAt),
          }))}
        />
      )}
    </PageBody>
  );
}
