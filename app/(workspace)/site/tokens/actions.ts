'use server';

import { runAction } from '@/lib/http/run-action';
import { formatDate } from '@/lib/presentation/moment';
import type { CreateApiTokenInput } from '@/lib/schemas/api-token/api-token';
import { createApiToken } from '@/lib/services/api-token/create-api-token';
import { revokeApiToken } from '@/lib/services/api-token/revoke-api-token';

export async function createTokenAction(input: CreateApiTokenInput) {
  return runAction('make an API token', async (context) => {
    const { secret, expiresAt } = await createApiToken(context, input);
    return { secret, expiresOn: formatDate(expiresAt) };
  });
}

export async function revokeTokenAction(input: { readonly id: string }) {
  return runAction('revoke an API token', (context) => revokeApiToken(context, input));
}
