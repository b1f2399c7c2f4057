import type { Scope } from '@/lib/domain/access';
import { createApiToken } from '@/lib/services/api-token/create-api-token';
import type { TestSite } from './database';

/** The secret of a new token of a site. */
export async function tokenFor(site: Pick<TestSite, 'person'>, scopes: Scope[]): Promise<string> {
  const { secret } = await createApiToken({ actor: await site.person('lead') }, { name: 'Test', scopes, days: 1 });
  return secret;
}
